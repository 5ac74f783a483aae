import type { Accuracy } from '../session/make-stepper.ts';
import type { RunEvent } from '../session/result.ts';
import { studyError } from '../study/study-error.ts';
import type { TripStudy } from '../study/schema.ts';
import { driveLeg } from './drive-leg.ts';
import { DriveSystem } from './drive-system.ts';
import type { TripResult } from './result.ts';
import { TripRecorder } from './trip-recorder.ts';

export type TripOptions = Accuracy & { everyS?: number };

/**
 * Drives a trip of one leg.
 *
 * @throws {StudyError} `UNSUPPORTED` for more than one leg or for preconditioning; `BUDGET` or `INCONSISTENT` as a session
 * @see engine/MODEL.md, section 7
 */
export function simulateTrip(study: TripStudy, options: TripOptions = {}): TripResult {
  const { legs, precondition } = study.trip;
  if (legs.length > 1) throw unsupported('trip.legs', `a trip of one leg can be driven, but this has ${legs.length}`);
  if (precondition)
    throw unsupported('trip.precondition', 'a trip of one leg can be driven without preconditioning only');
  const system = new DriveSystem(study);
  const recorder = new TripRecorder(system.pack);
  const events: RunEvent[] = [];
  const course = { leg: legs[0], startS: 0, startKm: 0, y: system.startState(), everyS: options.everyS ?? 10 };
  const { leg, endS, failure } = driveLeg(system, course, { recorder, events }, options);
  return {
    format: 'voltiplano/result',
    version: 1,
    kind: 'trip',
    title: study.title ?? '',
    totalMin: endS / 60,
    driveMin: endS / 60,
    overheadMin: 0,
    chargeMin: 0,
    completed: failure === undefined,
    ...(failure ? { failure } : {}),
    legs: [leg],
    stops: [],
    events,
    series: recorder.series,
  };
}

function unsupported(path: string, rule: string) {
  return studyError('UNSUPPORTED', path, 'one-leg', `Cannot drive this trip: ${rule}.`);
}
