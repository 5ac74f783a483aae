import { labelOfPath } from '../../../lib/issue-text.ts';
import { studyDifferences, type Difference } from '../../../lib/study-differences.ts';
import { fieldUnit, fieldText, sectionOfPath } from '../../../lib/study-words.ts';
import type { TemperatureUnit } from '../../../lib/units.ts';
import type { Entry } from './draft.ts';
import type { Content } from './working-content.ts';

/** What differs between two contents: inputs, then entries that wait because they break a rule. */
export function contentDifferences(mine: Content, theirs: Content, temperature: TemperatureUnit): Difference[] {
  const waiting = new Set([...Object.keys(mine.draft.pending), ...Object.keys(theirs.draft.pending)]);
  return [
    ...studyDifferences(mine.draft.study, theirs.draft.study, temperature),
    ...[...waiting].flatMap((path) => pendingDifference(path, mine, theirs, temperature)),
  ];
}

function pendingDifference(path: string, mine: Content, theirs: Content, temperature: TemperatureUnit): Difference[] {
  const [one, other] = [mine.draft.pending[path], theirs.draft.pending[path]];
  if (JSON.stringify(one) === JSON.stringify(other)) return [];
  const text = (entry: Entry | undefined) => entryText(path, entry, temperature);
  return [
    {
      kind: 'value',
      path: `${path} waiting`,
      section: sectionOfPath(path),
      label: `${labelOfPath(path)}, to be mended`,
      unit: typeof (one ?? other) === 'number' ? fieldUnit(path, temperature) : '',
      before: text(one),
      after: text(other),
    },
  ];
}

function entryText(path: string, entry: Entry | undefined, temperature: TemperatureUnit): string | null {
  if (entry === undefined) return null;
  if (entry === null) return 'empty';
  return Array.isArray(entry) ? `a table of ${entry.length} rows` : fieldText(path, entry, temperature);
}
