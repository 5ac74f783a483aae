import type { Request } from 'express';
import { answerWithSession, userAgentOf } from '../account/session-answer.ts';
import { accountEndpoints } from '../contract/account.ts';
import { type Api, ANSWERED } from '../http/api.ts';
import { FLOW_COOKIE, flowCookie, readCookie } from '../http/cookies.ts';
import { FLOW_LIFE_S, readFlow, signFlow } from './flow-token.ts';
import type { ProviderClient } from './provider-client.ts';
import { type Refusal, signInByProvider } from './provider-service.ts';

const CALLBACK = '/api/v1/auth/oidc/callback';

/** Sign-in at the OpenID Connect provider. A failure ends on the sign-in page, which says what happened. */
export function providerRoutes(api: Api, provider: ProviderClient): void {
  api.serve(accountEndpoints.startProvider, async ({ core, query, req, res }) => {
    const begun = await provider.begin(`${core.publicUrl()}${CALLBACK}`).catch(reportFailure(req));
    if (begun) {
      const cookie = await signFlow(core, { ...begun.flow, next: query.next });
      res.cookie(FLOW_COOKIE, cookie, flowCookie(core.publicUrl(), FLOW_LIFE_S * 1000));
    }
    res.redirect(302, begun?.url ?? failurePage('PROVIDER_FAILED'));
    return ANSWERED;
  });
  api.serve(accountEndpoints.finishProvider, async ({ core, req, res }) => {
    const cookie = readCookie(req, FLOW_COOKIE);
    res.clearCookie(FLOW_COOKIE, { path: flowCookie(core.publicUrl(), 0).path });
    const pending = cookie ? await readFlow(core, cookie) : null;
    const identity = pending
      ? await provider.finish(new URL(req.originalUrl, core.publicUrl()), pending).catch(reportFailure(req))
      : null;
    const outcome = identity ? await signInByProvider(core, identity, userAgentOf(req)) : 'PROVIDER_FAILED';
    if (typeof outcome === 'string') res.redirect(302, failurePage(outcome));
    else {
      await answerWithSession(core, res, outcome);
      res.redirect(302, pending?.next ?? '/');
    }
    return ANSWERED;
  });
}

function reportFailure(req: Request) {
  return (error: unknown) => {
    req.log.warn({ err: error }, 'sign-in at the provider failed');
    return null;
  };
}

function failurePage(reason: Refusal | 'PROVIDER_FAILED'): string {
  return `/sign-in?problem=${reason}`;
}
