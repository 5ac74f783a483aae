import { LIMIT } from '../session/charge-current.ts';
import type { SessionSolution } from '../session/happenings.ts';
import { limitCodes, type LimitCode } from '../session/limits.ts';
import type { SessionObserver } from '../session/session-observer.ts';
import type { SessionResult } from '../session/result.ts';
import { simulateSession } from '../session/simulate-session.ts';
import type { SessionStudy } from '../study/schema.ts';

/** Row for row beside a result's series: what each limit alone would have allowed into the pack [A]; null where it does not stand. */
export type RoomAboveTaper = {
  tS: number[];
  soc: number[];
  allowedA: Record<LimitCode, (number | null)[]>;
  /** The least of all limits but the taper, and its code: up to there raising the taper would help, beyond it changes nothing. */
  withoutTaperA: number[];
  withoutTaper: LimitCode[];
};

/**
 * Runs a session and keeps, at every row of its series, what each limit would have allowed in the state the run was in.
 *
 * @param options  output grid [s]
 * @returns        the run's own result, unchanged by this, and the room beside it
 * @throws {StudyError} as `simulateSession`
 */
export function roomAboveTaper(
  study: SessionStudy,
  options: { everyS?: number } = {},
): { result: SessionResult; room: RoomAboveTaper } {
  const keeper = new RoomKeeper();
  const { result } = simulateSession(study, { ...options, observer: keeper });
  return { result, room: keeper.room };
}

const OTHERS = limitCodes.map((_, i) => i).filter((i) => i !== LIMIT.taper);

class RoomKeeper implements SessionObserver {
  readonly room: RoomAboveTaper = {
    tS: [],
    soc: [],
    allowedA: Object.fromEntries(limitCodes.map((code) => [code, []])) as unknown as RoomAboveTaper['allowedA'],
    withoutTaperA: [],
    withoutTaper: [],
  };
  private solution: SessionSolution | null = null;

  begin(solution: SessionSolution): void {
    this.solution = solution;
  }

  row(t: number): void {
    const { charge, pack } = this.solution!.system;
    const allowed = limitCodes.map((_, i) => charge.allowedBy(i, t));
    const least = OTHERS.reduce((best, i) => (allowed[i] < allowed[best] ? i : best), OTHERS[0]);
    limitCodes.forEach((code, i) => this.room.allowedA[code].push(Number.isFinite(allowed[i]) ? allowed[i] : null));
    this.room.tS.push(t);
    this.room.soc.push(pack.soc);
    this.room.withoutTaperA.push(allowed[least]);
    this.room.withoutTaper.push(limitCodes[least]);
  }

  dropRow(): void {
    const { allowedA, ...columns } = this.room;
    for (const column of [...Object.values(allowedA), ...Object.values(columns)]) column.pop();
  }
}
