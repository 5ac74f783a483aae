import type { SessionStudyInput } from '@voltiplano/engine';
import { useEffect, useMemo, useState, useSyncExternalStore } from 'react';
import { SessionRunner } from '../model/session-runner.ts';
import type { DeskRun } from './run-context.ts';
import { sessionClient } from './session-client.ts';

/**
 * Results that follow the study as it is edited: the newest study is run as soon as the worker is free, and the last
 * good answer stays until then.
 */
export function useSessionRun(study: SessionStudyInput, baseline: SessionStudyInput | null): DeskRun {
  const [live] = useState(() => new SessionRunner((one) => sessionClient().latest(one)));
  const [kept] = useState(() => new SessionRunner((one) => sessionClient().run(one).result));
  // Speaks to the worker.
  useEffect(() => live.ask(study), [live, study]);
  useEffect(() => (baseline ? kept.ask(baseline) : kept.forget()), [kept, baseline]);
  const state = useSyncExternalStore(live.subscribe, live.get);
  const before = useSyncExternalStore(kept.subscribe, kept.get);
  return useMemo(
    () => ({
      ...state,
      baseline: before.answer && before.study ? { result: before.answer.result, study: before.study } : null,
      tryAgain: () => live.ask(study),
    }),
    [state, before, live, study],
  );
}
