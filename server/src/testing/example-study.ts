import { readFileSync } from 'node:fs';
import path from 'node:path';
import type { SessionStudyInput } from '@voltiplano/engine';

/** A session of `examples/`, fresh for each call. @param name  of the file, without `.json` */
export function exampleStudy(name = 'vicuna-warm-arrival'): SessionStudyInput {
  const file = path.join(import.meta.dirname, '../../../examples', `${name}.json`);
  return JSON.parse(readFileSync(file, 'utf8')) as SessionStudyInput;
}
