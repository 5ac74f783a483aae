/**
 * Makes the invented logs beside it: sessions of the engine as a vehicle's logger or a station's display would have
 * kept them, with noise, steps, gaps and each maker's idea of a table. The same files each time.
 *
 *   node --import tsx examples/logs/make-logs.ts
 */
import { readFileSync, writeFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { runStudy, parseStudyText, type SessionStudy } from '@voltiplano/engine';
import { seededNoise } from './seeded-noise.ts';

/** One moment of a session. */
type Row = {
  tS: number;
  soc: number;
  packV: number;
  packA: number;
  stationV: number;
  stationA: number;
  stationKw: number;
  cellV: number;
  hotC: number;
  coldC: number;
  inletC: number;
};

/** What the vehicle of a log has otherwise than its study, for a fit to find. */
const TRUE_RESISTANCE = 1.07;
const TRUE_PLATE = 0.94;

/** Name and text of every log. */
export function makeLogs(): Record<string, string> {
  return {
    'vicuna-tola-logger.csv': vicunaTola(),
    'vicuna-quilla-display.csv': vicunaQuilla(),
    'suri-cima-logger.csv': suriCima(),
    'vicuna-quirque-cold.csv': vicunaQuirque(),
  };
}

/** A logger on the vehicle's bus, every 2 s: comma and point, percent, whole degrees; 46 s are lost. */
function vicunaTola(): string {
  const noise = seededNoise(11);
  const rows = sessionRows('vicuna-warm-arrival', 2).filter(({ tS }) => tS < 1312 || tS > 1358);
  const head = 'time_s,soc_pct,pack_V,pack_A,cell_max_mV,temp_max_C,temp_min_C,inlet_C';
  const lines = rows.map((row) =>
    [
      row.tS.toFixed(0),
      step(100 * row.soc, 0.5).toFixed(1),
      (row.packV + noise(0.15)).toFixed(1),
      (row.packA + noise(0.6)).toFixed(1),
      step(1000 * row.cellV + noise(1.5), 1).toFixed(0),
      ...sensors(row, () => noise(0.2)).map((celsius) => step(celsius, 1).toFixed(0)),
      step(row.inletC + noise(0.3), 1).toFixed(0),
    ].join(','),
  );
  return ['# Invented log: no vehicle and no station made these numbers', head, ...lines, ''].join('\n');
}

/**
 * The station's display, filmed and read every 10 s: semicolon and decimal comma, time of day, whole kW, V, A and
 * percent; the screen is dark for two minutes and a half.
 */
function vicunaQuilla(): string {
  const noise = seededNoise(12);
  const rows = sessionRows('vicuna-shared-station', 10);
  const head = 'Time of day;Charge (%);Power (kW);Voltage (V);Current (A);Energy (kWh)';
  let energyKwh = 0;
  const lines = rows.map((row) => {
    energyKwh += (row.stationKw * 10) / 3600;
    const shown = [
      (100 * row.soc).toFixed(0),
      given(row.stationKw + noise(0.3)).toFixed(0),
      (row.stationV + noise(0.3)).toFixed(0),
      given(row.stationA + noise(0.5)).toFixed(0),
      given(energyKwh).toFixed(1).replace('.', ','),
    ];
    const isDark = row.tS >= 1490 && row.tS < 1640;
    return [timeOfDay(12 * 3600 + 7 * 60 + 20 + row.tS), ...(isDark ? shown.map(() => '') : shown)].join(';');
  });
  return [head, ...lines, ''].join('\r\n');
}

/**
 * A data logger of a test vehicle, every second: tabs, time stamps, a row of units, W and mV and a share of charge.
 * Its clock stands still now and then, so stamps come twice.
 */
function suriCima(): string {
  const noise = seededNoise(13);
  const begun = Date.parse('2026-05-18T16:42:07.000Z');
  const head = ['timestamp', 'SOC', 'P_dc', 'U_dc', 'I_dc', 'Ucell_max', 'T_cell_max', 'T_cell_min'].join('\t');
  const units = ['UTC', '1', 'W', 'V', 'A', 'mV', '°C', '°C'].join('\t');
  const lines = sessionRows('suri-full-power', 1).map((row, i) => {
    const stamp = new Date(begun + 1000 * (row.tS - (i % 397 === 396 ? 1 : 0))).toISOString();
    const [volts, amperes] = [row.packV + noise(0.2), row.packA + noise(0.4)];
    return [
      stamp,
      step(row.soc, 0.0025).toFixed(4),
      (volts * amperes).toFixed(0),
      volts.toFixed(1),
      amperes.toFixed(1),
      (1000 * row.cellV + noise(1)).toFixed(0),
      ...sensors(row, () => noise(0.1)).map((celsius) => celsius.toFixed(1)),
    ].join('\t');
  });
  return ['# Invented log: no vehicle and no station made these numbers', head, units, ...lines, ''].join('\n');
}

/** Typed from a notebook app, every 5 s: vertical bars, minutes, decimal comma, °F; eleven rows are missing. */
function vicunaQuirque(): string {
  const noise = seededNoise(14);
  const rows = sessionRows('vicuna-cold-morning', 5).filter((_row, i) => i < 183 || i >= 194);
  const head = ['Minute', 'SoC %', 'kW at the post', 'Pack V', 'Warmest sensor °F', 'Coldest sensor °F'].join('|');
  const lines = rows.map((row) =>
    [
      (row.tS / 60).toFixed(3),
      step(100 * row.soc, 1).toFixed(0),
      given(row.stationKw + noise(0.2)).toFixed(1),
      (row.packV + noise(0.3)).toFixed(1),
      ...sensors(row, () => noise(0.2)).map((celsius) => fahrenheit(step(celsius, 0.5)).toFixed(1)),
    ]
      .join('|')
      .replaceAll('.', ','),
  );
  return ['Invented log. Frost morning, one post in the yard', '', head, ...lines, ''].join('\n');
}

/** A session of an example on a grid of whole steps [s], with the vehicle as it truly is. */
function sessionRows(example: string, everyS: number): Row[] {
  const study = parseStudyText(readFileSync(new URL(`../${example}.json`, import.meta.url), 'utf8'));
  if (study.kind !== 'session') throw new Error(`${example} is no session.`);
  const result = runStudy(trueVehicle(study), { everyS });
  if (result.kind !== 'session') throw new Error(`${example} did not run as a session.`);
  const { series } = result;
  const at = (column: readonly number[], row: number) => column[row] ?? Number.NaN;
  const rows = series.tS.map((tS, i): Row => ({
    tS,
    soc: at(series.soc, i),
    packV: at(series.packVoltageV, i),
    packA: at(series.packCurrentA, i),
    stationV: at(series.stationVoltageV, i),
    stationA: at(series.stationCurrentA, i),
    stationKw: at(series.stationPowerKw, i),
    cellV: at(series.highestCellV, i),
    hotC: at(series.hottestSurfaceC, i),
    coldC: at(series.coldestSurfaceC, i),
    inletC: at(series.inletC, i),
  }));
  // A jump stands twice in the series, and may fall on the grid.
  return rows.filter(({ tS }, i) => Number.isInteger(tS / everyS) && rows[i + 1]?.tS !== tS);
}

function trueVehicle(study: SessionStudy): SessionStudy {
  const { cell, thermal } = study;
  return {
    ...study,
    cell: { ...cell, r0Milliohm: cell.r0Milliohm * TRUE_RESISTANCE },
    thermal: { ...thermal, plateWPerK: thermal.plateWPerK * TRUE_PLATE },
  };
}

/** Warmest and coldest of the pack's sensors, each with its own noise. */
function sensors({ hotC, coldC }: Row, noise: () => number): number[] {
  const [one, other] = [hotC + noise(), coldC + noise()];
  return [Math.max(one, other), Math.min(one, other)];
}

/** A station shows nothing below 0. */
function given(value: number): number {
  return Math.max(0, value);
}

/** What a display of such steps shows. */
function step(value: number, size: number): number {
  return Math.round(value / size) * size;
}

function fahrenheit(celsius: number): number {
  return celsius * 1.8 + 32;
}

function timeOfDay(seconds: number): string {
  const parts = [seconds / 3600, (seconds / 60) % 60, seconds % 60];
  return parts.map((part) => String(Math.floor(part)).padStart(2, '0')).join(':');
}

if (process.argv[1] === fileURLToPath(import.meta.url)) {
  for (const [name, text] of Object.entries(makeLogs())) writeFileSync(new URL(name, import.meta.url), text);
}
