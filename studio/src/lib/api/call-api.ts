import type { AnswerOf, Endpoint, ParamsOf, QueryOf, SentBodyOf } from '../../../../server/src/contract/endpoint.ts';
import type { Problem } from '../../../../server/src/contract/problem.ts';
import { ApiProblem, isProblem, Unreachable } from './api-problem.ts';
import { csrfToken } from './csrf-token.ts';
import { refreshSession } from './refresh-session.ts';
import { sessionEnd } from './session-end.ts';

export type CallOptions<E extends Endpoint> = {
  params?: ParamsOf<E>;
  query?: Partial<QueryOf<E>>;
  body?: SentBodyOf<E>;
  /** ETag that the change was made from, such as `"w12"`. */
  ifMatch?: string;
  /** The same key for the same wish, however often it is sent. */
  idempotencyKey?: string;
  signal?: AbortSignal;
  /** Lets the call outlive the page; for what must be kept while it is being left. */
  keepalive?: boolean;
};

/**
 * Calls the API. Where the access token has expired, it is refreshed once and the call sent again.
 *
 * @throws {ApiProblem} if the server refuses
 * @throws {Unreachable} if there is no answer
 */
export async function callApi<E extends Endpoint>(endpoint: E, options: CallOptions<E> = {}): Promise<AnswerOf<E>> {
  try {
    return await sendFresh(endpoint, options);
  } catch (error) {
    if (endpoint.access !== 'anyone' && isSignedOut(error)) sessionEnd.tell();
    throw error;
  }
}

/** Whether the server knows nobody who makes the call. */
export function isSignedOut(error: unknown): error is ApiProblem {
  return isProblem(error, 'NOT_SIGNED_IN', 'SESSION_ENDED', 'REFRESH_REUSED');
}

async function sendFresh<E extends Endpoint>(endpoint: E, options: CallOptions<E>): Promise<AnswerOf<E>> {
  try {
    return await send(endpoint, options);
  } catch (error) {
    if (!isProblem(error, 'ACCESS_EXPIRED')) throw error;
    return refreshSession(() => send(endpoint, options));
  }
}

async function send<E extends Endpoint>(endpoint: E, options: CallOptions<E>): Promise<AnswerOf<E>> {
  const { body, signal, keepalive } = options;
  const init: RequestInit = {
    method: endpoint.method.toUpperCase(),
    headers: headersOf(endpoint, options),
    credentials: 'same-origin',
    ...(body === undefined ? {} : { body: JSON.stringify(body) }),
    ...(signal ? { signal } : {}),
    ...(keepalive ? { keepalive } : {}),
  };
  const response = await reach(addressOf(endpoint, options), init);
  if (response.ok) {
    const isEmpty = endpoint.answer === undefined && response.status === endpoint.status;
    return (isEmpty ? undefined : await readJson(response)) as AnswerOf<E>;
  }
  throw new ApiProblem((await readJson(response)) as Problem, retryAfterOf(response));
}

/** Seconds that the server asks to wait, where it does. */
function retryAfterOf(response: Response): number | null {
  const seconds = Number.parseInt(response.headers.get('retry-after') ?? '', 10);
  return Number.isNaN(seconds) ? null : seconds;
}

async function reach(address: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(address, init);
  } catch (cause) {
    if (init.signal?.aborted) throw cause;
    throw new Unreachable('No answer', { cause });
  }
}

async function readJson(response: Response): Promise<unknown> {
  const isJson = response.headers.get('content-type')?.includes('json') === true;
  if (!isJson) throw new Unreachable(`An answer that is not the server’s (${response.status})`);
  try {
    return await response.json();
  } catch (cause) {
    throw new Unreachable('Half an answer', { cause });
  }
}

function headersOf<E extends Endpoint>({ method }: E, { body, ifMatch, idempotencyKey }: CallOptions<E>) {
  const csrf = method === 'get' ? undefined : csrfToken();
  return {
    Accept: 'application/json',
    ...(body === undefined ? {} : { 'Content-Type': 'application/json' }),
    ...(csrf ? { 'X-CSRF-Token': csrf } : {}),
    ...(ifMatch ? { 'If-Match': ifMatch } : {}),
    ...(idempotencyKey ? { 'Idempotency-Key': idempotencyKey } : {}),
  };
}

/** Address of a call, with its parameters and query filled in. */
export function addressOf<E extends Endpoint>({ path }: E, { params, query }: CallOptions<E>): string {
  const values = (params ?? {}) as Record<string, string | number>;
  const filled = path.replace(/:(\w+)/g, (_all, name: string) => encodeURIComponent(String(values[name])));
  const pairs = Object.entries((query ?? {}) as Record<string, string | number | undefined>);
  const search = new URLSearchParams();
  for (const [name, value] of pairs) if (value !== undefined && value !== '') search.set(name, String(value));
  return `/api/v1${filled}${search.size > 0 ? `?${search.toString()}` : ''}`;
}
