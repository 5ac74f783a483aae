import { createHmac, timingSafeEqual } from 'node:crypto';
import type { Request } from 'express';
import type { Secrets } from '../secrets/secrets.ts';
import { HttpProblem } from './problem.ts';

/** Public address, and whether it was set or only guessed from the port. */
export type Site = { publicUrl: () => string; isSet: boolean };

/**
 * Refuses a request that a page of another site made the browser send. A program that is no browser sends neither
 * header and has no cookies to abuse.
 *
 * @throws {HttpProblem} `ORIGIN_REFUSED`
 */
export function refuseOtherSites(req: Request, site: Site): void {
  const origin = req.get('origin');
  const crossSite = ['cross-site', 'same-site'].includes(req.get('sec-fetch-site') ?? '');
  const isOwn = origin === undefined ? !crossSite : isOwnOrigin(req, site, origin);
  if (!isOwn) throw new HttpProblem('ORIGIN_REFUSED', 'The request comes from another site.');
}

function isOwnOrigin(req: Request, { publicUrl, isSet }: Site, origin: string): boolean {
  if (origin === publicUrl()) return true;
  // Without PUBLIC_URL the server answers under any name it is called by, such as an address on the local network.
  return !isSet && URL.canParse(origin) && new URL(origin).host === req.get('host');
}

/** The CSRF token of a session: it cannot be made without the server's key, and ends with the session. */
export function csrfTokenOf(secrets: Secrets, sessionId: string): string {
  return createHmac('sha256', secrets.csrf).update(sessionId).digest('base64url');
}

/**
 * Refuses a changing request by cookie without the token of its session.
 *
 * @throws {HttpProblem} `CSRF_REFUSED`
 */
export function requireCsrfToken(req: Request, secrets: Secrets, sessionId: string): void {
  const expected = Buffer.from(csrfTokenOf(secrets, sessionId));
  const sent = Buffer.from(req.get('x-csrf-token') ?? '');
  if (sent.length !== expected.length || !timingSafeEqual(sent, expected)) {
    throw new HttpProblem('CSRF_REFUSED', 'The X-CSRF-Token header must repeat the voltiplano_csrf cookie.');
  }
}
