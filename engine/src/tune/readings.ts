import { limitCodes } from '../session/limits.ts';
import { simulateSession } from '../session/simulate-session.ts';
import type { SessionResult } from '../session/result.ts';
import type { Taper } from '../study/schema.ts';
import { excess, marginOf, type BoundSpec } from './bound-specs.ts';
import { BoundWatch, type Pieces } from './bound-watch.ts';
import { goalOf, withTaper, type Effort, type Problem, type Tick, type Trial } from './trial.ts';
import type { BoundReading, Holding } from './tune-result.ts';

/** Runs of one taper in every circumstance, whole, with what the bounds and the goal read in each. */
export type Readings = { results: SessionResult[]; watches: BoundWatch[]; goals: number[]; goal: number };

/** Runs a taper of any shape in every circumstance, as an ordinary run does. */
export function* readingsOf(
  problem: Problem,
  taper: Taper | null,
  pieces: Pieces,
  effort: Effort,
): Generator<Tick, Readings> {
  const readings: Readings = { results: [], watches: [], goals: [], goal: 0 };
  let weights = 0;
  for (const { study, weight } of problem.circumstances) {
    const watch = new BoundWatch(problem.bounds, pieces, problem.goal);
    const run = simulateSession(taper === null ? study : withTaper(study, taper), { observer: watch });
    effort.runs++;
    effort.evaluations += run.statistics.evaluations;
    yield;
    const goal = goalOf(problem.goal, watch, run.result.metrics.endMin);
    readings.results.push(run.result);
    readings.watches.push(watch);
    readings.goals.push(goal);
    readings.goal += weight * goal;
    weights += weight;
  }
  readings.goal /= weights;
  return readings;
}

/** Where each bound came nearest in some pieces (all by default) of some circumstances (all by default). */
export function closestOf(
  bounds: readonly BoundSpec[],
  watches: readonly BoundWatch[],
  pieces: readonly number[] | null = null,
  only: number | null = null,
): BoundReading[] {
  return bounds.flatMap((bound, b) => {
    let found: BoundReading | null = null;
    watches.forEach((watch, condition) => {
      if (only !== null && condition !== only) return;
      const all = watch.worst.length / bounds.length;
      for (let share = 0; share < all; share++) {
        if (pieces !== null && !pieces.includes(Math.floor(share / watch.shares))) continue;
        const at = b * all + share;
        if (watch.worst[at] === -Infinity) continue;
        const reading = readingOf(bound, watch, at, condition);
        if (found === null || reading.margin < found.margin) found = reading;
      }
    });
    return found === null ? [] : [found];
  });
}

function readingOf(bound: BoundSpec, watch: BoundWatch, at: number, condition: number): BoundReading {
  const { name, limit, unit, digits, sign } = bound;
  const value = sign * watch.worst[at];
  const margin = marginOf(bound, value);
  const atMin = watch.worstS[at] / 60;
  return { bound: name, limit, unit, digits, value, margin, condition, atMin, atSoc: watch.worstSoc[at] };
}

/** The readings that pass their bounds. */
export const passedOf = (bounds: readonly BoundSpec[], watches: readonly BoundWatch[]): BoundReading[] =>
  closestOf(bounds, watches).filter(
    (reading) =>
      excess(
        bounds.find(({ name }) => name === reading.bound)!,
        reading.value,
      ) > 0,
  );

/** The bound that a trial passes by most, in scales; null where it passes none. */
export function worstPassed(bounds: readonly BoundSpec[], { watches }: Trial): BoundReading | null {
  let worst: { over: number; reading: BoundReading } | null = null;
  for (const reading of closestOf(bounds, watches)) {
    const over = excess(
      bounds.find(({ name }) => name === reading.bound)!,
      reading.value,
    );
    if (over > 0 && (worst === null || over > worst.over)) worst = { over, reading };
  }
  return worst?.reading ?? null;
}

/** Minutes under each limit in some pieces, over all circumstances; the longest first. */
export function limitsIn(
  watches: readonly BoundWatch[],
  pieces: readonly number[],
): (Holding & { by: 'limits' })['limits'] {
  return limitCodes
    .map((code, c) => {
      const seconds = watches.map(({ heldS }) =>
        pieces.reduce((sum, p) => sum + (heldS[p * limitCodes.length + c] ?? 0), 0),
      );
      return { code, minutes: seconds.reduce((sum, s) => sum + s, 0) / 60 };
    })
    .filter(({ minutes }) => minutes > 0)
    .sort((a, b) => b.minutes - a.minutes);
}
