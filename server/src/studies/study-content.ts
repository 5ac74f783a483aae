import { createHash } from 'node:crypto';
import { parseStudy, StudyError } from '@voltiplano/engine';
import type { LibraryKind } from '../contract/library.ts';
import type { PartReference, StudyFile } from '../contract/study.ts';
import { sortText } from '../db/search-text.ts';
import { errorsAt, invalidFields } from '../http/problem.ts';
import { canonicalJson } from './canonical-json.ts';

/**
 * Has the engine judge a study file.
 *
 * @throws {HttpProblem} `INVALID_INPUT` with the engine's sentence for each field, below `body.inputs`
 */
export function judgeInputs(inputs: StudyFile): void {
  try {
    parseStudy(inputs);
  } catch (error) {
    if (!(error instanceof StudyError)) throw error;
    throw invalidFields(errorsAt('body.inputs', error.issues));
  }
}

/** What lists and the search take from a study file. */
export type StudyWords = {
  title: string;
  sortTitle: string;
  packName: string;
  stationName: string | null;
  partNames: string;
};

/** @param inputs  judged by the engine */
export function wordsOf(inputs: StudyFile): StudyWords {
  const title = inputs.title ?? '';
  const stations = inputs.kind === 'session' ? [inputs.station] : inputs.trip.legs.flatMap((leg) => leg.station ?? []);
  const names = [inputs.pack, inputs.cell, ...stations, inputs.strategy].map(({ name }) => name);
  return {
    title,
    sortTitle: sortText(title),
    packName: inputs.pack.name,
    stationName: inputs.kind === 'session' ? inputs.station.name : null,
    partNames: [...new Set(names)].join('\n'),
  };
}

/**
 * Equal for equal content: inputs, whatever the order of their keys, and what they were taken from. Which newer
 * revisions of the library were looked at is no content.
 */
export function contentHash(inputs: StudyFile, parts: readonly PartReference[]): string {
  const taken = parts.map(({ part, itemId, revision }) => [part, itemId, revision].join(' ')).sort();
  return createHash('sha256')
    .update(canonicalJson([inputs, taken]))
    .digest('base64url');
}

/** A part of a study as the library holds it; undefined where the study has none. */
export function partOf(inputs: StudyFile, part: LibraryKind): unknown {
  if (part === 'route') return inputs.kind === 'trip' ? { legs: inputs.trip.legs } : undefined;
  return (inputs as Partial<Record<LibraryKind, unknown>>)[part];
}
