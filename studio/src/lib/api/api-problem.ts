import { formatHoursAndMinutes } from '../format.ts';
import type { FieldError, Problem, ProblemCode } from '../../../../server/src/contract/problem.ts';

/** What the server refused, with its stable code and the fields that are wrong. */
export class ApiProblem extends Error {
  override name = 'ApiProblem';
  readonly code: ProblemCode;
  readonly status: number;
  readonly errors: FieldError[];
  readonly requestId: string;
  /** How long the server asks to wait [s]; null where it does not say. */
  readonly retryAfterS: number | null;

  constructor({ code, status, detail, errors, requestId }: Problem, retryAfterS: number | null = null) {
    super(detail);
    this.code = code;
    this.status = status;
    this.errors = errors ?? [];
    this.requestId = requestId;
    this.retryAfterS = retryAfterS;
  }
}

/** The server gave no answer that can be read: no connection, or something between that answers in its place. */
export class Unreachable extends Error {
  override name = 'Unreachable';
}

export function isProblem(error: unknown, ...codes: ProblemCode[]): error is ApiProblem {
  return error instanceof ApiProblem && codes.includes(error.code);
}

/** One sentence for people. */
export function problemSentence(error: unknown): string {
  if (isProblem(error, 'TOO_MANY_REQUESTS') && error.retryAfterS !== null)
    return `Too many tries. Try again in ${formatHoursAndMinutes(Math.max(1, Math.ceil(error.retryAfterS / 60)))}.`;
  if (error instanceof ApiProblem) return error.message;
  if (error instanceof Unreachable) return 'The server cannot be reached. Check the connection and try again.';
  return error instanceof Error ? error.message : String(error);
}
