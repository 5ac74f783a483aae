import type { SessionResult } from './session/result.ts';
import { simulateSession } from './session/simulate-session.ts';
import type { Study } from './study/schema.ts';
import type { TripResult } from './trip/result.ts';
import { simulateTrip } from './trip/simulate-trip.ts';

/** What a study file's run returns, by its kind. */
export type StudyResult = SessionResult | TripResult;

/**
 * Runs a study of any kind.
 *
 * @param options  output grid [s] and relative tolerance
 * @throws {StudyError} as the run of its kind
 */
export function runStudy(study: Study, options: { everyS?: number; rtol?: number } = {}): StudyResult {
  return study.kind === 'session' ? simulateSession(study, options).result : simulateTrip(study, options);
}
