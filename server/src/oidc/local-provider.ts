import { randomBytes } from 'node:crypto';
import { once } from 'node:events';
import { createServer, type IncomingMessage, type ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import { exportJWK, generateKeyPair } from 'jose';
import { escapeHtml, htmlPage } from '../http/html-page.ts';
import type { ProviderSettings } from '../settings.ts';

export type LocalProvider = { settings: ProviderSettings; close: () => Promise<void> };

/** Longer than a sign-in takes [s]. */
const LIFE_S = 3600;

type Account = { email: string; name: string };

/**
 * An OpenID Connect provider for development and tests, on the loopback interface. It asks for an e-mail and a name and
 * believes both. Loaded only when somebody signs in with it, because its library is large.
 *
 * @param redirectUri  where it sends browsers back to
 */
export async function startLocalProvider(redirectUri: string): Promise<LocalProvider> {
  const server = createServer().listen(0, '127.0.0.1');
  await once(server, 'listening');
  const { port } = server.address() as AddressInfo;
  const settings = {
    issuer: `http://127.0.0.1:${port}`,
    clientId: 'voltiplano',
    clientSecret: randomBytes(24).toString('base64url'),
    name: 'local test provider',
  };
  const provider = await makeProvider(settings, redirectUri);
  const answer = provider.callback();
  server.on('request', (req, res) => {
    if (req.url?.startsWith('/interaction/')) void answerInteraction(provider, req, res);
    else void answer(req, res);
  });
  return {
    settings,
    close: async () => {
      server.closeAllConnections();
      await new Promise((resolve) => server.close(resolve));
    },
  };
}

type Provider = Awaited<ReturnType<typeof makeProvider>>;

async function makeProvider({ issuer, clientId, clientSecret }: ProviderSettings, redirectUri: string) {
  const { default: OidcProvider } = await import('oidc-provider');
  const { privateKey } = await generateKeyPair('RS256', { extractable: true });
  return new OidcProvider(issuer, {
    clients: [
      {
        client_id: clientId,
        client_secret: clientSecret,
        redirect_uris: [redirectUri],
        grant_types: ['authorization_code'],
        response_types: ['code'],
      },
    ],
    claims: { openid: ['sub'], email: ['email', 'email_verified'], profile: ['name'] },
    jwks: { keys: [{ ...(await exportJWK(privateKey)), alg: 'RS256', use: 'sig' }] },
    cookies: { keys: [randomBytes(24).toString('base64url')] },
    ttl: { Interaction: LIFE_S, Session: LIFE_S, Grant: LIFE_S, AccessToken: LIFE_S, IdToken: LIFE_S },
    features: { devInteractions: { enabled: false } },
    interactions: { url: (_ctx, { uid }) => `/interaction/${uid}` },
    findAccount: (_ctx, accountId) => ({
      accountId,
      claims: () => ({ sub: accountId, email_verified: true, ...readAccount(accountId) }),
    }),
    // Nobody needs to consent to what they do to themselves.
    loadExistingGrant: async ({ oidc }) => {
      const grant = new oidc.provider.Grant({ clientId: oidc.client?.clientId, accountId: oidc.session?.accountId });
      grant.addOIDCScope('openid email profile');
      await grant.save();
      return grant;
    },
  });
}

async function answerInteraction(provider: Provider, req: IncomingMessage, res: ServerResponse): Promise<void> {
  try {
    if (req.method === 'POST') {
      const form = new URLSearchParams(await readBody(req));
      const account = { email: form.get('email') ?? '', name: form.get('name') ?? '' };
      await provider.interactionFinished(req, res, { login: { accountId: writeAccount(account) } });
    } else {
      res.setHeader('Content-Type', 'text/html; charset=utf-8').end(signInPage());
    }
  } catch (error) {
    res.statusCode = 400;
    res.end(escapeHtml(String(error)));
  }
}

function signInPage(): string {
  return htmlPage(
    'Local test provider',
    `<p>This page stands in for a company's sign-in while Voltiplano is developed. It believes what you type.</p>
<form method="post"><p><label>E-mail <input name="email" type="email" required></label></p>
<p><label>Name <input name="name" required></label></p><p><button>Sign in</button></p></form>`,
  );
}

async function readBody(req: IncomingMessage): Promise<string> {
  const chunks: Buffer[] = [];
  for await (const chunk of req) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks).toString('utf8');
}

/** The account is its own id: the provider keeps nothing. */
function writeAccount({ email, name }: Account): string {
  return Buffer.from(JSON.stringify([email, name])).toString('base64url');
}

function readAccount(accountId: string): Account {
  const [email = '', name = ''] = JSON.parse(Buffer.from(accountId, 'base64url').toString('utf8')) as string[];
  return { email, name };
}
