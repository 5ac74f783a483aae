import type { Study } from '../../../../../server/src/contract/study.ts';
import { createStudy } from '../api/create-study.ts';
import type { DeskState } from '../model/desk-state.ts';
import { keptDeskText } from '../model/kept-desk.ts';
import { contentMark, contentOf } from '../model/working-content.ts';
import { holdDesk, holdEdits } from './held-edits-storage.ts';
import { tabIdentity } from './tab-identity.ts';

type Making = { workspaceId: string; personId: string; message: string; wish: string };

/**
 * Makes a study of what is on a desk. Entries that wait are no part of its first revision: its own desk, opened in this
 * tab, finds them here and sends them, and goes on with the same undo and baseline.
 */
export async function createStudyFromDesk(desk: DeskState, making: Making): Promise<Study> {
  const content = contentOf(desk.sheet);
  const study = await createStudy(making.workspaceId, content, making.message, making.wish);
  const isSent = Object.keys(content.draft.pending).length === 0;
  const { version } = study.working;
  const tabId = await tabIdentity();
  const key = { personId: making.personId, studyId: study.id };
  holdEdits(key, tabId, { content, version, isSent, known: [contentMark(content)], at: Date.now() });
  holdDesk(key, tabId, keptDeskText(desk));
  return study;
}
