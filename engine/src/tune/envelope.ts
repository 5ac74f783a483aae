import { currentForPower } from '../station/link.ts';
import type { SessionSolution } from '../session/happenings.ts';
import { limitCodes } from '../session/limits.ts';
import { LIMIT } from '../session/charge-current.ts';
import type { SessionObserver } from '../session/session-observer.ts';
import { simulateSession } from '../session/simulate-session.ts';
import type { SessionStudy } from '../study/schema.ts';
import type { BoundName } from '../study/tune-bounds.ts';
import { StudyError } from '../study/study-error.ts';
import type { Problem, Tick, Effort } from './trial.ts';

/**
 * What the bounds of a moment would allow over soc, in the taper's unit, as a run sees it that follows them; and what all other
 * limits allow in each circumstance. Bounds with a memory (temperatures) are not in it. It says where to look, not what is allowed.
 */
export type Envelope = {
  soc: number[];
  /** Least of all circumstances; ∞ where no bound of a moment stands. */
  allowed: number[];
  /** Per circumstance, at each soc: what the other limits leave; ∞ before its start. */
  others: { weight: number; value: number[] }[];
  /** Time per soc and value at each soc, up to a factor. */
  timeWeight: number[];
};

const NODES = 120;
const EVERY_S = 5;

/** Limits that stand for a bound when the study is run with it. */
const MOMENT: Partial<Record<BoundName, number[]>> = {
  lowestAnodeMinMv: [LIMIT.anode],
  highestCellMaxV: [LIMIT['cell-voltage']],
};
/** The taper is what is sought, and the ramp is over before it matters. */
const NOT_ASKED = [LIMIT.taper, LIMIT['station-ramp']];

type Sample = { soc: number; bounds: number; others: number; volts: number };

/** Follows the bounds of a moment once in every circumstance. */
export function* envelopeOf(problem: Problem, effort: Effort): Generator<Tick, Envelope> {
  const { lo, hi, unit } = problem.space;
  const soc = Array.from({ length: NODES + 1 }, (_, i) => lo + ((hi - lo) * i) / NODES);
  const allowed = new Array<number>(soc.length).fill(Infinity);
  const timeWeight = new Array<number>(soc.length).fill(1);
  const others: Envelope['others'] = [];
  for (const { study, weight } of problem.circumstances) {
    const samples = follow(problem, study, effort);
    yield;
    const at = (read: (sample: Sample) => number) => soc.map((s) => interpolated(samples, s, read));
    at((sample) => sample.bounds).forEach((value, i) => (allowed[i] = Math.min(allowed[i], value)));
    others.push({
      weight,
      value: at((sample) => sample.others).map((v, i) => (soc[i] < study.session.startSoc ? Infinity : v)),
    });
    if (unit === 'kW') at((sample) => sample.volts).forEach((volts, i) => (timeWeight[i] = volts));
  }
  return { soc, allowed, others, timeWeight };
}

/** The study with the bounds of a moment as its own limits, and no taper. */
function boundsAsLimits({ bounds }: Problem, study: SessionStudy): SessionStudy {
  const strategy = { ...study.strategy, taper: { shape: 'none' as const }, cutoffA: 0 };
  for (const { name, limit } of bounds) {
    if (name === 'lowestAnodeMinMv') strategy.anodeMarginMv = Math.max(limit, strategy.anodeMarginMv ?? limit);
    if (name === 'highestCellMaxV') strategy.cellVoltageCeilingV = Math.min(limit, strategy.cellVoltageCeilingV);
  }
  return { ...study, strategy };
}

function follow(problem: Problem, study: SessionStudy, effort: Effort): Sample[] {
  const samples: Sample[] = [];
  const { unit } = problem.space;
  const ofBounds = problem.bounds.flatMap(({ name, guarded }) => (guarded ? [] : (MOMENT[name] ?? [])));
  const ofOthers = limitCodes.map((_, i) => i).filter((i) => !ofBounds.includes(i) && !NOT_ASKED.includes(i));
  const powerW = 1000 * Math.min(...problem.bounds.map((b) => (b.name === 'stationPowerMaxKw' ? b.limit : Infinity)));
  const amps = Math.min(...problem.bounds.map((b) => (b.name === 'stationCurrentMaxA' ? b.limit : Infinity)));
  let solution: SessionSolution | null = null;
  const observer: SessionObserver = {
    begin: (begun) => void (solution = begun),
    sample: (t) => {
      const { charge, pack } = solution!.system;
      const inUnit = (I: number) =>
        unit === 'A' ? I : unit === 'C' ? I / pack.capacityAh : ((pack.restV + pack.ohm * I) * I) / 1000;
      const volts = pack.restV + pack.ohm * charge.current;
      const station = Math.min(amps, powerW === Infinity ? Infinity : currentForPower(pack.restV, pack.ohm, powerW));
      const bounds = ofBounds.reduce((least, i) => Math.min(least, charge.allowedBy(i, t)), station);
      const others = ofOthers.reduce((least, i) => Math.min(least, charge.allowedBy(i, t)), Infinity);
      const last = samples[samples.length - 1];
      if (last !== undefined && pack.soc <= last.soc) samples.pop();
      samples.push({ soc: pack.soc, bounds: inUnit(bounds), others: inUnit(others), volts });
    },
  };
  try {
    effort.evaluations += simulateSession(boundsAsLimits(problem, study), {
      everyS: EVERY_S,
      observer,
    }).statistics.evaluations;
  } catch (error) {
    if (!(error instanceof StudyError)) throw error;
  }
  effort.runs++;
  return samples;
}

/** A quantity of the samples at a soc; beyond their ends the end's. */
function interpolated(samples: readonly Sample[], soc: number, read: (sample: Sample) => number): number {
  if (samples.length === 0) return Infinity;
  const after = samples.findIndex((sample) => sample.soc >= soc);
  if (after < 0) return read(samples[samples.length - 1]);
  if (after === 0) return read(samples[0]);
  const [a, b] = [samples[after - 1], samples[after]];
  const share = (soc - a.soc) / (b.soc - a.soc);
  const [low, high] = [read(a), read(b)];
  return low === high ? low : low + share * (high - low);
}
