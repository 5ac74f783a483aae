import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { StudyIssue } from '@voltiplano/engine';
import type { z } from 'zod';
import { type FieldError, type Problem, type ProblemCode, problemCodes } from '../contract/problem.ts';

/** A person mends some at a time; a table of wrong type would fill megabytes. */
const MOST_ERRORS = 100;

/** Thrown by a route or service to answer a problem. The detail is shown to the person who asked. */
export class HttpProblem extends Error {
  override name = 'HttpProblem';
  readonly code: ProblemCode;
  readonly errors: FieldError[] | undefined;

  constructor(code: ProblemCode, detail: string, options?: ErrorOptions & { errors?: FieldError[] }) {
    super(detail, options);
    this.code = code;
    this.errors = options?.errors;
  }
}

/** The problem of a value that a schema refused. @param part  part of the request that held it, such as `body` */
export function invalidInput(part: string, { issues }: z.ZodError): HttpProblem {
  return invalidFields(issues.map(({ path, message }) => ({ path: [part, ...path].join('.'), message })));
}

/** The problem of fields that are wrong; the first of them where there are very many. */
export function invalidFields(errors: readonly FieldError[]): HttpProblem {
  const [first] = errors;
  const more = errors.length > MOST_ERRORS ? ` Of ${errors.length} errors the first ${MOST_ERRORS} are listed.` : '';
  const detail = first ? `${first.path}: ${first.message}` : 'A field is wrong.';
  return new HttpProblem('INVALID_INPUT', detail + more, { errors: errors.slice(0, MOST_ERRORS) });
}

/** What the engine says against a study or a part of one. @param place  where that stood, such as `body.inputs` */
export function errorsAt(place: string, issues: readonly StudyIssue[]): FieldError[] {
  return issues.map(({ path, message }) => ({ path: dotted(`${place}.${path}`), message }));
}

/** `legs[1].km` as every path of the API is written: `legs.1.km`. */
function dotted(path: string): string {
  return path.replaceAll(/\[(\d+)\]/g, '.$1').replace(/\.$/, '');
}

/** The problem of one field that only a service can judge. */
export function invalidField(path: string, message: string): HttpProblem {
  return new HttpProblem('INVALID_INPUT', `${path}: ${message}`, { errors: [{ path, message }] });
}

/** Ends the chain of routes: whatever nobody answered is not there. */
export const notFound: RequestHandler = (req) => {
  throw new HttpProblem('NOT_FOUND', `Nothing answers ${req.method} ${req.baseUrl}${req.path}.`);
};

/** The one error handler. An error nobody foresaw is logged whole and answered without its text. */
export const answerProblem: ErrorRequestHandler = (error: unknown, req, res, next) => {
  if (res.headersSent) {
    next(error);
    return;
  }
  const { status, code, detail, errors } = describeError(error);
  if (status >= 500) req.log.error({ err: error }, 'request failed');
  const problem: Problem = {
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    detail,
    code,
    requestId: res.get('X-Request-Id') ?? '',
    errors,
  };
  res.status(status).set('Cache-Control', 'no-store').type('application/problem+json').send(JSON.stringify(problem));
};

function describeError(error: unknown): Pick<Problem, 'status' | 'code' | 'detail' | 'errors'> {
  if (error instanceof HttpProblem) {
    const { code, message, errors } = error;
    return { status: problemCodes[code].status, code, detail: message, errors };
  }
  // Express and what it stands on mark the client's mistakes with a status, such as 416 for a range outside a file.
  const status = error instanceof Error && 'status' in error ? Number(error.status) : 500;
  if (status === 413) return { status, code: 'BODY_TOO_LARGE', detail: 'The body is larger than the server takes.' };
  if (status >= 400 && status < 500) return { status, code: 'BAD_REQUEST', detail: 'The request cannot be answered.' };
  const detail = 'The server could not answer. The request id finds the reason in its log.';
  return { status: 500, code: 'INTERNAL', detail };
}
