import type { QueryClient } from '@tanstack/react-query';
import type { Study } from '../../../../../server/src/contract/study.ts';
import { isProblem } from '../../../lib/api/api-problem.ts';
import { sessionEnd } from '../../../lib/api/session-end.ts';
import { createDeskStore, type DeskStore } from '../model/desk-store.ts';
import { keptDeskText } from '../model/kept-desk.ts';
import { openedDesk } from '../model/opened-desk.ts';
import { contentOf } from '../model/working-content.ts';
import { WorkingCopySaver, type SaverPorts } from '../model/working-copy-saver.ts';
import { setWorkingCopy, studyQuery, type StudyPlace } from '../api/study-query.ts';
import { writeWorkingCopy } from '../api/write-working-copy.ts';
import { heldDesks, holdDesk, holdEdits, letGo, makeRoom, type StudyKey } from './held-edits-storage.ts';
import { openTabs, tabIdentity } from './tab-identity.ts';

export type OpenedStudyDesk = {
  store: DeskStore;
  saver: WorkingCopySaver;
  /** Keeps the desk with its undo in this browser. */
  keep: () => void;
  /** What was found in this browser, in words; null where nothing is worth saying. */
  found: string | null;
  /** Whether this browser holds changes that are not shown, because the study may only be read. */
  hidesChanges: boolean;
};

type Opening = { study: Study; place: StudyPlace; personId: string; mayEdit: boolean; client: QueryClient };

/** Puts a study on the desk, with what this browser holds of it. */
export async function openStudyDesk(opening: Opening): Promise<OpenedStudyDesk> {
  const { study, place, personId, mayEdit } = opening;
  const key = { personId, studyId: place.studyId };
  const [tabId, open] = await tabIdentity().then(async (id) => [id, await openTabs()] as const);
  const held = heldDesks(key);
  const own = held.find((one) => one.tabId === tabId) ?? null;
  const gone = held.filter((one) => !open.has(one.tabId));
  const opened = openedDesk(study.working, mayEdit ? own : null, mayEdit ? gone : []);
  const store = createDeskStore({ ...opened.desk, readOnly: !mayEdit });
  const ports = portsOf(opening, key, tabId);
  const saver = new WorkingCopySaver(
    contentOf(opened.desk.sheet),
    opened.base,
    opened.attempts,
    opened.conflict,
    ports,
  );
  const keep = () => void (mayEdit && holdDesk(key, tabId, keptDeskText(store.get())));
  if (mayEdit)
    takeOver(
      key,
      gone.map((one) => one.tabId),
      saver,
      keep,
    );
  const hidesChanges = !mayEdit && [own, ...gone].some((one) => one !== null && !one.edits.isSent);
  return { store, saver, keep, found: opened.found, hidesChanges };
}

/** What tabs held that are gone is let go of only once this one holds it. */
function takeOver(key: StudyKey, gone: readonly string[], saver: WorkingCopySaver, keep: () => void): void {
  keep();
  if (saver.holdNow()) gone.forEach((tabId) => letGo(key, tabId));
  makeRoom();
}

function portsOf({ place, client }: Opening, key: StudyKey, tabId: string): SaverPorts {
  return {
    write: async (content, version) => {
      // A page that was signed out must not write in the name of whoever signed in after.
      if (sessionEnd.get()) throw new SignedOut();
      return writeWorkingCopy(place, content, version);
    },
    read: async () => (await client.fetchQuery({ ...studyQuery(place), staleTime: 0 })).working,
    hold: (edits) => holdEdits(key, tabId, edits),
    acknowledged: (copy) => void setWorkingCopy(client, place, copy),
    isSignedOut: (error) =>
      error instanceof SignedOut ||
      isProblem(error, 'NOT_SIGNED_IN', 'SESSION_ENDED', 'REFRESH_REUSED', 'ACCESS_EXPIRED'),
  };
}

/** Nothing is sent while nobody is known to be signed in. */
class SignedOut extends Error {}
