/** Every error the server answers, as `application/problem+json` (RFC 9457). */
export type Problem = {
  /** Always `about:blank`: `code` names the problem. */
  type: 'about:blank';
  title: string;
  status: number;
  detail: string;
  /** Stable name of the problem, for programs. */
  code: ProblemCode;
  /** The request, as in the server's log. */
  requestId: string;
};

export type ProblemCode = 'NOT_FOUND' | 'BAD_REQUEST' | 'INTERNAL';
