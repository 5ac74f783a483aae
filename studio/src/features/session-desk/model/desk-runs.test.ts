import type { SessionStudyInput } from '@voltiplano/engine';
import type { SessionAnswer } from '@voltiplano/engine/worker';
import { expect, test, vi } from 'vitest';
import { DeskRuns } from './desk-runs.ts';
import { freshDesk } from './desk-state.ts';
import { createDeskStore } from './desk-store.ts';
import { sampleStudy } from './sample-study.ts';

/** An answer that says which study it answers. */
const answerTo = (study: SessionStudyInput) =>
  ({ result: { currentMaxA: study.station.currentMaxA } }) as unknown as SessionAnswer;

function followed() {
  const live = vi.fn((study: SessionStudyInput) => Promise.resolve(answerTo(study)));
  const kept = vi.fn((study: SessionStudyInput) => Promise.resolve(answerTo(study)));
  const runs = new DeskRuns(live, kept);
  const store = createDeskStore(freshDesk(sampleStudy));
  const stop = runs.follow(store);
  const type = (entry: number) => store.dispatch({ type: 'entry', path: 'station.currentMaxA', entry, label: 'A' });
  return { runs, live, kept, store, stop, type };
}

test('DeskRuns runs a changed study once, tells of its answer and of nothing before it', async () => {
  const { runs, live, type } = followed();
  await vi.waitFor(() => expect(runs.get().answer).not.toBeNull());
  const told = vi.fn();
  runs.subscribe(told);
  type(350);
  expect(live).toHaveBeenCalledTimes(2);
  expect(told).not.toHaveBeenCalled();
  await vi.waitFor(() => expect(runs.get().answer?.result).toMatchObject({ currentMaxA: 350 }));
  expect(told).toHaveBeenCalledTimes(1);
});

test('a change that is not of the study runs nothing', () => {
  const { live, kept, store } = followed();
  store.dispatch({ type: 'view', view: { axis: 'soc' } });
  store.dispatch({ type: 'entry', path: 'station.currentMaxA', entry: 'x', label: 'A' });
  expect(live).toHaveBeenCalledTimes(1);
  expect(kept).not.toHaveBeenCalled();
});

test('the baseline is run when it is kept, stays the same object while the study moves, and goes when it is cleared', async () => {
  const { runs, kept, store, type } = followed();
  store.dispatch({ type: 'keep-baseline' });
  await vi.waitFor(() => expect(runs.get().baseline?.result).toMatchObject({ currentMaxA: 500 }));
  const { baseline } = runs.get();
  type(350);
  await vi.waitFor(() => expect(runs.get().answer?.result).toMatchObject({ currentMaxA: 350 }));
  expect(runs.get().baseline).toBe(baseline);
  expect(kept).toHaveBeenCalledTimes(1);
  store.dispatch({ type: 'clear-baseline' });
  expect(runs.get().baseline).toBeNull();
});

test('tryAgain runs the same study once more; a stopped follower runs no more', () => {
  const { runs, live, stop, type } = followed();
  runs.tryAgain();
  expect(live).toHaveBeenCalledTimes(2);
  expect(live.mock.calls[1]).toEqual(live.mock.calls[0]);
  stop();
  type(350);
  expect(live).toHaveBeenCalledTimes(2);
});
