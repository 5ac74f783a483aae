import type { LimitCode } from '../session/limits.ts';
import type { SessionResult } from '../session/result.ts';
import type { Taper } from '../study/schema.ts';
import type { BoundName } from '../study/tune-bounds.ts';

/**
 * `tuned`: a taper that keeps every bound. `nothing-to-gain`: the present one is as good, or other limits hold everywhere.
 * `infeasible`: no taper keeps the bounds. `not-reached`: none that keeps them reaches the goal.
 */
export type TuneVerdict = 'tuned' | 'nothing-to-gain' | 'infeasible' | 'not-reached';

/** Where a bound came nearest: its value there, and the room left, below 0 where it is passed. */
export type BoundReading = {
  bound: BoundName;
  limit: number;
  unit: string;
  /** Decimals with which it is shown; the bound holds to the last of them. */
  digits: number;
  value: number;
  margin: number;
  /** Index of the condition, and the moment. */
  condition: number;
  atMin: number;
  atSoc: number;
};

/** The goal of a run: minutes (less is better) or kWh (more is better); null where it was not reached. */
export type GoalReading = { tuned: number | null; present: number | null; gained: number | null };

/** What stands against a higher value: a bound that would be passed, limits that hold anyway, or the shape's own order. */
export type Holding =
  | { by: 'bound'; bound: BoundName; condition: number; atMin: number; atSoc: number }
  | { by: 'limits'; limits: { code: LimitCode; minutes: number }[] }
  | { by: 'order' }
  | { by: 'nothing' };

/** One ledge of the tuned taper, or one point of a slope with what lies between its neighbours. */
export type TunedPart = {
  fromSoc: number;
  toSoc: number;
  value: number;
  /** Minutes the taper itself held the current back here, over all conditions. */
  taperMinutes: number;
  holds: Holding;
  /** How near each bound came here; a part that no run visits has none. */
  closest: BoundReading[];
};

export type ProofRun = {
  name: string;
  weight: number;
  goal: GoalReading;
  closest: BoundReading[];
  /** The ordinary run of the study, under this condition, with the tuned taper. */
  result: SessionResult;
};

export type TradeOffPoint = {
  /** The bound as it was tightened, and by how much. */
  limit: number;
  margin: number;
  /** Minutes or kWh; null where no taper keeps it. */
  goal: number | null;
  taper: Taper | null;
};

/** What a tuning returns; exactly these keys are written to a file. */
export type TuneResult = {
  format: 'voltiplano/tune-result';
  version: 1;
  title: string;
  verdict: TuneVerdict;
  /** The verdict in a sentence or two. */
  message: string;
  taper: Taper | null;
  goal: GoalReading & { unit: 'min' | 'kWh' };
  /** Bounds that the study's present taper passes, at their worst; empty where it keeps them all. */
  presentPasses: BoundReading[];
  /** How near each bound came in the proof runs. */
  closest: BoundReading[];
  /** Where `infeasible`: the bound that the best attempt passes, where and by how much. */
  obstacle: BoundReading | null;
  parts: TunedPart[];
  proofs: ProofRun[];
  tradeOff: { bound: BoundName; unit: string; points: TradeOffPoint[] } | null;
  effort: { runs: number; evaluations: number };
};
