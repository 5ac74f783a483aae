import type { SessionStudyInput, StudyIssue } from '@voltiplano/engine';
import { studyIssues } from './checked-study.ts';
import { isWithin, valueAt, withValueAt } from '../../../lib/study-path.ts';
import type { Cell, Grid } from '../../../components/fields/grid.ts';
import { tableAt } from '../../../lib/table-specs.ts';

/** What a person entered that does not stand in the study yet: one field, or a whole table. */
export type Entry = Cell | Grid;

/**
 * The study being worked on.
 *
 * `study` can always be run: it passes the engine's own check. An entry that would break a rule waits in `pending`,
 * by the path of its field or table, as a number in file units, as the text itself where it is no number, as null
 * where the field was emptied, or as a whole grid. Nothing typed is lost, and the curves keep the last good value.
 */
export type Draft = { study: SessionStudyInput; pending: Record<string, Entry> };

/** A draft with one entry made; entries that have become right by it move into the study. */
export function withEntry(draft: Draft, path: string, entry: Entry): Draft {
  const { [path]: _before, ...others } = draft.pending;
  return settled({ study: draft.study, pending: { ...others, [path]: entry } });
}

export type Part = { path: string; value: unknown };

/**
 * A draft with parts of the study replaced together, such as a section added or a shape chosen.
 * Entries waiting at or under a part belong to what was replaced and go with it.
 *
 * @throws {Error} where the parts leave a study that cannot be run; they come from the program, not from a person
 */
export function withParts(draft: Draft, parts: Part[]): Draft {
  const study = parts.reduce((result, { path, value }) => withValueAt(result, path, value), draft.study);
  const issues = studyIssues(study);
  if (issues.length > 0)
    throw new Error(`These parts do not make a study: ${issues.map((one) => one.message).join('; ')}`);
  const kept = Object.entries(draft.pending).filter(([at]) => !parts.some(({ path }) => isWithin(at, path)));
  return settled({ study, pending: Object.fromEntries(kept) });
}

/** What is wrong with the entries that wait, by the engine's own rules. Empty where the draft is the study. */
export function draftIssues(draft: Draft): StudyIssue[] {
  const entries = Object.entries(draft.pending);
  if (entries.length === 0) return [];
  const unreadable = entries.flatMap(([path, entry]) => unreadableIssues(draft, path, entry));
  return [...unreadable, ...studyIssues(applied(draft.study, entries))];
}

/** The entry that waits at a path, or the value in the study. */
export function entryAt(draft: Draft, path: string): unknown {
  return path in draft.pending ? draft.pending[path] : valueAt(draft.study, path);
}

/** Moves every entry into the study that can stand there; together if that is right, else one by one. */
function settled(draft: Draft): Draft {
  const entries = Object.entries(draft.pending).filter(([path, entry]) => isReadable(draft, path, entry));
  const together = applied(draft.study, entries);
  if (studyIssues(together).length === 0) return { study: together, pending: without(draft.pending, entries) };
  let { study } = draft;
  let waiting = entries;
  for (let moved = true; moved;) {
    const good = waiting.find((entry) => studyIssues(applied(study, [entry])).length === 0);
    moved = good !== undefined;
    if (good) {
      study = applied(study, [good]);
      waiting = waiting.filter((entry) => entry !== good);
    }
  }
  const inPlace = entries.filter((entry) => !waiting.includes(entry));
  return { study, pending: without(draft.pending, inPlace) };
}

function without(pending: Record<string, Entry>, gone: [string, Entry][]): Record<string, Entry> {
  const names = new Set(gone.map(([path]) => path));
  return Object.fromEntries(Object.entries(pending).filter(([path]) => !names.has(path)));
}

/** The study with entries made in it, whether that can be run or not; text and unreadable tables are left out. */
export function applied(study: SessionStudyInput, entries: [string, Entry][]): SessionStudyInput {
  return entries.reduce((result, [path, entry]) => {
    if (typeof entry === 'string') return result;
    if (!Array.isArray(entry)) return withValueAt(result, path, entry ?? undefined);
    const table = tableAt(path, result.strategy.taper);
    if (!table || !isReadableGrid(entry)) return result;
    const value = table.toValue(entry);
    const isMap = table.path === 'strategy.taper';
    return withValueAt(result, path, isMap ? { ...result.strategy.taper, ...(value as object) } : value);
  }, study);
}

/** Whether an entry holds numbers only, so that it could stand in the study. */
export function isReadable(draft: Draft, path: string, entry: Entry): boolean {
  if (!Array.isArray(entry)) return typeof entry !== 'string';
  return tableAt(path, draft.study.strategy.taper) !== undefined && isReadableGrid(entry);
}

function isReadableGrid(grid: Grid): boolean {
  return grid.every((row) => row.every((cell) => typeof cell !== 'string'));
}

function unreadableIssues(draft: Draft, path: string, entry: Entry): StudyIssue[] {
  if (typeof entry === 'string') return [notANumber(path, entry)];
  if (!Array.isArray(entry)) return [];
  const table = tableAt(path, draft.study.strategy.taper);
  if (!table) return [];
  return entry.flatMap((row, i) =>
    row.flatMap((cell, j) => (typeof cell === 'string' ? [notANumber(table.cellPath(i, j), cell)] : [])),
  );
}

function notANumber(path: string, text: string): StudyIssue {
  return { path, rule: 'not-a-number', value: text, message: `${path} must be a number, but is “${text}”` };
}
