import { useState } from 'react';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import { createStudy } from '../api/create-study.ts';
import type { DeskStore } from '../model/desk-store.ts';
import { changesBy } from '../model/opened-desk.ts';
import { contentOf } from '../model/working-content.ts';
import { holdEdits } from './held-edits-storage.ts';
import { useStudyDesk } from './study-desk-context.ts';
import { tabIdentity } from './tab-identity.ts';
import { putOnDesk } from './use-study-saving.ts';

/** The three ways out of a conflict. In each, both sides stay within reach. */
export function useConflict(store: DeskStore, theirs: WorkingCopy) {
  const { saver, place } = useStudyDesk();
  const { person } = useWorkspace();
  const [copyKey] = useState(() => crypto.randomUUID());
  const takeTheirs = () => {
    putOnDesk(store, theirs);
    saver.took(theirs);
  };
  const keepMine = () => {
    const { draft, references } = store.get().sheet;
    putOnDesk(store, theirs);
    store.dispatch({ type: 'draft', draft, references, label: `write over the ${changesBy(theirs)}` });
    saver.took(theirs);
  };
  const keepBoth = async () => {
    const { draft, references } = contentOf(store.get().sheet);
    const title = `${draft.study.title || 'Untitled session'}, copy`;
    const mine = { draft: { ...draft, study: { ...draft.study, title } }, references };
    const study = await createStudy(place.workspaceId, mine, `Kept beside the ${changesBy(theirs)}`, copyKey);
    // Entries that wait are no part of a new study's revision: its desk finds them here and sends them.
    const edits = { content: mine, version: study.working.version, isSent: false, known: [], at: Date.now() };
    if (Object.keys(draft.pending).length > 0)
      holdEdits({ personId: person.id, studyId: study.id }, await tabIdentity(), edits);
    takeTheirs();
    return { path: `/w/${place.workspaceId}/studies/${study.id}`, title };
  };
  return { keepMine, takeTheirs, keepBoth };
}
