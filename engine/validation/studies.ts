import { readdirSync, readFileSync } from 'node:fs';
import {
  parseSessionStudy,
  simulateSession,
  type SessionOptions,
  type SessionRun,
  type SessionStudy,
  type SessionStudyInput,
} from '../src/index.ts';
import type { SessionSeries } from '../src/session/result.ts';

const MOST_A = 20_000;

/**
 * A study in which nothing happens by itself: 100 cells at a constant 3.5 V and 25 °C, 0.6 mΩ each, one node, no heat
 * lost, no cooling, no auxiliaries, and no limit that binds before a current of 20 kA. Each check switches on what it
 * looks at. The station's ramp is over within 4 ms at 400 A, which moves no number here by more than 1e-5 of itself.
 */
export function bareStudy(change: (study: SessionStudyInput) => void = () => {}): SessionStudy {
  const study: SessionStudyInput = {
    format: 'voltiplano/study',
    version: 1,
    kind: 'session',
    cell: {
      name: 'flat',
      capacityAh: 5000,
      massKg: 5,
      specificHeatJPerKgK: 1000,
      // A table must rise: by 1 pV, below every tolerance here.
      ocv: { x: [0, 1], y: [3.5, 3.5 + 1e-12] },
      r0Milliohm: 0.6,
      activationKjPerMol: 0,
      vMaxV: 10,
      vMinV: 0,
    },
    pack: { name: 'bare', series: 100, parallel: 1, chargeCurrentMaxA: MOST_A },
    thermal: { plateWPerK: 0, ambientWPerK: 0, coolant: { flowLPerMin: 0, volumeL: 5 } },
    inlet: {},
    station: {
      name: 'bare',
      powerMaxKw: 10_000,
      currentMaxA: MOST_A,
      voltageMinV: 0,
      voltageMaxV: 5000,
      rampAPerS: 100_000,
    },
    strategy: {
      name: 'bare',
      taper: { shape: 'none' },
      cellVoltageCeilingV: 10,
      hotDerate: { fromC: 149, toC: 150 },
    },
    session: { ambientC: 25, startSoc: 0, startTempC: 25, hotelW: 0, maxMin: 30 },
  };
  change(study);
  return parseSessionStudy(study);
}

/** A taper that is one value everywhere. */
export const constant = (value: number, unit: 'A' | 'C' | 'kW' = 'A') => ({
  shape: 'ledges' as const,
  unit,
  steps: [{ fromSoc: 0, value }],
});

/** A hot limit that lets no current through at all, which does not end a session: heat flows alone. */
export const NO_CURRENT = { fromC: -40, toC: -39 };

/**
 * Coolant that enters at `inletC` whatever comes back: a chiller of 200 kW, always on, that stops at that temperature.
 * `conductance` is what the plate passes, W·(1 − exp(−UA/W)), with the flow's W = 1000 W/K.
 */
export function steadyCoolant(study: SessionStudyInput, inletC: number, conductance: number): void {
  study.thermal.coolant = { flowLPerMin: 15, densityKgPerM3: 1000, specificHeatJPerKgK: 4000, volumeL: 5 };
  study.thermal.plateWPerK = -1000 * Math.log1p(-conductance / 1000);
  study.thermal.chiller = { ratedW: 200_000, onC: -40, fullC: -39, minCoolantC: inletC };
  study.session.coolantStartC = inletC;
}

export function run(study: SessionStudy, options: SessionOptions = {}): SessionRun {
  return simulateSession(study, options);
}

/** Index of the last row at a moment [s]; the moment must stand on the output grid or be the end. */
export function rowAt(series: SessionSeries, tS: number): number {
  const row = series.tS.findLastIndex((t) => Math.abs(t - tS) < 1e-6);
  if (row < 0) throw new Error(`no row at ${tS} s`);
  return row;
}

/** Integral over a series by the trapezoid rule [unit·s]: jumps stand on double rows, so no piece runs across one. */
export function integral(tS: readonly number[], y: readonly number[]): number {
  let sum = 0;
  for (let i = 1; i < tS.length; i++) sum += 0.5 * (tS[i] - tS[i - 1]) * (y[i] + y[i - 1]);
  return sum;
}

const folder = (path: string) => new URL(path, import.meta.url);

/** A JSON file beside the checks. */
export function readJson(path: string): unknown {
  return JSON.parse(readFileSync(folder(path), 'utf8'));
}

export type NamedStudy = { name: string; study: SessionStudy };

const sessionsIn = (path: string): NamedStudy[] =>
  readdirSync(folder(path))
    .filter((file) => file.endsWith('.json') && !file.endsWith('.expected.json'))
    .map((file) => ({ name: file.replace('.json', ''), json: readJson(path + file) }))
    .filter(({ json }) => (json as { kind?: string }).kind === 'session')
    .map(({ name, json }) => ({ name, study: parseSessionStudy(json) }));

/** The studies whose results the second implementation computed. */
export const referenceStudies = () => sessionsIn('./reference/');
/** The sessions among the examples. */
export const exampleStudies = () => sessionsIn('../../examples/');
/** The large 400-V-class pack of `common-practice.test.ts`. */
export const largePack = (): SessionStudy => parseSessionStudy(readJson('./large-400-v-pack.json'));
