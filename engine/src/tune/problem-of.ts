import type { SessionStudy } from '../study/schema.ts';
import { lowestStart, type TuneCondition, type TuneRequest } from '../study/tune-request.ts';
import { boundSpecs } from './bound-specs.ts';
import type { TaperSpace, Unit } from './taper-space.ts';
import type { Circumstance, Problem } from './trial.ts';

/** A value so far above the end current that the taper never ends a session by itself. */
const ABOVE_CUTOFF = 1.05;
/** Least value as a share of the greatest. */
const LEAST_SHARE = 1 / 500;

/** The request as the optimiser sees it. */
export function problemOf(request: TuneRequest): Problem {
  const circumstances = request.conditions?.map((one, i) => circumstance(request.study, one, i)) ?? [
    { name: '', weight: 1, study: request.study },
  ];
  return {
    space: spaceOf(request),
    bounds: boundSpecs(
      request.bounds,
      circumstances.map(({ study }) => study),
    ),
    goal: request.goal,
    circumstances,
  };
}

function circumstance(study: SessionStudy, condition: TuneCondition, i: number): Circumstance {
  const { name, weight, station, ambientC, startSoc, startTempC, coolantStartC } = condition;
  const session = { ...study.session };
  if (ambientC !== undefined) session.ambientC = ambientC;
  if (startSoc !== undefined) session.startSoc = startSoc;
  if (startTempC !== undefined) session.startTempC = startTempC;
  if (coolantStartC !== undefined) session.coolantStartC = coolantStartC;
  return {
    name: name ?? `Condition ${i + 1}`,
    weight,
    study: { ...study, session, ...(station ? { station } : {}) },
  };
}

function spaceOf({ study, shape, unit, conditions }: TuneRequest): TaperSpace {
  const most = inUnit(study, unit, study.pack.chargeCurrentMaxA);
  const ending = inUnit(study, unit, ABOVE_CUTOFF * study.strategy.cutoffA);
  return {
    kind: shape.kind,
    unit,
    monotone: shape.monotone,
    lo: lowestStart(study.session.startSoc, conditions),
    hi: study.session.targetSoc,
    width: shape.leastWidthSoc,
    least: Math.min(most, Math.max(LEAST_SHARE * most, ending)),
    most,
  };
}

/** A pack current in the taper's unit; of power what it is at the voltage ceiling, which no run passes. */
function inUnit({ pack, cell, strategy }: SessionStudy, unit: Unit, amps: number): number {
  if (unit === 'A') return amps;
  if (unit === 'C') return amps / (pack.parallel * cell.capacityAh);
  return (amps * pack.series * strategy.cellVoltageCeilingV) / 1000;
}
