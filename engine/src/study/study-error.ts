/** One thing wrong with a study: where, which rule, what was found, and the sentence a person reads. */
export type StudyIssue = {
  /** Path of the field in the study file, such as `strategy.taper.points[3].soc`; empty for the file itself. */
  path: string;
  /** Stable code of the rule broken, such as `range`, `unknown-key`, `must-rise`, `refused`. */
  rule: string;
  /** The value found, as text; absent where the field is missing. */
  value?: string;
  /** What, rule and value in one sentence. */
  message: string;
};

export type StudyErrorCode =
  'NOT_JSON' | 'NOT_A_STUDY' | 'INVALID_STUDY' | 'REFUSED' | 'BUDGET' | 'INCONSISTENT' | 'UNSUPPORTED';

/** A study that cannot be read or run. `issues` names each field; `code` is stable. */
export class StudyError extends Error {
  readonly code: StudyErrorCode;
  readonly issues: StudyIssue[];

  constructor(code: StudyErrorCode, issues: StudyIssue[]) {
    super(issues.map((issue) => issue.message).join('\n'));
    this.name = 'StudyError';
    this.code = code;
    this.issues = issues;
  }
}

/** A study error with a single issue. */
export function studyError(
  code: StudyErrorCode,
  path: string,
  rule: string,
  message: string,
  value?: unknown,
): StudyError {
  return new StudyError(code, [{ path, rule, message, ...(value === undefined ? {} : { value: show(value) }) }]);
}

/** A value as a person would read it back: numbers plain, text quoted, long things cut. */
export function show(value: unknown): string {
  if (typeof value === 'number' || value === undefined) return String(value);
  const text = JSON.stringify(value) ?? typeof value;
  return text.length > 60 ? `${text.slice(0, 57)}…` : text;
}
