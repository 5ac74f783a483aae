import type { Request, Response } from 'express';
import type { Core } from '../core.ts';
import { setSessionCookies } from '../http/cookies.ts';
import { csrfTokenOf } from '../http/same-site.ts';
import { signAccessToken } from './access-token.ts';
import { type OpenedSession, SESSION_LIFE_MS } from './session-repository.ts';

/** Gives the browser the cookies of a session. */
export async function answerWithSession(core: Core, res: Response, session: OpenedSession): Promise<void> {
  setSessionCookies(res, core.publicUrl(), {
    accessToken: await signAccessToken(core, session),
    refreshToken: session.refreshToken,
    csrfToken: csrfTokenOf(core.secrets, session.sessionId),
    lifeMs: SESSION_LIFE_MS,
  });
}

/** What the browser calls itself. */
export function userAgentOf(req: Request): string {
  return req.get('user-agent') ?? '';
}
