import compression from 'compression';
import express, { type Express } from 'express';
import { accountRoutes } from '../account/account-routes.ts';
import { signInRoutes } from '../account/sign-in-routes.ts';
import { apiTokenRoutes } from '../api-tokens/api-token-routes.ts';
import { accountEndpoints } from '../contract/account.ts';
import type { Core } from '../core.ts';
import { healthRoutes } from '../health/health-routes.ts';
import { libraryRoutes } from '../library/library-routes.ts';
import type { LocalMailServer } from '../mail/local-mail-server.ts';
import { mailboxRoutes } from '../mail/mailbox-routes.ts';
import type { ProviderClient } from '../oidc/provider-client.ts';
import { providerRoutes } from '../oidc/provider-routes.ts';
import { openApiRoutes } from '../openapi/openapi-routes.ts';
import { studyRoutes } from '../studies/study-routes.ts';
import { invitationRoutes, workspaceRoutes } from '../workspaces/workspace-routes.ts';
import { Api } from './api.ts';
import { answerProblem, notFound } from './problem.ts';
import type { RateLimits } from './rate-limits.ts';
import { requestLog } from './request-log.ts';
import type { Site } from './same-site.ts';
import { securityHeaders } from './security-headers.ts';
import { studioFiles } from './studio-files.ts';

export type AppDeps = {
  /** Absolute path of the built studio. */
  studioDir: string;
  version: string;
  core: Core;
  /** Clock [ms] that never runs backwards. */
  nowMs: () => number;
  site: Site;
  rateLimits: RateLimits;
  /** How many reverse proxies stand before the server. */
  trustedProxies: number;
  /** Its mails can be read; null where mails go out. */
  mailServer: LocalMailServer | null;
  /** null: no sign-in at a provider. */
  provider: ProviderClient | null;
};

/** Makes the application. It never listens: `main.ts` and tests do. */
export function createApp(deps: AppDeps): Express {
  const { studioDir, version, core, nowMs, trustedProxies } = deps;
  const app = express();
  app.set('trust proxy', trustedProxies);
  app.use(requestLog(core.logger), securityHeaders(), compression());
  app.use('/api', healthRoutes(version, nowMs, core.db), openApiRoutes(version));
  app.use('/api/v1', apiRoutes(deps));
  app.use('/api', notFound);
  app.use(studioFiles(studioDir));
  app.use(notFound);
  app.use(answerProblem);
  return app;
}

function apiRoutes({ core, site, rateLimits, mailServer, provider }: AppDeps) {
  const api = new Api({ core, site, rateLimits });
  api.serve(accountEndpoints.signInOptions, () => ({
    provider: provider ? { name: provider.name, startUrl: '/api/v1/auth/oidc/start' } : null,
    mailboxUrl: mailServer ? '/api/v1/dev/mailbox' : null,
  }));
  signInRoutes(api);
  accountRoutes(api);
  workspaceRoutes(api);
  invitationRoutes(api);
  apiTokenRoutes(api);
  libraryRoutes(api);
  studyRoutes(api);
  if (provider) providerRoutes(api, provider);
  if (mailServer) mailboxRoutes(api, mailServer);
  return api.router;
}
