import { ChoiceField } from '../../../components/fields/choice-field.tsx';
import { readCell } from '../../../components/fields/grid.ts';
import { measureOf, shownUnit, storedText, type Measure } from '../../../components/fields/measure.ts';
import { NumberField } from '../../../components/fields/number-field.tsx';
import { issueSentence } from '../../../lib/issue-text.ts';
import { useUnits } from '../../../lib/units.ts';
import { useTripPart } from '../hooks/trip-part-context.ts';
import { partValue } from '../model/trip-part.ts';

const OF_THE_TRIP = 'trip';

const RULES = [
  { value: OF_THE_TRIP, label: 'By the rule of the trip' },
  { value: 'target', label: 'At a soc' },
  { value: 'reach-next', label: 'Once the next stop is in reach' },
  { value: 'taper', label: 'Once power falls to' },
];

/** What each rule begins with. */
const FIRST: Record<string, object | undefined> = {
  target: { rule: 'target', soc: 0.8 },
  'reach-next': { rule: 'reach-next' },
  taper: { rule: 'taper', powerKw: 50 },
};

type Amount = {
  /** Its name in the file. */
  member: string;
  label: string;
  measure: Measure;
  range: { min: number; max: number };
  what: string;
  allowed: string;
};

/** The number that a rule goes by. */
const AMOUNTS: Record<string, Amount | undefined> = {
  target: {
    member: 'soc',
    label: 'Depart at',
    measure: measureOf('strategy.taper.soc'),
    range: { min: 0, max: 100 },
    what: 'State of charge at which the session ends and the next leg begins.',
    allowed: '0 to 100 %',
  },
  taper: {
    member: 'powerKw',
    label: 'Depart below',
    measure: { unit: 'kW', scale: 'plain', decimals: 0, step: 5 },
    range: { min: 0, max: 10_000 },
    what: 'Station power; once it falls to this, the next leg begins.',
    allowed: 'above 0, up to 10000 kW',
  },
};

/** When a stop ends. */
export function DepartFields({ path }: { path: string }) {
  const { kind, shown, put } = useTripPart();
  const rule = (partValue(kind, shown, `${path}.rule`) as string | undefined) ?? OF_THE_TRIP;
  const amount = AMOUNTS[rule];
  return (
    <>
      <ChoiceField
        label="Depart"
        value={rule}
        options={RULES}
        onChange={(chosen) => put(path, FIRST[chosen], 'depart rule')}
      />
      {amount && <AmountField {...amount} path={`${path}.${amount.member}`} />}
    </>
  );
}

function AmountField({ path, label, measure, range, what, allowed }: Amount & { path: string }) {
  const { kind, shown, issues, put, leaveField } = useTripPart();
  const { temperatureUnit } = useUnits();
  const value = partValue(kind, shown, path);
  const issue = issues.find((one) => one.path === path);
  return (
    <NumberField
      label={label}
      help={{ what, allowed }}
      text={typeof value === 'number' ? storedText(value, measure, temperatureUnit) : String((value as string) ?? '')}
      unit={shownUnit(measure, temperatureUnit)}
      measure={measure}
      range={range}
      error={issue && issueSentence(issue, measure, temperatureUnit)}
      onText={(typed) => put(path, readCell(typed, measure, temperatureUnit) ?? undefined, label, path)}
      onLeave={leaveField}
    />
  );
}
