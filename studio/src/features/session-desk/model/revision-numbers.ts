import type { StudyRevisionRow } from '../../../../../server/src/contract/study.ts';
import { differenceInWords, type DifferenceKind } from '../../../components/headline-difference.ts';
import { formatNumber } from '../../../lib/format.ts';
import type { Units } from '../../../lib/units.ts';

type Numbers = NonNullable<StudyRevisionRow['numbers']>;

/** One headline number of a revision, with how it moved since the one before. */
export type RevisionNumber = { caption: string; value: string; unit: string; difference: string | null };

type Reading = {
  caption: string;
  unit: string;
  digits: number;
  kind: DifferenceKind;
  of: (numbers: Numbers) => number | null;
};

/**
 * The numbers a list of revisions has room for; what a revision did not come to is left out.
 *
 * @param end  what the whole time is called
 */
export function revisionNumbers(
  numbers: Numbers | null,
  before: Numbers | null | undefined,
  units: Units,
  end = 'end',
): RevisionNumber[] {
  if (!numbers) return [];
  return readings(units, end).flatMap(({ caption, unit, digits, kind, of }) => {
    const value = of(numbers);
    if (value === null) return [];
    const difference = differenceInWords(value, before ? of(before) : null, digits, kind);
    return [{ caption, unit, value: formatNumber(value, digits), difference }];
  });
}

function readings(units: Units, end: string): Reading[] {
  const duration = (caption: string, of: Reading['of']): Reading => ({
    caption,
    unit: 'min',
    digits: 1,
    kind: 'duration',
    of,
  });
  return [
    duration('10–80 %', (numbers) => numbers.minutes10To80),
    duration(end, (numbers) => numbers.endMin),
    { caption: 'peak', unit: 'kW', digits: 1, kind: 'amount', of: (numbers) => numbers.peakStationPowerKw },
    {
      caption: 'hottest core',
      unit: units.temperatureUnit,
      digits: 1,
      kind: 'temperature',
      of: ({ hottestCoreC }) => (hottestCoreC === null ? null : units.temperature(hottestCoreC)),
    },
    { caption: 'lowest anode', unit: 'mV', digits: 0, kind: 'margin', of: (numbers) => numbers.lowestAnodeMv },
  ];
}
