import type { StudyIssue } from '@voltiplano/engine';
import { studyFromHash } from '../model/study-link.ts';
import type { DeskStore } from '../model/desk-store.ts';

/** What could not be opened, and why. */
export type OpenReport = { what: string; issues: StudyIssue[] };

/**
 * Opens the study that the page's address carries, and takes it out of the address, so that a reload goes on with what
 * was made of it. The study that was on the desk stands under undo.
 */
export async function openLinkedStudy(store: DeskStore): Promise<OpenReport | null> {
  const opened = await studyFromHash(window.location.hash);
  if (!opened) return null;
  window.history.replaceState(window.history.state, '', window.location.pathname + window.location.search);
  if ('issues' in opened) return { what: 'the study in this link', issues: opened.issues };
  store.dispatch({ type: 'open', study: opened.study, label: 'open the link' });
  return null;
}
