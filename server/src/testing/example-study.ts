import { readFileSync } from 'node:fs';
import type { SessionStudyInput, TripStudyInput } from '@voltiplano/engine';

/** A session of `examples/`, fresh for each call. @param name  of the file, without `.json` */
export function exampleStudy(name = 'vicuna-warm-arrival'): SessionStudyInput {
  return readExample(name) as SessionStudyInput;
}

/** The trip of `examples/`, of one leg. */
export function exampleTrip(): TripStudyInput {
  return readExample('vicuna-one-leg') as TripStudyInput;
}

function readExample(name: string): unknown {
  return JSON.parse(readFileSync(new URL(`../../../examples/${name}.json`, import.meta.url), 'utf8'));
}
