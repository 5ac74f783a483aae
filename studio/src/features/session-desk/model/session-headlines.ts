import type { SessionResult, SessionStudyInput } from '@voltiplano/engine';
import type { HeadlineNumber } from '../../../components/headline-numbers.tsx';
import { formatSoc } from '../../../lib/format.ts';
import type { Units } from '../../../lib/units.ts';

type Reading = Omit<HeadlineNumber, 'baseline' | 'value'> & { of: (result: SessionResult) => number | null };

/** The ten headline numbers, each beside the baseline's where there is one. */
export function sessionHeadlines(
  result: SessionResult,
  study: SessionStudyInput,
  units: Units,
  baseline: SessionResult | null,
): HeadlineNumber[] {
  return readings(study, units, result).map(({ of, ...reading }) => ({
    ...reading,
    value: of(result),
    // Where neither run came to a number there is nothing to compare.
    ...(baseline && (of(result) !== null || of(baseline) !== null) ? { baseline: of(baseline) } : {}),
  }));
}

function readings(study: SessionStudyInput, units: Units, result: SessionResult): Reading[] {
  const { startSoc } = study.session;
  const startsAt = `starts at ${formatSoc(startSoc)} %`;
  const duration = (caption: string, from: number, of: Reading['of']): Reading => ({
    caption,
    unit: 'min',
    digits: 1,
    kind: 'duration',
    of,
    ...(startSoc > from ? { absent: startsAt } : {}),
  });
  const power = (caption: string, of: Reading['of']): Reading => ({
    caption,
    unit: 'kW',
    digits: 1,
    kind: 'amount',
    of,
  });
  const distance = (caption: string, of: (result: SessionResult) => number): Reading => ({
    caption,
    unit: units.distanceUnit,
    digits: 0,
    kind: 'amount',
    of: (one) => units.distance(of(one)),
  });
  return [
    duration('0–50 %', 0, ({ metrics }) => metrics.minutes0To50),
    duration('10–80 %', 0.1, ({ metrics }) => metrics.minutes10To80),
    duration('0–100 %', 0, ({ metrics }) => metrics.minutes0To100),
    power('Peak at station', ({ metrics }) => metrics.peakStationPowerKw),
    {
      ...power('Mean 10–80 %', ({ metrics }) => metrics.meanStationPower10To80Kw),
      ...(startSoc > 0.1 ? { absent: startsAt } : {}),
    },
    distance('In 10 min', ({ metrics }) => metrics.kmAfterMin['10']),
    distance('In 20 min', ({ metrics }) => metrics.kmAfterMin['20']),
    {
      caption: 'Hottest core',
      unit: units.temperatureUnit,
      digits: 1,
      kind: 'temperature',
      of: ({ metrics }) => units.temperature(metrics.hottestCoreC),
      over: result.metrics.hottestCoreC > study.strategy.hotDerate.toC,
    },
    {
      caption: 'Lowest anode',
      unit: 'mV',
      digits: 0,
      kind: 'margin',
      of: ({ metrics }) => metrics.lowestAnodeMv,
      ...(study.cell.anode ? {} : { absent: 'no anode given' }),
    },
    { caption: 'Stored of station', unit: '%', digits: 1, kind: 'amount', of: storedShare },
  ];
}

function storedShare({ energyLedger }: SessionResult): number | null {
  return energyLedger.stationKwh > 0 ? (energyLedger.storedKwh / energyLedger.stationKwh) * 100 : null;
}
