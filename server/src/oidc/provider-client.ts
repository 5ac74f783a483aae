import {
  allowInsecureRequests,
  authorizationCodeGrant,
  buildAuthorizationUrl,
  calculatePKCECodeChallenge,
  type Configuration,
  discovery,
  fetchUserInfo,
  randomNonce,
  randomPKCECodeVerifier,
  randomState,
} from 'openid-client';
import type { ProviderSettings } from '../settings.ts';

/** What must be remembered between leaving for the provider and coming back. */
export type Flow = { state: string; nonce: string; verifier: string };

/** Who the provider says has signed in. */
export type ProvenIdentity = {
  issuer: string;
  subject: string;
  email: string | null;
  isEmailVerified: boolean;
  name: string | null;
};

/** Sign-in at an OpenID Connect provider: authorization code with PKCE, state and nonce. */
export type ProviderClient = {
  name: string;
  /** Address to send the browser to. */
  begin: (redirectUri: string) => Promise<{ url: string; flow: Flow }>;
  /** Checks what came back. @throws if the provider refused or anything does not fit */
  finish: (currentUrl: URL, flow: Flow) => Promise<ProvenIdentity>;
};

const SCOPE = 'openid email profile';

/**
 * @param name      what the button says
 * @param settings  found, or started, when somebody first signs in: the server also starts while the provider is away
 */
export function providerClient(name: string, settings: () => Promise<ProviderSettings>): ProviderClient {
  let known: Promise<Configuration> | undefined;
  const configuration = () => {
    known ??= discover(settings).catch((error: unknown) => {
      known = undefined;
      throw error;
    });
    return known;
  };
  return {
    name,
    begin: async (redirectUri) => beginFlow(await configuration(), redirectUri),
    finish: async (currentUrl, flow) => finishFlow(await configuration(), currentUrl, flow),
  };
}

async function discover(settings: () => Promise<ProviderSettings>): Promise<Configuration> {
  const { issuer, clientId, clientSecret } = await settings();
  const url = new URL(issuer);
  const isLoopback = ['localhost', '127.0.0.1', '[::1]'].includes(url.hostname);
  // Without TLS only to this machine itself, where the local provider of development listens.
  const execute = url.protocol === 'http:' && isLoopback ? [allowInsecureRequests] : [];
  return discovery(url, clientId, clientSecret, undefined, { execute });
}

async function beginFlow(configuration: Configuration, redirectUri: string): Promise<{ url: string; flow: Flow }> {
  const flow = { state: randomState(), nonce: randomNonce(), verifier: randomPKCECodeVerifier() };
  const url = buildAuthorizationUrl(configuration, {
    redirect_uri: redirectUri,
    scope: SCOPE,
    state: flow.state,
    nonce: flow.nonce,
    code_challenge: await calculatePKCECodeChallenge(flow.verifier),
    code_challenge_method: 'S256',
  });
  return { url: url.href, flow };
}

async function finishFlow(configuration: Configuration, currentUrl: URL, flow: Flow): Promise<ProvenIdentity> {
  const tokens = await authorizationCodeGrant(configuration, currentUrl, {
    pkceCodeVerifier: flow.verifier,
    expectedState: flow.state,
    expectedNonce: flow.nonce,
    idTokenExpected: true,
  });
  const claims = tokens.claims();
  if (!claims) throw new Error('The provider sent no ID token.');
  const info = await fetchUserInfo(configuration, tokens.access_token, claims.sub);
  return {
    issuer: claims.iss,
    subject: claims.sub,
    email: info.email?.toLowerCase() ?? null,
    isEmailVerified: info.email_verified === true,
    name: info.name ?? null,
  };
}
