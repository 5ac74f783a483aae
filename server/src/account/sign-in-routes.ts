import { accountEndpoints } from '../contract/account.ts';
import type { Api, Call } from '../http/api.ts';
import { clearSessionCookies, readRefreshCookie } from '../http/cookies.ts';
import {
  askReset,
  confirmEmail,
  readMe,
  refresh,
  resetPassword,
  signIn,
  signUp,
  signUpInvited,
} from './account-service.ts';
import { answerWithSession, userAgentOf } from './session-answer.ts';
import { endSession, type OpenedSession, sessionOfRefreshToken } from './session-repository.ts';

/** Signing up, in and out, refreshing, and mailed links. */
export function signInRoutes(api: Api): void {
  api.serve(accountEndpoints.signUp, async (call) =>
    startSession(call, await signUp(call.core, call.body, userAgentOf(call.req))),
  );
  api.serve(accountEndpoints.signUpInvited, async (call) =>
    startSession(call, await signUpInvited(call.core, call.body, userAgentOf(call.req))),
  );
  api.serve(accountEndpoints.signIn, async (call) => {
    const { email, password } = call.body;
    return startSession(call, await signIn(call.core, email, password, userAgentOf(call.req)));
  });
  api.serve(accountEndpoints.refresh, async ({ core, req, res }) => {
    await answerWithSession(core, res, await refresh(core, readRefreshCookie(req)));
  });
  api.serve(accountEndpoints.signOut, async ({ core, req, res }) => {
    const token = readRefreshCookie(req);
    const sessionId = token ? await sessionOfRefreshToken(core, token) : null;
    if (sessionId) await endSession(core, sessionId);
    clearSessionCookies(res);
  });
  api.serve(accountEndpoints.askReset, ({ core, body }) => askReset(core, body.email));
  api.serve(accountEndpoints.resetPassword, ({ core, body }) => resetPassword(core, body.token, body.password));
  api.serve(accountEndpoints.confirmEmail, ({ core, body }) => confirmEmail(core, body.token));
}

async function startSession({ core, res }: Pick<Call<never>, 'core' | 'res'>, session: OpenedSession) {
  await answerWithSession(core, res, session);
  return readMe(core, session.personId);
}
