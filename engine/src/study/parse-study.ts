import { StudyError, show, studyError } from './study-error.ts';
import { sessionStudySchema, studySchema, tripStudySchema, type SessionStudy, type Study } from './schema.ts';
import { toIssues } from './study-issues.ts';

const KINDS = { session: sessionStudySchema, trip: tripStudySchema } as const;

/**
 * Reads a study from the text of a study file.
 *
 * @throws {StudyError} `NOT_JSON` with the place, else as `parseStudy`
 */
export function parseStudyText(text: string): Study {
  return parseStudy(parseJson(text));
}

/** @throws {StudyError} `NOT_JSON` with the place */
export function parseJson(text: string): unknown {
  try {
    return JSON.parse(text) as unknown;
  } catch (error) {
    throw studyError('NOT_JSON', '', 'json', `Cannot read this file as JSON: ${(error as Error).message}`);
  }
}

/**
 * Checks a study against the schema and fills defaults in.
 *
 * @param json  a value as parsed from a study file; not changed
 * @throws {StudyError} `NOT_A_STUDY` or `INVALID_STUDY`, one issue per field at fault
 */
export function parseStudy(json: unknown): Study {
  const head = json as { format?: unknown; kind?: unknown } | null;
  if (typeof json !== 'object' || json === null || Array.isArray(json) || head?.format !== 'voltiplano/study') {
    const message = `Not a study: format must be "voltiplano/study", but is ${show(head?.format)}`;
    throw studyError('NOT_A_STUDY', 'format', 'format', message, head?.format);
  }
  const kind = head.kind;
  const schema = kind === 'session' || kind === 'trip' ? KINDS[kind] : studySchema;
  const result = schema.safeParse(json);
  if (result.success) return result.data;
  throw new StudyError(
    'INVALID_STUDY',
    result.error.issues.flatMap((issue) => toIssues(issue, json, 'study')),
  );
}

/** As `parseStudy`, for a caller that needs a session. */
export function parseSessionStudy(json: unknown): SessionStudy {
  const study = parseStudy(json);
  if (study.kind === 'session') return study;
  throw studyError('UNSUPPORTED', 'kind', 'kind', `Expected a session study, but kind is "${study.kind}"`, study.kind);
}
