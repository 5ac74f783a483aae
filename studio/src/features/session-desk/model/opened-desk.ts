import type { WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { deskWith, type DeskState, type Step } from './desk-state.ts';
import type { HeldDesk, HeldEdits } from './held-edits.ts';
import { contentOfWorking, contentMark, type Content } from './working-content.ts';

/** The version on the server that further edits are made from, and the mark of what it says. */
export type Base = { version: number; mark: string };

/** A desk as it is put up, and what is to be sent of it. */
export type OpenedDesk = {
  desk: DeskState;
  base: Base;
  /** Marks of contents that were sent with no answer yet. */
  attempts: readonly string[];
  /** The server's copy, where it moved on while edits were held here. */
  conflict: WorkingCopy | null;
  /** What was found, in words for a notice; null where nothing is worth saying. */
  found: string | null;
};

/**
 * Puts up the desk of a study from the server's copy and from what this browser holds of it.
 *
 * Edits that never reached the server go onto the desk and are sent, or, where the server moved on, lead to a conflict.
 * Of several tabs' edits the newest are on the desk and the others stand under undo, so that none is lost.
 *
 * @param own    what this tab holds
 * @param found  what tabs hold that are gone, newest first
 */
export function openedDesk(server: WorkingCopy, own: HeldDesk | null, found: readonly HeldDesk[]): OpenedDesk {
  const theirs = contentOfWorking(server);
  const base: Base = { version: server.version, mark: contentMark(theirs) };
  const unsent = [own, ...found].filter((one) => one !== null).filter(({ edits }) => isUnsent(edits, base));
  const [mine, ...others] = unsent.sort((a, b) => b.edits.at - a.edits.at);
  if (!mine) return { desk: freshOrMoved(server, theirs, own ?? found[0] ?? null), ...clean(base) };
  const { edits } = mine;
  const follows = edits.version === base.version || edits.known.includes(base.mark);
  const words = foundWords(mine.tabId === own?.tabId, others.length);
  const desk = withSteps(mine.desk ?? deskWith({ ...edits.content, baseline: null }), others);
  if (follows) return { desk, base, attempts: [], conflict: null, found: words };
  const left: Base = { version: edits.version, mark: edits.known[0] ?? '' };
  return { desk, base: left, attempts: edits.known, conflict: server, found: words };
}

function clean(base: Base): Omit<OpenedDesk, 'desk'> {
  return { base, attempts: [], conflict: null, found: null };
}

/** Whether held edits say something that the server does not have. */
function isUnsent({ isSent, content }: HeldEdits, base: Base): boolean {
  return !isSent && contentMark(content) !== base.mark;
}

/** The server's copy, with the undo of the desk that was left; where the copy moved on, what was left stands under undo. */
function freshOrMoved(server: WorkingCopy, theirs: Content, left: HeldDesk | null): DeskState {
  if (!left?.desk) return deskWith({ ...theirs, baseline: null });
  const { desk } = left;
  if (contentMark(desk.sheet) === contentMark(theirs)) return desk;
  const step: Step = { sheet: desk.sheet, label: changesBy(server) };
  return { ...desk, sheet: { ...desk.sheet, ...theirs }, past: [...desk.past, step], future: [], typingAt: null };
}

/** "changes by Mateo Condori": what a step of undo is called that brought another person's changes. */
export function changesBy({ changedBy }: Pick<WorkingCopy, 'changedBy'>): string {
  return `changes by ${changedBy?.name ?? 'a person whose account is gone'}`;
}

/** Oldest first, so that undo walks back from the newest. */
function withSteps(desk: DeskState, others: readonly HeldDesk[]): DeskState {
  const steps = others.toReversed().map(({ edits }): Step => {
    const sheet = { ...desk.sheet, ...edits.content };
    return { sheet, label: 'go on from the newer changes of another tab' };
  });
  return steps.length === 0 ? desk : { ...desk, past: [...desk.past, ...steps] };
}

function foundWords(isOwn: boolean, others: number): string | null {
  const under =
    others === 0
      ? ''
      : others === 1
        ? ' Those of another tab are under undo.'
        : ` Those of ${others} other tabs are under undo.`;
  if (!isOwn) return `Found in this browser: changes of a closed tab that were not sent.${under}`;
  return under === '' ? null : `Found in this browser: changes that were not sent.${under}`;
}
