import { readdirSync, readFileSync } from 'node:fs';
import path from 'node:path';
import { parseSessionStudy, type SessionStudy } from '../src/index.ts';

/** The two sessions that are timed: the same pack as one segment and as twelve. */
export const timed = ['b1', 'b12'] as const;
export type Timed = (typeof timed)[number];

const HERE = import.meta.dirname;
const REFERENCE = path.resolve(HERE, '../validation/reference');

const read = (file: string): SessionStudy => parseSessionStudy(JSON.parse(readFileSync(file, 'utf8')));

export const timedStudy = (name: Timed): SessionStudy => read(path.join(HERE, 'studies', `${name}.json`));

/** The studies of the validation's second implementation, by name. */
export function referenceStudies(): [string, SessionStudy][] {
  return readdirSync(REFERENCE)
    .filter((file) => file.endsWith('.json') && !file.endsWith('.expected.json'))
    .map((file) => [path.basename(file, '.json'), read(path.join(REFERENCE, file))]);
}
