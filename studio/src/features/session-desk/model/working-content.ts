import type { PartReference, WorkingCopy } from '../../../../../server/src/contract/study.ts';
import { studyIssues } from './checked-study.ts';
import type { Sheet } from './desk-state.ts';
import type { Draft, Entry } from './draft.ts';
import { parsePath } from '../../../lib/study-path.ts';

/** What the working copy of a study on the server holds of a sheet. */
export type Content = { draft: Draft; references: readonly PartReference[] };

export function contentOf({ draft, references }: Sheet): Content {
  return { draft, references };
}

/** A content as the body of a call. */
export function contentBody(content: Content) {
  const { study, pending } = content.draft;
  return { inputs: study, pending, parts: referencesToPresent(content) };
}

/** A part that was taken out of the study keeps its reference on the desk, for when it comes back. */
function referencesToPresent({ draft, references }: Content): PartReference[] {
  return references.filter(({ part }) => part in draft.study);
}

/** A short mark of a content: the same for contents that say the same, whatever the order of their members. */
export function contentMark(content: Content): string {
  const { inputs, pending, parts } = contentBody(content);
  const sorted = parts.sort((a, b) => (a.part < b.part ? -1 : 1));
  return markOf(steadyText([inputs, pending, sorted.map(referenceOnly)]));
}

/** Length and two 32-bit FNV-1a hashes with different beginnings: 64 bits, so that two texts never share a mark. */
function markOf(text: string): string {
  let one = 0x811c9dc5;
  let other = 0x9747b28c;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    one = Math.imul(one ^ code, 0x01000193);
    other = Math.imul(other ^ (code + i), 0x01000193);
  }
  return [text.length, one >>> 0, other >>> 0].map((part) => part.toString(36)).join('.');
}

/**
 * The content of a working copy as the server has it.
 *
 * @throws {Error} where its inputs are no session study; the server takes none that cannot be run
 */
export function contentOfWorking({
  inputs,
  pending,
  parts,
}: Pick<WorkingCopy, 'inputs' | 'pending' | 'parts'>): Content {
  const issues = studyIssues(inputs);
  if (inputs.kind !== 'session' || issues.length > 0)
    throw new Error(`The study cannot be put on the desk: ${issues.map(({ message }) => message).join('; ')}`);
  const entries = Object.entries(pending).filter(
    (pair): pair is [string, Entry] => isPath(pair[0]) && isEntry(pair[1]),
  );
  return {
    draft: { study: inputs, pending: Object.fromEntries(entries) },
    references: parts.map(referenceOnly),
  };
}

/** A reference without what the library says of it now. */
export function referenceOnly({ part, itemId, revision, keptAgainst }: PartReference): PartReference {
  return { part, itemId, revision, keptAgainst };
}

/** JSON with members in the order of their names; what is undefined is left out, as in a file. */
export function steadyText(value: unknown): string {
  return JSON.stringify(value, (_name, inner: unknown) =>
    typeof inner === 'object' && inner !== null && !Array.isArray(inner)
      ? Object.fromEntries(Object.entries(inner).sort(([a], [b]) => (a < b ? -1 : 1)))
      : inner,
  );
}

function isPath(text: string): boolean {
  try {
    parsePath(text);
    return true;
  } catch {
    return false;
  }
}

function isEntry(value: unknown): value is Entry {
  const isCell = (one: unknown) => one === null || typeof one === 'number' || typeof one === 'string';
  if (!Array.isArray(value)) return isCell(value);
  return value.every((row) => Array.isArray(row) && row.every(isCell));
}
