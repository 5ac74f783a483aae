import type { Request } from 'express';
import { findApiToken } from '../api-tokens/api-token-repository.ts';
import { readAccessToken } from '../account/access-token.ts';
import { isSessionLive } from '../account/session-repository.ts';
import type { Core } from '../core.ts';
import type { Actor } from './actor.ts';
import { ACCESS_COOKIE, readCookie } from './cookies.ts';
import { HttpProblem } from './problem.ts';

/**
 * Finds out who makes a request, by API token or by cookie. An API token wins: who sends one means it.
 *
 * @throws {HttpProblem} `NOT_SIGNED_IN`, `ACCESS_EXPIRED`, `SESSION_ENDED` or `API_TOKEN_INVALID`
 */
export async function authenticate(core: Core, req: Request): Promise<Actor> {
  const authorization = req.get('authorization');
  if (authorization !== undefined) return authenticateToken(core, authorization);
  const token = readCookie(req, ACCESS_COOKIE);
  if (!token) throw new HttpProblem('NOT_SIGNED_IN', 'Sign in first.');
  const claims = await readAccessToken(core, token);
  if (claims === 'expired') throw new HttpProblem('ACCESS_EXPIRED', 'The access token has expired. Refresh it.');
  if (claims === 'invalid') throw new HttpProblem('NOT_SIGNED_IN', 'Sign in first.');
  if (!(await isSessionLive(core, claims.sessionId))) {
    throw new HttpProblem('SESSION_ENDED', 'This device was signed out. Sign in again.');
  }
  return { kind: 'session', ...claims };
}

async function authenticateToken(core: Core, authorization: string): Promise<Actor> {
  const secret = /^Bearer (\S+)$/i.exec(authorization)?.[1];
  const actor = secret ? await findApiToken(core, secret) : null;
  if (!actor) throw new HttpProblem('API_TOKEN_INVALID', 'The API token is unknown, expired or revoked.');
  return actor;
}
