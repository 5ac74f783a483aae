import { afterEach, expect, test, vi } from 'vitest';
import { timedStudy } from '../bench/studies.ts';
import { CELL, decodeSweep, encodeSweep, parseSweep, runCells, type SweepPlan } from '../src/index.ts';
import {
  Cancelled,
  createSessionClient,
  createSweepRun,
  WorkerCrashed,
  type ChunkRunner,
  type SessionClient,
  type SweepProgress,
  type TimedChunk,
} from './index.ts';
import { bundleSessionWorker, startNodeWorker } from './node-worker.ts';

const { session } = timedStudy('b1');
const sweep = (count: number): SweepPlan =>
  parseSweep({
    format: 'voltiplano/study',
    version: 1,
    kind: 'sweep',
    base: { ...timedStudy('b1'), session: { ...session, maxMin: 3 } },
    sweep: {
      axes: [
        { path: 'session.ambientC', from: 0, to: 30, count },
        { path: 'session.startTempC', values: [10, 20] },
      ],
    },
  });
const plan = sweep(10);

let client: SessionClient | undefined;
afterEach(() => client?.close());

type Asked = { indices: Uint32Array; answer: () => void; fail: (error: Error) => void; cancelled: boolean };

/** A runner that answers when told to, with real runs that are said to take `msPerCell`. */
function byHand(lanes: number, msPerCell = 20) {
  const asked: Asked[] = [];
  const run: ChunkRunner['run'] = (of, indices) => {
    const one: Asked = { indices, answer: () => {}, fail: () => {}, cancelled: false };
    const result = new Promise<TimedChunk>((resolve, reject) => {
      one.answer = () => resolve({ ...runCells(of, indices), ms: msPerCell * indices.length });
      one.fail = reject;
    });
    asked.push(one);
    return { result, cancel: () => (one.cancelled = true) };
  };
  return { runner: { lanes, run }, asked };
}

/** A runner that answers at once, and breaks down over some cells. */
function breaking(...bad: number[]): ChunkRunner & { tries: number[][] } {
  const tries: number[][] = [];
  return {
    tries,
    lanes: 1,
    run: (of, indices) => {
      tries.push([...indices]);
      const broke = indices.some((index) => bad.includes(index));
      const result = broke
        ? Promise.reject(new WorkerCrashed('The worker broke down (no memory).'))
        : Promise.resolve({ ...runCells(of, indices), ms: 12 * indices.length });
      return { result, cancel: () => {} };
    },
  };
}

const settle = () => new Promise((resolve) => setImmediate(resolve));
const bytesOf = async (runner: ChunkRunner) => encodeSweep(await createSweepRun(runner, plan).finished, '1');

test('each lane has one chunk at a time, first of one cell, then of a tenth of a second', async () => {
  const { runner, asked } = byHand(2);
  const run = createSweepRun(runner, plan);
  expect(asked.map(({ indices }) => indices.length)).toEqual([1, 1]);
  asked[0].answer();
  await settle();
  expect(asked).toHaveLength(3);
  expect(asked[2].indices).toHaveLength(5);
  asked[1].answer();
  await settle();
  asked[2].answer();
  asked[3].answer();
  await settle();
  asked.slice(4).forEach((one) => one.answer());
  await settle();
  asked.slice(6).forEach((one) => one.answer());
  await expect(run.finished).resolves.toBe(run.result);
  expect(asked.flatMap(({ indices }) => [...indices]).sort((a, b) => a - b)).toEqual([...Array(20).keys()]);
  expect(run.state).toBe('done');
});

test('progress counts up to the total, with time left once a chunk is back', async () => {
  const seen: SweepProgress[] = [];
  await createSweepRun(breaking(), plan, { onProgress: (one) => seen.push(one) }).finished;
  expect(seen[0]).toEqual({ total: 20, done: 0, failed: 0, msLeft: null });
  expect(seen[1]).toEqual({ total: 20, done: 1, failed: 0, msLeft: 19 * 12 });
  expect(seen.at(-1)).toEqual({ total: 20, done: 20, failed: 0, msLeft: 0 });
});

test('pause lets what is under way come in and starts nothing; resume goes on to the same bytes', async () => {
  const { runner, asked } = byHand(1, 60);
  const run = createSweepRun(runner, plan);
  run.pause();
  asked[0].answer();
  await settle();
  expect({ state: run.state, done: run.result.done, asked: asked.length }).toEqual({
    state: 'paused',
    done: 1,
    asked: 1,
  });
  run.resume();
  for (let i = 1; run.state === 'running'; i++) {
    asked[i].answer();
    await settle();
  }
  expect(encodeSweep(run.result, '1')).toEqual(await bytesOf(breaking()));
});

test('a pause during the last chunk does not keep the run from being done', async () => {
  const { runner, asked } = byHand(20);
  const run = createSweepRun(runner, plan);
  run.pause();
  asked.forEach((one) => one.answer());
  await expect(run.finished).resolves.toBe(run.result);
  expect(run.state).toBe('done');
});

test('a run that was cancelled, kept as bytes and carried on ends with the bytes of one that was left alone', async () => {
  const { runner, asked } = byHand(2);
  const run = createSweepRun(runner, plan);
  asked[0].answer();
  await settle();
  run.cancel();
  await expect(run.finished).rejects.toBeInstanceOf(Cancelled);
  expect(asked.map(({ cancelled }) => cancelled)).toEqual([false, true, true]);
  // What comes in late changes nothing more.
  asked[1].answer();
  await settle();
  expect(run.result.done).toBe(1);

  const from = decodeSweep(encodeSweep(run.result, '1'), plan, '1');
  const rest = breaking();
  const carried = await createSweepRun(rest, plan, { from }).finished;
  expect(rest.tries.flat()).toHaveLength(19);
  expect(encodeSweep(carried, '1')).toEqual(await bytesOf(breaking()));
  expect(() => createSweepRun(rest, sweep(11), { from })).toThrow('belong to another sweep');
});

test('a run over nothing that is left is done at once', async () => {
  const all = await createSweepRun(breaking(), plan).finished;
  const idle = breaking();
  await expect(createSweepRun(idle, plan, { from: all }).finished).resolves.toBe(all);
  expect(idle.tries).toEqual([]);
});

test('a chunk over which the worker breaks down is halved down to the guilty cell, which fails; all others come in', async () => {
  const runner = breaking(7, 12);
  const result = await createSweepRun(runner, plan).finished;
  expect(result.failed).toBe(2);
  expect(result.done).toBe(18);
  for (const cell of [7, 12])
    expect(result.failures.get(cell)).toEqual({
      code: 'WORKER',
      path: '',
      message: 'The run broke the worker, twice.',
    });
  expect(runner.tries.some((indices) => indices.length > 1 && indices.includes(7))).toBe(true);
  expect(runner.tries.filter((indices) => indices.length === 1 && indices[0] === 7).length).toBeGreaterThan(0);
});

test('a lone first cell is tried once more before it fails', async () => {
  const first = parseSweep({
    format: 'voltiplano/study',
    version: 1,
    kind: 'sweep',
    base: timedStudy('b1'),
    sweep: { axes: [{ path: 'session.ambientC', values: [20] }] },
  });
  const runner = breaking(0);
  const result = await createSweepRun(runner, first).finished;
  expect(runner.tries).toEqual([[0], [0]]);
  expect(result.failed).toBe(1);
});

test('an error that is no cell’s own ends the run with it', async () => {
  const { runner, asked } = byHand(1);
  const run = createSweepRun(runner, plan);
  asked[0].fail(new TypeError('no such method'));
  await expect(run.finished).rejects.toThrow('no such method');
});

test('on threads a sweep answers what it answers in this one, and a live run goes between its chunks', async () => {
  const program = await bundleSessionWorker();
  client = createSessionClient(() => startNodeWorker(program), 1);
  const many = sweep(250);
  const live: Promise<void>[] = [];
  let doneBefore = -1;
  const onChunk = vi.fn((_: unknown, { done }: { done: number }) => {
    if (done < 20 || live.length > 0) return;
    live.push(client!.latest(timedStudy('b1')).then(() => void (doneBefore = run.result.done)));
  });
  const run = client.sweep(many, { onChunk });
  const result = await run.finished;
  await live[0];
  expect(result.done).toBe(500);
  expect(doneBefore).toBeGreaterThan(0);
  expect(doneBefore).toBeLessThan(500);
  const cells = [0, 123, 499];
  const here = runCells(many, cells);
  many.columns.forEach((id, column) =>
    cells.forEach((cell, i) => expect(result.column(id)[cell]).toBe(here.values[column * cells.length + i])),
  );
  expect(result.status.every((status) => status === CELL.done)).toBe(true);
  expect(onChunk.mock.calls.length).toBeLessThan(300);
}, 30_000);

test('a live run goes before chunks of several sweeps that wait already', async () => {
  const program = await bundleSessionWorker();
  client = createSessionClient(() => startNodeWorker(program), 1);
  const order: string[] = [];
  const sweeps = ['a', 'b', 'c'].map((name) => client!.sweep(plan, { onChunk: () => order.push(name) }));
  await client.latest(timedStudy('b1'));
  // Only the chunk under way was ahead of it.
  expect(order).toEqual(['a']);
  await Promise.all(sweeps.map(({ finished }) => finished));
}, 30_000);
