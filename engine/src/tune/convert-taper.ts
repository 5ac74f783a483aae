import type { SessionSolution } from '../session/happenings.ts';
import type { SessionObserver } from '../session/session-observer.ts';
import { simulateSession } from '../session/simulate-session.ts';
import type { SessionStudy, Taper } from '../study/schema.ts';
import { studyError } from '../study/study-error.ts';
import type { Unit } from './taper-space.ts';
import { withTaper } from './trial.ts';

export type ConvertedTaper = {
  taper: Taper;
  /** The session's minutes before and after; of exact conversions they differ by rounding alone. */
  minutes: number;
  convertedMinutes: number;
  /** A and C differ by a factor; kW needs the voltage of a run, and within a step or piece the current then follows it. */
  exact: boolean;
};

/** The converted run's minutes come this near to the former's [share]. */
const CONVERTED_WITHIN = 1e-3;
/** Corrections go on until they come this near [share]. */
const ENOUGH = 2e-5;
const ROUNDS = 8;

/**
 * The study's taper in another unit, in the same shape, with the same edges, points or rows. Between A and C the values are
 * scaled. To or from kW the voltage of the study's own run is used, and the values are then corrected, part by part, until the run
 * takes as long as before.
 *
 * @throws {StudyError} `UNSUPPORTED` where there is no taper to convert, or no correction reproduces the run's minutes
 */
export function convertTaper(study: SessionStudy, unit: Unit): ConvertedTaper {
  const { taper } = study.strategy;
  if (taper.shape === 'none')
    throw studyError(
      'UNSUPPORTED',
      'strategy.taper.shape',
      'no-taper',
      'There is no taper to convert: its shape is "none".',
    );
  const capacityAh = study.pack.parallel * study.cell.capacityAh;
  const before = pathOf(study, taper);
  if ((taper.unit === 'kW') === (unit === 'kW')) {
    const factor = taper.unit === unit ? 1 : unit === 'C' ? 1 / capacityAh : capacityAh;
    const scaled = { ...mapped(taper, (value) => value * factor), unit } as Taper;
    return { taper: scaled, minutes: before.minutes, convertedMinutes: pathOf(study, scaled).minutes, exact: true };
  }
  const ampsPer = taper.unit === 'C' || unit === 'C' ? capacityAh : 1;
  const first = { ...mapped(taper, (v, i, soc) => atVoltage(before, v, i, soc, unit, ampsPer)), unit } as Taper;
  return corrected(study, before, first);
}

type Part = { minutes: number; restV: number; ohm: number; weight: number };
/** What a run says of a taper: its length, the time in each part, and voltages by part and by soc. */
type Path = { minutes: number; parts: Map<number, Part>; bySoc: { soc: number; restV: number; ohm: number }[] };

/** Corrects values by the time their part takes, until every part and so the whole takes as long as it did. */
function corrected(study: SessionStudy, before: Path, first: Taper): ConvertedTaper {
  let taper = first;
  let after = pathOf(study, taper);
  let best = { taper, off: Math.abs(after.minutes / before.minutes - 1), minutes: after.minutes };
  for (let round = 0; round < ROUNDS && best.off > ENOUGH; round++) {
    const ratio = (i: number) => {
      const [was, is] = [before.parts.get(i)?.minutes ?? 0, after.parts.get(i)?.minutes ?? 0];
      return was > 0 && is > 0 ? Math.min(1.2, Math.max(0.8, is / was)) : 1;
    };
    const whole = after.minutes / before.minutes;
    const inPieces = taper.shape === 'ledges' || taper.shape === 'voltage-ledges';
    taper = mapped(taper, (value, i) => value * (inPieces ? ratio(i) : whole));
    after = pathOf(study, taper);
    const off = Math.abs(after.minutes / before.minutes - 1);
    if (off < best.off) best = { taper, off, minutes: after.minutes };
  }
  if (best.off <= CONVERTED_WITHIN)
    return { taper: best.taper, minutes: before.minutes, convertedMinutes: best.minutes, exact: false };
  const message =
    `No taper of this shape reproduces the run in another unit: the nearest takes ${best.minutes.toFixed(2)} min, ` +
    `the present one ${before.minutes.toFixed(2)} min.`;
  throw studyError('UNSUPPORTED', 'strategy.taper', 'not-convertible', message);
}

/** A value in the other unit at the voltage it would have had. */
function atVoltage(path: Path, value: number, i: number, soc: number | null, to: Unit, ampsPer: number): number {
  const { restV, ohm } = soc === null ? voltageOfPart(path, i) : voltageAtSoc(path, soc);
  if (to === 'kW') return ((restV + ohm * value * ampsPer) * value * ampsPer) / 1000;
  return (2 * value * 1000) / (restV + Math.sqrt(restV * restV + 4 * ohm * value * 1000)) / ampsPer;
}

/** Mean over the part's time; of a part the run never visits, that of the nearest it does. */
function voltageOfPart({ parts }: Path, i: number): { restV: number; ohm: number } {
  const nearest = [...parts.keys()].sort((a, b) => Math.abs(a - i) - Math.abs(b - i) || a - b)[0];
  const { restV, ohm, weight } = parts.get(nearest)!;
  return { restV: restV / weight, ohm: ohm / weight };
}

function voltageAtSoc({ bySoc }: Path, soc: number): { restV: number; ohm: number } {
  const after = bySoc.findIndex((row) => row.soc >= soc);
  return bySoc[after < 0 ? bySoc.length - 1 : after];
}

/** The taper with each of its values put through a function of value, part, and soc (null where the part has no single one). */
function mapped(taper: Taper, change: (value: number, part: number, soc: number | null) => number): Taper {
  switch (taper.shape) {
    case 'none':
      return taper;
    case 'slope':
      return { ...taper, points: taper.points.map((p, i) => ({ ...p, value: change(p.value, i, p.soc) })) };
    case 'ledges':
      return { ...taper, steps: taper.steps.map((s, i) => ({ ...s, value: change(s.value, i, null) })) };
    case 'voltage-ledges':
      return { ...taper, steps: taper.steps.map((s, i) => ({ ...s, value: change(s.value, i, null) })) };
    case 'map':
      return { ...taper, values: taper.values.map((row, i) => row.map((v) => change(v, i, taper.soc[i]))) };
  }
}

function pathOf(study: SessionStudy, taper: Taper): Path {
  const path: Path = { minutes: 0, parts: new Map(), bySoc: [] };
  let solution: SessionSolution | null = null;
  let lastS = 0;
  const observer: SessionObserver = {
    begin: (begun) => void (solution = begun),
    sample: (t) => {
      const { pack, taper: table } = solution!.system;
      const { restV, ohm, soc } = pack;
      const part = path.parts.get(table.step) ?? { minutes: 0, restV: 0, ohm: 0, weight: 0 };
      // A part that has only just begun weighs next to nothing, but not nothing.
      const weight = t - lastS + 1e-6;
      part.minutes += (t - lastS) / 60;
      part.restV += weight * restV;
      part.ohm += weight * ohm;
      part.weight += weight;
      path.parts.set(table.step, part);
      path.bySoc.push({ soc, restV, ohm });
      lastS = t;
    },
  };
  path.minutes = simulateSession(withTaper(study, taper), { observer }).result.metrics.endMin;
  return path;
}
