import { findRoot } from '../integrate/find-root.ts';
import { LIMIT } from './charge-current.ts';
import { limitCodes } from './limits.ts';
import type { Solution } from '../integrate/solution.ts';
import type { SessionSystem } from './session-system.ts';

export type SessionSolution = Solution<SessionSystem>;

/** Something that happens inside a step; `code` is the limit that binds after it. */
export type Happening = { t: number; kind: 'voltage-ledge' | 'cutoff' | 'hand-over'; code: number };

/** How exactly moments are found [s]. */
export const MOMENT_S = 1e-7;
/** A voltage-ledge counts as reached this near [V] (engine/MODEL.md, section 6). */
export const REACHED_V = 1e-9;

/** Two limits that stand this near each other differ by rounding [share of the current]. */
const ROUNDING = 1e-11;
/** Stands for a difference of 0 A with a sign: below any real one, and far enough from 0 to be halved often. */
const TIE_A = 1e-100;

/** Limits under which the end current ends a session. */
const ENDING = new Set([LIMIT['cell-voltage'], LIMIT.taper, LIMIT.anode]);

export const endsAtCutoff = (code: number): boolean => ENDING.has(code);

/**
 * The first thing that happens after `from` and up to `to`, if anything does.
 *
 * @param held     limit in force at `from` (index in `limitCodes`)
 * @param cutoffA  the strategy's end current [A]
 */
export function firstHappening(
  solution: SessionSolution,
  held: number,
  cutoffA: number,
  from: number,
  to: number,
): Happening | null {
  solution.look(to);
  const { system } = solution;
  const code = bindingNow(solution, held);
  const climbs = overLedge(system) >= 0;
  const spent = endsAtCutoff(held) && allowedBy(solution, held) <= cutoffA;
  // Nearly every look ends here, before any closure is made.
  if (!climbs && !spent && code === held) return null;
  const found: Happening[] = [];
  const when = (value: () => number) => crossing(solution, value, from, to);
  if (climbs) found.push({ kind: 'voltage-ledge', code, t: when(() => overLedge(system)) });
  if (spent) found.push({ kind: 'cutoff', code, t: when(() => cutoffA - allowedBy(solution, held)) });
  if (code !== held) found.push(handOver(solution, held, code, from, to));
  return found.reduce((first, one) => (one.t < first.t ? one : first));
}

/** The limit that binds at the moment looked at; the one in force stays while another allows the same. */
function bindingNow(solution: SessionSolution, held: number): number {
  const { code, current } = solution.system.charge;
  if (code === held) return held;
  const more = allowedBy(solution, held) - allowedBy(solution, code);
  const takesOver = more > ROUNDING * (1 + Math.abs(current)) || (more === 0 && code < held);
  return takesOver ? code : held;
}

/** How far the highest cell voltage stands above the next voltage-ledge [V]; −∞ where there is none. */
function overLedge({ pack, charge, taper }: SessionSystem): number {
  return taper.endV < Infinity ? pack.highestCellV(charge.current) - (taper.endV - REACHED_V) : -Infinity;
}

/** Current that one limit allows at the moment last looked at [A]. */
export function allowedBy({ system, at }: SessionSolution, code: number): number {
  return system.charge.allowedBy(code, at);
}

/** First moment at which `value`, read after a look, is no longer below 0; `to` if it is not so before. */
export function crossing(solution: { look(t: number): void }, value: () => number, from: number, to: number): number {
  const at = (t: number) => {
    solution.look(t);
    return value();
  };
  const start = at(from);
  if (start >= 0) return from;
  const end = at(to);
  return end >= 0 ? findRoot(at, from, start, to, end, MOMENT_S) : to;
}

/**
 * By how much the limit in force allows more than another [A]. Limits may be equal for long (a derating that has not
 * begun): then the one listed first holds, so the sign says which.
 */
function excess(solution: SessionSolution, held: number, other: number): number {
  const more = allowedBy(solution, held) - allowedBy(solution, other);
  return more !== 0 ? more : other < held ? TIE_A : -TIE_A;
}

/** Where the limit in force gives way to another: the one that binds at `to`, unless a third comes first. */
function handOver(solution: SessionSolution, held: number, last: number, from: number, to: number): Happening {
  const { charge } = solution.system;
  let t = to;
  let code = last;
  for (let round = 0; round < limitCodes.length; round++) {
    const other = code;
    t = crossing(solution, () => excess(solution, held, other), from, t);
    solution.look(t);
    if (charge.code === held || charge.code === other) break;
    code = charge.code;
  }
  return { kind: 'hand-over', t, code };
}
