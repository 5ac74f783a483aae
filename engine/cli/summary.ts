import type { SessionResult, Study, StudyResult, TripResult } from '../src/index.ts';

export const CAUTION =
  'A simulation is not a test. Results are estimates for engineering study; they do not replace the cell maker’s limits,\n' +
  'abuse testing, functional-safety work or the judgement of qualified engineers.';

/** A run on one screen: headline numbers, limits, where the energy went, the caution. */
export function summary(study: Study, result: StudyResult): string {
  const lines = result.kind === 'session' ? session(study, result) : trip(result);
  return `${[result.title || 'Untitled study', ...lines, '', CAUTION].join('\n')}\n`;
}

function session(study: Study, { metrics: m, energyLedger: e, thermalLedger: t }: SessionResult): string[] {
  const start = study.kind === 'session' ? study.session.startSoc : 0;
  const held = Object.entries(m.limitMinutes)
    .filter(([, minutes]) => minutes > 0)
    .sort(([, a], [, b]) => b - a);
  return [
    `${percent(start)} to ${percent(m.endSoc)} in ${fixed(m.endMin)} min, ended by ${m.endReason}`,
    '',
    row('0–50 %', minutes(m.minutes0To50), '10–80 %', minutes(m.minutes10To80)),
    row('0–100 %', minutes(m.minutes0To100), 'Mean 10–80 %', kw(m.meanStationPower10To80Kw)),
    row(
      'Peak at station',
      `${kw(m.peakStationPowerKw)} at ${percent(m.peakStationPowerSoc)}`,
      'Peak at pack',
      kw(m.peakBatteryPowerKw),
    ),
    row('In 10 min', `${fixed(m.kmAfterMin['10'], 0)} km`, 'In 20 min', `${fixed(m.kmAfterMin['20'], 0)} km`),
    row('Hottest core', `${fixed(m.hottestCoreC)} °C at ${fixed(m.hottestCoreMin)} min`, 'Lowest anode', anode(m)),
    '',
    'Held back by',
    ...held.map(([code, held]) => `  ${code.padEnd(18)}${fixed(held).padStart(7)} min`),
    '',
    'Energy, kWh',
    `  grid ${fixed(e.gridKwh, 2)}, station ${fixed(e.stationKwh, 2)}, stored ${fixed(e.storedKwh, 2)} (${fixed((100 * e.storedKwh) / e.stationKwh)} % of the station’s)`,
    `  inlet ${fixed(e.inletKwh, 2)}, boost ${fixed(e.boostLossKwh, 2)}, auxiliaries ${fixed(e.auxiliariesKwh, 2)}, busbar ${fixed(e.busbarKwh, 2)}, ohmic ${fixed(e.ohmicKwh, 2)}, polarisation ${fixed(e.polarisationKwh, 2)}, reversible ${fixed(e.reversibleKwh, 2)}`,
    `  unexplained: energy ${share(e.remainderKwh, e.stationKwh)}, heat ${share(t.remainderKj, Math.abs(t.cellsKj) + t.busbarKj + t.heaterKj)}`,
  ];
}

function trip({ completed, failure, totalMin, legs }: TripResult): string[] {
  return [
    completed ? `Arrived after ${fixed(totalMin)} min` : `Ended after ${fixed(totalMin)} min. ${failure!.message}`,
    '',
    ...legs.flatMap((leg, i) => [
      row(
        `Leg ${i + 1}`,
        `${fixed(leg.km)} km in ${fixed(leg.minutes)} min`,
        'Soc',
        `${percent(leg.startSoc)} to ${percent(leg.endSoc)}`,
      ),
      row('From the pack', `${fixed(-leg.batteryKwh, 2)} kWh`, 'Hottest core', `${fixed(leg.hottestCoreC)} °C`),
      row(
        'At the wheels',
        `${fixed(leg.energyLedger.tractionKwh, 2)} kWh`,
        'Auxiliaries',
        `${fixed(leg.energyLedger.auxiliariesKwh, 2)} kWh`,
      ),
    ]),
  ];
}

const fixed = (value: number, digits = 1) => value.toFixed(digits).replace('-', '−');
const percent = (soc: number) => `${fixed(soc * 100)} %`;
const minutes = (value: number | null) => (value === null ? 'not covered' : `${fixed(value)} min`);
const kw = (value: number | null) => (value === null ? 'not covered' : `${fixed(value)} kW`);
const share = (part: number, whole: number) => `${((100 * Math.abs(part)) / Math.max(whole, 1e-9)).toExponential(1)} %`;

function anode({ lowestAnodeMv, lowestAnodeMin }: SessionResult['metrics']): string {
  if (lowestAnodeMv === null || lowestAnodeMin === null) return 'not known';
  return `${fixed(lowestAnodeMv, 0)} mV at ${fixed(lowestAnodeMin)} min`;
}

function row(a: string, aValue: string, b: string, bValue: string): string {
  return `  ${a.padEnd(18)}${aValue.padEnd(24)}${b.padEnd(16)}${bValue}`;
}
