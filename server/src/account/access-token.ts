import { errors, jwtVerify, SignJWT } from 'jose';
import type { Core } from '../core.ts';

/** Short, so that a token that leaks is soon worth nothing [s]. */
const ACCESS_LIFE_S = 10 * 60;
const AUDIENCE = 'voltiplano access';

export type AccessClaims = { personId: string; sessionId: string };

/** Signs an access token (JWT, HS256). */
export function signAccessToken({ secrets, now }: Core, { personId, sessionId }: AccessClaims): Promise<string> {
  const issuedS = Math.floor(now() / 1000);
  return new SignJWT({ sid: sessionId })
    .setProtectedHeader({ alg: 'HS256' })
    .setSubject(personId)
    .setAudience(AUDIENCE)
    .setIssuedAt(issuedS)
    .setExpirationTime(issuedS + ACCESS_LIFE_S)
    .sign(secrets.signing);
}

/** What an access token says; an expired one is told from one that this server never signed. */
export async function readAccessToken(
  { secrets, now }: Core,
  token: string,
): Promise<AccessClaims | 'expired' | 'invalid'> {
  try {
    const { payload } = await jwtVerify<{ sid: string }>(token, secrets.signing, {
      algorithms: ['HS256'],
      audience: AUDIENCE,
      currentDate: new Date(now()),
    });
    return payload.sub ? { personId: payload.sub, sessionId: payload.sid } : 'invalid';
  } catch (error) {
    if (error instanceof errors.JWTExpired) return 'expired';
    if (error instanceof errors.JOSEError) return 'invalid';
    throw error;
  }
}
