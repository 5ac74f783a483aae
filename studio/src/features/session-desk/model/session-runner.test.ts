import { StudyError, type SessionStudyInput } from '@voltiplano/engine';
import type { SessionAnswer } from '@voltiplano/engine/worker';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { sampleStudy } from './sample-study.ts';
import { SessionRunner, STALE_MS } from './session-runner.ts';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

type Call = { study: SessionStudyInput; answer: (ms: number) => Promise<void>; fail: (error: Error) => Promise<void> };

function runnerByHand() {
  const calls: Call[] = [];
  const runner = new SessionRunner(
    (study) =>
      new Promise((resolve, reject) => {
        const settle = async (act: () => void) => {
          act();
          await Promise.resolve();
          await Promise.resolve();
        };
        calls.push({
          study,
          answer: (ms) => settle(() => resolve({ ms } as SessionAnswer)),
          fail: (error) => settle(() => reject(error)),
        });
      }),
  );
  return { runner, calls };
}

const named = (name: string, message: string) => Object.assign(new Error(message), { name });

test('SessionRunner is working only when a run takes longer than 300 ms, and keeps the last answer meanwhile', async () => {
  const { runner, calls } = runnerByHand();
  runner.ask(sampleStudy);
  await calls[0]!.answer(5);
  runner.ask({ ...sampleStudy, title: 'next' });
  vi.advanceTimersByTime(STALE_MS - 1);
  expect(runner.get().isWorking).toBe(false);
  vi.advanceTimersByTime(2);
  expect(runner.get()).toMatchObject({ isWorking: true, answer: { ms: 5 }, study: { title: 'Sample' } });
  await calls[1]!.answer(6);
  expect(runner.get()).toMatchObject({ isWorking: false, answer: { ms: 6 }, study: { title: 'next' } });
});

test('SessionRunner tells a refusal from a breakdown, and forgets neither answer nor cause', async () => {
  const { runner, calls } = runnerByHand();
  runner.ask(sampleStudy);
  await calls[0]!.answer(5);
  runner.ask(sampleStudy);
  await calls[1]!.fail(new StudyError('REFUSED', [{ path: 'station', rule: 'refused', message: 'Cannot start: why' }]));
  expect(runner.get()).toMatchObject({
    failure: { kind: 'refused', sentences: ['Cannot start: why'] },
    answer: { ms: 5 },
  });
  runner.ask(sampleStudy);
  await calls[2]!.fail(named('WorkerCrashed', 'out of memory'));
  expect(runner.get().failure).toEqual({ kind: 'crashed', message: 'out of memory' });
  runner.ask(sampleStudy);
  await calls[3]!.answer(7);
  expect(runner.get().failure).toBeNull();
});

test('SessionRunner leaves out what was cancelled or overtaken', async () => {
  const { runner, calls } = runnerByHand();
  runner.ask(sampleStudy);
  runner.ask(sampleStudy);
  await calls[0]!.fail(named('Cancelled', 'A newer run took its place.'));
  await calls[1]!.answer(3);
  expect(runner.get()).toMatchObject({ failure: null, answer: { ms: 3 } });
});
