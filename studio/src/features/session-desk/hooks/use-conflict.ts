import { useState } from 'react';
import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { useWorkspace } from '../../../lib/session/use-workspace.ts';
import type { DeskStore } from '../model/desk-store.ts';
import { changesBy } from '../model/opened-desk.ts';
import { createStudyFromDesk } from './create-study-from-desk.ts';
import { useStudyDesk } from './study-desk-context.ts';
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
    const desk = store.get();
    const { draft } = desk.sheet;
    const title = `${draft.study.title || 'Untitled session'}, copy`;
    const sheet = { ...desk.sheet, draft: { ...draft, study: { ...draft.study, title } } };
    const message = `Kept beside the ${changesBy(theirs)}`;
    const making = { workspaceId: place.workspaceId, personId: person.id, message, wish: copyKey };
    const study = await createStudyFromDesk({ ...desk, sheet }, making);
    takeTheirs();
    return { path: `/w/${place.workspaceId}/studies/${study.id}`, title };
  };
  return { keepMine, takeTheirs, keepBoth };
}
