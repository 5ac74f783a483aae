import { apiTokenEndpoints } from '../contract/api-token.ts';
import type { Api } from '../http/api.ts';
import { listApiTokens } from './api-token-repository.ts';
import { createApiToken, revokeApiToken } from './api-token-service.ts';

/** Tokens for scripts. */
export function apiTokenRoutes(api: Api): void {
  api.serve(apiTokenEndpoints.listApiTokens, async ({ core, access }) => ({
    items: await listApiTokens(core, access),
  }));
  api.serve(apiTokenEndpoints.createApiToken, ({ core, access, body }) => createApiToken(core, access, body));
  api.serve(apiTokenEndpoints.revokeApiToken, ({ core, access, params }) =>
    revokeApiToken(core, access, params.tokenId),
  );
}
