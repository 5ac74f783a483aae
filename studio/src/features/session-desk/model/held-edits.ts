import { studyIssues } from './checked-study.ts';
import type { DeskState } from './desk-state.ts';
import { readKeptDesk } from './kept-desk.ts';
import { contentMark, type Content } from './working-content.ts';

const VERSION = 1;

/** What this browser holds of a study in one tab, so that nothing is lost before the server has it. */
export type HeldEdits = {
  content: Content;
  /** Version of the working copy that the content was made from. */
  version: number;
  /** Whether the server has acknowledged this content as that version. */
  isSent: boolean;
  /**
   * Marks of contents that, found on the server, are nobody else's: what the edits were made from, and what was sent
   * over it with no answer yet, one of which may have arrived.
   */
  known: readonly string[];
  /** When it was held [ms since 1970]. */
  at: number;
};

/** The edits and, where it was written too, the desk with its undo. */
export type HeldDesk = { tabId: string; edits: HeldEdits; desk: DeskState | null };

export function heldEditsText(edits: HeldEdits): string {
  return JSON.stringify({ format: VERSION, ...edits });
}

/** Reads held edits; undefined where the text is none, or its study can no longer be run. */
export function readHeldEdits(text: string): HeldEdits | undefined {
  try {
    const held = JSON.parse(text) as HeldEdits & { format: number };
    const isWhole =
      held.format === VERSION &&
      Number.isInteger(held.version) &&
      Array.isArray(held.known) &&
      Array.isArray(held.content.references) &&
      typeof held.content.draft.pending === 'object' &&
      studyIssues(held.content.draft.study).length === 0;
    if (!isWhole) return undefined;
    const { content, version, isSent, known, at } = held;
    return { content, version, isSent, known, at };
  } catch {
    return undefined;
  }
}

/** The held edits with the desk they stood on. The desk is written less often: the edits are the newer of the two. */
export function heldDesk(tabId: string, edits: HeldEdits, deskText: string | null): HeldDesk {
  const read = deskText === null ? null : readKeptDesk(deskText);
  if (!read || 'issues' in read) return { tabId, edits, desk: null };
  const { desk } = read;
  const { draft, references } = edits.content;
  const isSame = contentMark(desk.sheet) === contentMark(edits.content);
  return { tabId, edits, desk: isSame ? desk : { ...desk, sheet: { ...desk.sheet, draft, references } } };
}
