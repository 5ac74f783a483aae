import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Problem, ProblemCode } from '../contract/problem.ts';

const STATUS: Record<ProblemCode, number> = { BAD_REQUEST: 400, NOT_FOUND: 404, INTERNAL: 500 };

/** Thrown by a route to answer a problem. The detail is shown to the person who asked. */
export class HttpProblem extends Error {
  override name = 'HttpProblem';
  readonly code: ProblemCode;

  constructor(code: ProblemCode, detail: string, options?: ErrorOptions) {
    super(detail, options);
    this.code = code;
  }
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
  const { status, code, detail } = describeError(error);
  if (status >= 500) req.log.error({ err: error }, 'request failed');
  const problem: Problem = {
    type: 'about:blank',
    title: STATUS_CODES[status] ?? 'Error',
    status,
    detail,
    code,
    requestId: res.get('X-Request-Id') ?? '',
  };
  res.status(status).set('Cache-Control', 'no-store').type('application/problem+json').send(JSON.stringify(problem));
};

function describeError(error: unknown): Pick<Problem, 'status' | 'code' | 'detail'> {
  if (error instanceof HttpProblem) return { status: STATUS[error.code], code: error.code, detail: error.message };
  // Express and what it stands on mark the client's mistakes with a status, such as 416 for a range outside a file.
  const status = error instanceof Error && 'status' in error ? Number(error.status) : STATUS.INTERNAL;
  if (status >= 400 && status < 500) return { status, code: 'BAD_REQUEST', detail: 'The request cannot be answered.' };
  const detail = 'The server could not answer. The request id finds the reason in its log.';
  return { status: STATUS.INTERNAL, code: 'INTERNAL', detail };
}
