import { fileNameOf } from '../../../charts/export-text.ts';
import type { SessionResult, SessionStudyInput } from '@voltiplano/engine';
import { sessionCsv } from './session-csv.ts';
import { studyFileText } from './study-file.ts';

export type TextFile = { name: string; text: string; type: string };

/** The study as a file. */
export function studyFile(study: SessionStudyInput): TextFile {
  return { name: fileNameOf(study.title ?? '', 'study', 'json'), text: studyFileText(study), type: 'application/json' };
}

/** The series of the last run as CSV. A byte order mark tells spreadsheets that it is UTF-8. */
export function seriesFile(result: SessionResult, study: SessionStudyInput): TextFile {
  return {
    name: fileNameOf(study.title ?? '', 'series', 'csv'),
    text: `\uFEFF${sessionCsv(result, study)}`,
    type: 'text/csv',
  };
}

/** The whole result, with exactly the keys of a result file. */
export function resultFile(result: SessionResult, study: SessionStudyInput): TextFile {
  return {
    name: fileNameOf(study.title ?? '', 'result', 'json'),
    text: `${JSON.stringify(result, null, 2)}\n`,
    type: 'application/json',
  };
}
