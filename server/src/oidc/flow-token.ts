import { errors, jwtVerify, SignJWT } from 'jose';
import type { Core } from '../core.ts';
import type { Flow } from './provider-client.ts';

/** Time to sign in at the provider [s]. */
export const FLOW_LIFE_S = 15 * 60;
const AUDIENCE = 'voltiplano provider';

export type PendingFlow = Flow & { next: string };

/** Signs what is remembered while the browser is away, so that it can lie in its cookie. */
export function signFlow({ secrets, now }: Core, flow: PendingFlow): Promise<string> {
  const issuedS = Math.floor(now() / 1000);
  return new SignJWT(flow)
    .setProtectedHeader({ alg: 'HS256' })
    .setAudience(AUDIENCE)
    .setIssuedAt(issuedS)
    .setExpirationTime(issuedS + FLOW_LIFE_S)
    .sign(secrets.signing);
}

/** What `signFlow` signed, null if it has expired or was changed. */
export async function readFlow({ secrets, now }: Core, token: string): Promise<PendingFlow | null> {
  try {
    const { payload } = await jwtVerify<PendingFlow>(token, secrets.signing, {
      algorithms: ['HS256'],
      audience: AUDIENCE,
      currentDate: new Date(now()),
    });
    return payload;
  } catch (error) {
    if (error instanceof errors.JOSEError) return null;
    throw error;
  }
}
