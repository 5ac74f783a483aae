import { quantities, type Quantity, type StudyIssue } from '@voltiplano/engine';
import { readCell } from '../../../components/fields/grid.ts';
import { helpOf, shownBounds } from '../../../components/fields/quantity-help.ts';
import { measureOf, quantityPathOf, shownUnit, storedText, type Measure } from '../../../components/fields/measure.ts';
import { useUnits, type TemperatureUnit } from '../../../lib/units.ts';
import { isMoved } from '../model/changes.ts';
import { filledOf, issuesOf } from '../model/derived.ts';
import { entryAt } from '../model/draft.ts';
import { issueSentence, labelOfPath } from '../../../lib/issue-text.ts';
import { valueAt } from '../../../lib/study-path.ts';
import { useDesk, useDispatch } from './use-desk.ts';

/** Everything the field of one quantity shows, and what it does with what is typed. */
export function useQuantityField(path: string, label?: string, emptyAs = path) {
  const dispatch = useDispatch();
  const { temperatureUnit } = useUnits();
  const entry = useDesk((state) => entryAt(state.sheet.draft, path));
  const waits = useDesk((state) => path in state.sheet.draft.pending);
  const issue = useDesk((state) => issuesOf(state.sheet.draft).find((one) => one.path === path));
  const elsewhere = useDesk((state) => (waits ? issuesOf(state.sheet.draft)[0] : undefined));
  const filled = useDesk(({ sheet: { draft } }) => {
    const study = filledOf(draft.study);
    return valueAt(study, path) ?? valueAt(study, emptyAs);
  }) as number | undefined;
  const before = useDesk((state) => (state.sheet.baseline ? valueAt(state.sheet.baseline, path) : undefined));
  const moved = useDesk((state) => isMoved(entryAt(state.sheet.draft, path), state.sheet.baseline, path));

  const quantityPath = quantityPathOf(path)!;
  const quantity: Quantity = quantities[quantityPath];
  const measure = measureOf(quantityPath);
  const text = (stored: unknown) =>
    typeof stored === 'number'
      ? storedText(stored, measure, temperatureUnit)
      : typeof stored === 'string'
        ? stored
        : '';
  const name = label ?? quantity.label;
  const bounds = shownBounds(quantity, measure, temperatureUnit);
  return {
    label: name,
    unit: shownUnit(measure, temperatureUnit),
    measure,
    ...bounds,
    help: helpOf(quantity, measure, temperatureUnit),
    text: text(entry),
    placeholder: entry === undefined || entry === null ? text(filled) || undefined : undefined,
    was: moved ? text(before) || 'empty' : undefined,
    error: errorText(issue, elsewhere, measure, temperatureUnit, waits ? text(filled) : undefined),
    onText: (typed: string) =>
      dispatch({ type: 'entry', path, entry: readCell(typed, measure, temperatureUnit), label: name }),
    onLeave: () => dispatch({ type: 'leave-field' }),
  };
}

function errorText(
  issue: StudyIssue | undefined,
  elsewhere: StudyIssue | undefined,
  measure: Measure,
  temperature: TemperatureUnit,
  stillUsed: string | undefined,
): string | undefined {
  const why = issue
    ? issueSentence(issue, measure, temperature)
    : elsewhere && `Waits until “${labelOfPath(elsewhere.path)}” is right.`;
  if (!why) return undefined;
  return stillUsed === undefined ? why : `${why} The curves still use ${stillUsed || 'none'}.`;
}
