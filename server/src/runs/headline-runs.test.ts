import { Worker } from 'node:worker_threads';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { exampleStudy } from '../testing/example-study.ts';
import { computeHeadline } from './compute-headline.ts';
import { engineVersion, HeadlineRuns } from './headline-runs.ts';

let runs: HeadlineRuns;
afterEach(() => runs.close());

const study = exampleStudy();
const startingAt = (startSoc: number) => ({ ...study, session: { ...study.session, startSoc } });

/** Threads that do to the title they are given what it says; `made` counts them. */
function openObeying(timeLimitMs?: number) {
  const program = `const { parentPort } = require('node:worker_threads');
    parentPort.on('message', ({ title }) => {
      if (title === 'hang') for (;;);
      if (title === 'throw') throw new Error('out of ideas');
      if (title === 'exit') process.exit(3);
      parentPort.postMessage({ engineVersion: '0', failure: title, numbers: null, section: null });
    });`;
  const startThread = vi.fn(() => new Worker(program, { eval: true }));
  runs = new HeadlineRuns({ startThread, timeLimitMs });
  const run = async (title: string) => (await runs.headlineOf({ ...study, title })).failure;
  return { run, startThread };
}

describe('HeadlineRuns', () => {
  it('answers what the engine answers, whatever is asked for at once, each to its own question', async () => {
    runs = new HeadlineRuns();
    const socs = [0, 0.1, 0.2, 0.3];
    const headlines = await Promise.all(socs.map((soc) => runs.headlineOf(startingAt(soc))));
    expect(headlines).toEqual(socs.map((soc) => computeHeadline(startingAt(soc), engineVersion)));
    expect(engineVersion).toMatch(/^\d+\.\d+\.\d+$/);
  });

  it('starts one thread, with the first run', async () => {
    const { run, startThread } = openObeying();
    expect(startThread).not.toHaveBeenCalled();
    expect(await Promise.all([run('a'), run('b')])).toEqual(['a', 'b']);
    expect(await run('c')).toBe('c');
    expect(startThread).toHaveBeenCalledTimes(1);
  });

  it('stops a run that takes too long, and goes on with the next on another thread', async () => {
    const { run, startThread } = openObeying(300);
    expect(await Promise.all([run('hang'), run('next')])).toEqual([
      'The run took longer than 0.3 s and was stopped.',
      'next',
    ]);
    expect(startThread).toHaveBeenCalledTimes(2);
  });

  it('says why a run broke down, and goes on with the next on another thread', async () => {
    const { run, startThread } = openObeying();
    expect(await Promise.all([run('throw'), run('exit'), run('next')])).toEqual([
      'The run broke down: out of ideas',
      'The run broke down: its thread ended with 3.',
      'next',
    ]);
    expect(startThread).toHaveBeenCalledTimes(3);
  });

  it('rejects the run under way, those that wait and those to come once it is closed', async () => {
    const { run } = openObeying();
    const asked = Promise.allSettled([run('hang'), run('waiting')]);
    await vi.waitFor(() => expect(runs).toHaveProperty('underWay', expect.anything()));
    await runs.close();
    const closing = expect.objectContaining({ message: 'The server is closing.' }) as Error;
    expect(await asked).toEqual([
      { status: 'rejected', reason: closing },
      { status: 'rejected', reason: closing },
    ]);
    await expect(run('late')).rejects.toThrow('The server is closing.');
  });
});
