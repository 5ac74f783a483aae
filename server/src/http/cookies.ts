import type { CookieOptions, Request, Response } from 'express';

export const ACCESS_COOKIE = 'voltiplano_access';
const REFRESH_COOKIE = 'voltiplano_refresh';
/** Readable by the studio, which repeats it in the X-CSRF-Token header. */
const CSRF_COOKIE = 'voltiplano_csrf';
export const FLOW_COOKIE = 'voltiplano_provider';

const API_PATH = '/api';
const AUTH_PATH = '/api/v1/auth';

export type SessionCookies = { accessToken: string; refreshToken: string; csrfToken: string; lifeMs: number };

/** Value of a cookie of the request, null where there is none. */
export function readCookie(req: Request, name: string): string | null {
  const pairs = (req.get('cookie') ?? '').split(';').map((pair) => pair.trim());
  const found = pairs.find((pair) => pair.startsWith(`${name}=`));
  return found ? found.slice(name.length + 1) : null;
}

export function readRefreshCookie(req: Request): string | null {
  return readCookie(req, REFRESH_COOKIE);
}

/** Sets the three cookies of a session. The access cookie outlives its token, so that an expired one is told from none. */
export function setSessionCookies(res: Response, publicUrl: string, cookies: SessionCookies): void {
  const { accessToken, refreshToken, csrfToken, lifeMs } = cookies;
  const shared = { secure: publicUrl.startsWith('https:'), maxAge: lifeMs };
  res.cookie(ACCESS_COOKIE, accessToken, { ...shared, httpOnly: true, sameSite: 'lax', path: API_PATH });
  res.cookie(REFRESH_COOKIE, refreshToken, { ...shared, httpOnly: true, sameSite: 'strict', path: AUTH_PATH });
  res.cookie(CSRF_COOKIE, csrfToken, { ...shared, httpOnly: false, sameSite: 'strict', path: '/' });
}

export function clearSessionCookies(res: Response): void {
  res.clearCookie(ACCESS_COOKIE, { path: API_PATH });
  res.clearCookie(REFRESH_COOKIE, { path: AUTH_PATH });
  res.clearCookie(CSRF_COOKIE, { path: '/' });
}

/** Cookie that holds a sign-in under way at the provider. It must come back from another site, hence `lax`. */
export function flowCookie(publicUrl: string, maxAge: number): CookieOptions {
  return { secure: publicUrl.startsWith('https:'), httpOnly: true, sameSite: 'lax', path: AUTH_PATH, maxAge };
}
