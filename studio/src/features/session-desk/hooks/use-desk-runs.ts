import { useEffect, useState } from 'react';
import { sessionClient } from '../../../lib/session-client.ts';
import { DeskRuns } from '../model/desk-runs.ts';
import type { DeskStore } from '../model/desk-store.ts';

/** The runs of one desk, followed for as long as it is on the page. */
export function useDeskRuns(store: DeskStore): DeskRuns {
  const [runs] = useState(
    () =>
      new DeskRuns(
        (study) => sessionClient().latest(study),
        (study) => sessionClient().run(study).result,
      ),
  );
  // Speaks to the workers.
  useEffect(() => runs.follow(store), [runs, store]);
  return runs;
}
