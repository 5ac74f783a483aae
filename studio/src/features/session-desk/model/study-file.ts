import {
  parseSessionStudy,
  parseStudyText,
  StudyError,
  type SessionStudyInput,
  type StudyIssue,
} from '@voltiplano/engine';

export type OpenedFile = { study: SessionStudyInput } | { issues: StudyIssue[] };

/** Reads a study file for the desk: the study as the file has it, or every reason why it cannot be opened. */
export function readStudyFile(text: string): OpenedFile {
  try {
    // A byte order mark, which some programs write, is no part of the JSON.
    const bare = text.replace(/^\uFEFF/, '');
    parseStudyText(bare);
    const json: unknown = JSON.parse(bare);
    parseSessionStudy(json);
    return { study: json as SessionStudyInput };
  } catch (error) {
    if (error instanceof StudyError) return { issues: error.issues };
    throw error;
  }
}

/** The text of a study file; read again it gives the same study. */
export function studyFileText(study: SessionStudyInput): string {
  return `${JSON.stringify(study, null, 2)}\n`;
}
