import type { z } from 'zod';
import type { ProblemCode } from './problem.ts';
import type { Capability } from './roles.ts';

/**
 * Who may call: anyone; a signed-in person, not an API token; or a member of the workspace in the path whose role has
 * the capability, signed in or by API token.
 */
export type Access = 'anyone' | 'session' | Capability;

/** Everything that is true of one call of the API. Server, OpenAPI document, documentation and tests read it. */
export type Endpoint = {
  /** Unique; `operationId` of the OpenAPI document. */
  id: string;
  method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  /** Below `/api/v1`, with parameters as in `/workspaces/:workspaceId`. */
  path: `/${string}`;
  tag: string;
  summary: string;
  access: Access;
  params?: z.ZodObject;
  query?: z.ZodObject;
  body?: z.ZodObject;
  /** Status of success. */
  status: 200 | 201 | 202 | 204 | 302;
  /** Body of success; absent where there is none. */
  answer?: z.ZodType;
  /** What can go wrong besides what every call of its kind shares. */
  problems: readonly ProblemCode[];
  /** Takes an `Idempotency-Key`: the call repeated with the same key creates nothing more and gets the same answer. */
  creates?: true;
  /** Needs an `If-Match` with the ETag that the change was made from. */
  ifMatch?: true;
  /** Largest body, where that is more than the 1 MB that every call may send. */
  bodyLimit?: '10mb';
  /** Counted per address against the tries that the server allows. */
  limited?: 'sign-in' | 'sign-up' | 'mail';
};

/** Checks a description of an endpoint and keeps its exact type. */
export function defineEndpoint<const E extends Endpoint>(endpoint: E): E {
  return endpoint;
}

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;
type Sent<S> = S extends z.ZodType ? z.input<S> : undefined;

export type ParamsOf<E extends Endpoint> = Parsed<E extends { params: infer S } ? S : undefined>;
export type QueryOf<E extends Endpoint> = Parsed<E extends { query: infer S } ? S : undefined>;
export type BodyOf<E extends Endpoint> = Parsed<E extends { body: infer S } ? S : undefined>;
/** The body as a caller writes it, before defaults. */
export type SentBodyOf<E extends Endpoint> = Sent<E extends { body: infer S } ? S : undefined>;
export type AnswerOf<E extends Endpoint> = Parsed<E extends { answer: infer S } ? S : undefined>;
