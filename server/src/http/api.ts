import express, { type Request, type RequestHandler, type Response, Router } from 'express';
import type { z } from 'zod';
import type { AnswerOf, BodyOf, Endpoint, ParamsOf, QueryOf } from '../contract/endpoint.ts';
import type { Core } from '../core.ts';
import { inTransaction } from '../db/database.ts';
import { WorkspaceAccess } from '../workspaces/workspace-access.ts';
import type { Actor, SessionActor } from './actor.ts';
import { authenticate } from './authenticate.ts';
import { readIfMatch } from './if-match.ts';
import { findKeptAnswer, keepAnswer, type KeptAnswer, type KeyedCall } from './kept-answers.ts';
import { requireShallow } from './nesting.ts';
import { HttpProblem, invalidField, invalidInput } from './problem.ts';
import { type RateLimits, rateLimiters } from './rate-limits.ts';
import { refuseOtherSites, requireCsrfToken, type Site } from './same-site.ts';

/** Studies and library entries are JSON of some kilobytes; files go another way. */
const BODY_LIMIT = '1mb';

/** Returned by a handler that has written the answer itself. */
export const ANSWERED = { isAnswered: true } as const;

type ActorOf<E extends Endpoint> = E['access'] extends 'anyone'
  ? null
  : E['access'] extends 'session'
    ? SessionActor
    : Actor;
type AccessOf<E extends Endpoint> = E['access'] extends 'anyone' | 'session' ? null : WorkspaceAccess;

/** One call, judged and parsed. */
export type Call<E extends Endpoint> = {
  params: ParamsOf<E>;
  query: QueryOf<E>;
  body: BodyOf<E>;
  /** The entity tag that the change was made from, as it was sent; see `requireMatch`. */
  ifMatch: E extends { ifMatch: true } ? string : undefined;
  actor: ActorOf<E>;
  /** Access to the workspace in the path, with the capability that the endpoint names. */
  access: AccessOf<E>;
  /** Its `db` is a transaction where the endpoint creates something. */
  core: Core;
  req: Request;
  res: Response;
};

type Result<E extends Endpoint> = (E extends { answer: z.ZodType } ? AnswerOf<E> : void) | typeof ANSWERED;
export type Handler<E extends Endpoint> = (call: Call<E>) => Result<E> | Promise<Result<E>>;

/**
 * A call in two steps. There is one database connection, so whatever takes long is done in `prepare`, before the
 * transaction of a call that creates something; `handle` gets what it made. In between things may have changed:
 * `handle` checks again what it relies on.
 */
export type Steps<E extends Endpoint, P> = {
  prepare: (call: Call<E>) => P | Promise<P>;
  handle: (call: Call<E>, prepared: P) => Result<E> | Promise<Result<E>>;
};

/** With or without a first step. */
type AnySteps<E extends Endpoint> = Steps<E, unknown> | { handle: Handler<E> };

type ApiDeps = { core: Core; site: Site; rateLimits: RateLimits };

/** Mounts endpoints: each is judged, parsed and answered as its description says, so that no route can forget it. */
export class Api {
  readonly router = Router();
  private readonly deps: ApiDeps;
  private readonly limiters: ReturnType<typeof rateLimiters>;

  constructor(deps: ApiDeps) {
    this.deps = deps;
    this.limiters = rateLimiters(deps.rateLimits);
    // What these calls answer is never kept, so there is nothing that a 304 could spare.
    this.router.use((req, _res, next) => {
      delete req.headers['if-none-match'];
      next();
    });
  }

  serve<E extends Endpoint, P>(endpoint: E, handler: Handler<E> | Steps<E, P>): void {
    const takeBody = express.json({ limit: endpoint.bodyLimit ?? BODY_LIMIT });
    // Tries are counted by the e-mail in the body too; else a body is taken only from who may send it.
    const limiters = endpoint.limited ? [takeBody, ...this.limiters[endpoint.limited]] : [];
    const steps = (typeof handler === 'function' ? { handle: handler } : handler) as AnySteps<E>;
    this.router[endpoint.method](endpoint.path, ...limiters, async (req, res) => {
      await this.answer(endpoint, steps, takeBody, req, res);
    });
  }

  private async answer<E extends Endpoint>(
    endpoint: E,
    steps: AnySteps<E>,
    takeBody: RequestHandler,
    req: Request,
    res: Response,
  ) {
    const { core } = this.deps;
    res.set('Cache-Control', 'no-store');
    const actor = await this.admit(endpoint, req);
    const params = parseParams(endpoint, req);
    const access = actor ? await openAccess(core, endpoint, actor, params) : null;
    const ifMatch = endpoint.ifMatch ? readIfMatch(req) : undefined;
    const query = parse('query', endpoint.query, req.query);
    await finished(takeBody, req, res);
    const body = parse('body', endpoint.body, req.body ?? {});
    const judged = { params, query, body, ifMatch, actor, access, req, res };
    const run: Run = {
      prepare: () => ('prepare' in steps ? steps.prepare({ ...judged, core } as Call<E>) : undefined),
      handle: async (inner, prepared) => {
        // Somebody may have lost their role meanwhile.
        const again = 'prepare' in steps && actor ? await openAccess(inner, endpoint, actor, params) : access;
        return steps.handle({ ...judged, access: again, core: inner } as Call<E>, prepared);
      },
    };
    const call = actor && endpoint.creates ? keyedCall(req, actor, [body, ifMatch]) : null;
    const { status, answer } = call
      ? await runKeyed(core, call, endpoint.status, res, run)
      : { status: endpoint.status, answer: await runPlain(core, endpoint, run) };
    if (answer === ANSWERED) return;
    if (answer === undefined) res.status(status).end();
    else res.status(status).json(answer);
  }

  /** Who calls, or null where anyone may. @throws {HttpProblem} if they may not */
  private async admit({ access, method }: Endpoint, req: Request): Promise<Actor | null> {
    const { core, site } = this.deps;
    const changes = method !== 'get';
    if (changes && !req.get('authorization')) refuseOtherSites(req, site);
    if (access === 'anyone') return null;
    const actor = await authenticate(core, req);
    if (actor.kind === 'session' && changes) requireCsrfToken(req, core.secrets, actor.sessionId);
    if (access === 'session' && actor.kind !== 'session') {
      throw new HttpProblem('SESSION_REQUIRED', 'Only a signed-in person may do this, an API token may not.');
    }
    return actor;
  }
}

/** Runs a middleware to its end; one that has run already changes nothing. */
function finished(middleware: RequestHandler, req: Request, res: Response): Promise<void> {
  return new Promise((resolve, reject) => {
    void middleware(req, res, (error?: unknown) => {
      if (error instanceof Error) reject(error);
      else resolve();
    });
  });
}

async function openAccess(core: Core, { access }: Endpoint, actor: Actor, params: unknown) {
  if (access === 'anyone' || access === 'session') return null;
  const { workspaceId } = params as { workspaceId: string };
  const opened = await WorkspaceAccess.open(core.db, actor, workspaceId);
  opened.require(access);
  return opened;
}

/** A path with something that is no identifier leads nowhere. */
function parseParams({ params }: Endpoint, req: Request): unknown {
  if (!params) return undefined;
  const parsed = params.safeParse(req.params);
  if (!parsed.success) throw new HttpProblem('NOT_FOUND', 'There is no such thing, or not for you.');
  return parsed.data;
}

function parse(part: string, schema: z.ZodObject | undefined, value: unknown): unknown {
  if (!schema) return undefined;
  requireShallow(part, value);
  const parsed = schema.safeParse(value);
  if (!parsed.success) throw invalidInput(part, parsed.error);
  return parsed.data;
}

/** The steps of one call, on the database or in a transaction. */
type Run = { prepare: () => unknown; handle: (core: Core, prepared: unknown) => Promise<unknown> };

async function runPlain(core: Core, { creates }: Endpoint, { prepare, handle }: Run): Promise<unknown> {
  const prepared = await prepare();
  return creates ? inTransaction(core.db, (db) => handle({ ...core, db }, prepared)) : handle(core, prepared);
}

/** The call and its kept answer stand or fall together, so a repeated call finds either both or neither. */
async function runKeyed(
  core: Core,
  call: KeyedCall,
  status: number,
  res: Response,
  { prepare, handle }: Run,
): Promise<{ status: number; answer: unknown }> {
  // A call that was answered is not prepared again, which would judge it by what it has changed itself.
  const known = await findKeptAnswer(core, call);
  if (known) return asAnswer(known, res);
  const prepared = await prepare();
  return inTransaction(core.db, async (db) => {
    const inner = { ...core, db };
    const kept = await findKeptAnswer(inner, call);
    if (kept) return asAnswer(kept, res);
    const answer = await handle(inner, prepared);
    await keepAnswer(inner, call, { status, body: answer, etag: res.get('ETag') ?? null });
    return { status, answer };
  });
}

function asAnswer({ status, body, etag }: KeptAnswer, res: Response): { status: number; answer: unknown } {
  if (etag) res.set('ETag', etag);
  return { status, answer: body };
}

function keyedCall(req: Request, { personId }: Actor, [body, ifMatch]: [unknown, string?]): KeyedCall | null {
  const key = req.get('idempotency-key');
  if (key === undefined) return null;
  if (!/^[\x21-\x7e]{1,200}$/.test(key)) {
    throw invalidField('header.Idempotency-Key', 'Must be 1 to 200 visible characters of ASCII');
  }
  return { personId, key, request: JSON.stringify([req.method, req.path, body, ...(ifMatch ? [ifMatch] : [])]) };
}
