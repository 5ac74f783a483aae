import type { BodyOf, Endpoint, ParamsOf, SentBodyOf } from '../contract/endpoint.ts';
import { checkAnswer } from './check-answer.ts';

type Options<E extends Endpoint> = {
  params?: ParamsOf<E>;
  query?: Record<string, string>;
  body?: SentBodyOf<E> | BodyOf<E>;
  headers?: Record<string, string>;
};

// Bodies are looked at with matchers; their shape is held against the OpenAPI document.
// eslint-disable-next-line @typescript-eslint/no-explicit-any
export type TestAnswer = { status: number; body: any; headers: Headers; setCookies: string[] };

/** Calls the API as a browser with the studio in it does: it keeps cookies and repeats the CSRF token. */
export class TestBrowser {
  readonly cookies = new Map<string, string>();
  private readonly address: string;

  constructor(address: string) {
    this.address = address;
  }

  /** Calls an endpoint and checks the answer against the OpenAPI document. */
  async call<E extends Endpoint>(endpoint: E, options: Options<E> = {}): Promise<TestAnswer> {
    const { params, query, body, headers = {} } = options;
    const path = endpoint.path.replace(/:(\w+)/g, (_all, name: string) => valueOf(params, name));
    const search = query ? `?${new URLSearchParams(query).toString()}` : '';
    const response = await fetch(`${this.address}/api/v1${path}${search}`, {
      method: endpoint.method.toUpperCase(),
      redirect: 'manual',
      headers: { ...this.ownHeaders(endpoint), ...headers },
      body: body === undefined ? undefined : JSON.stringify(body),
    });
    const text = await response.text();
    const contentType = response.headers.get('content-type') ?? '';
    checkAnswer(endpoint, { status: response.status, contentType, text });
    const setCookies = response.headers.getSetCookie();
    this.keepCookies(setCookies);
    const isJson = contentType.includes('json');
    const parsed: unknown = isJson ? JSON.parse(text) : text;
    return { status: response.status, body: parsed, headers: response.headers, setCookies };
  }

  private ownHeaders({ method }: Endpoint): Record<string, string> {
    const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
    const headers: Record<string, string> = { 'Content-Type': 'application/json', 'User-Agent': 'test browser' };
    if (cookie) headers.Cookie = cookie;
    if (method !== 'get') headers.Origin = this.address;
    const csrf = this.cookies.get('voltiplano_csrf');
    if (csrf) headers['X-CSRF-Token'] = csrf;
    return headers;
  }

  private keepCookies(setCookies: string[]): void {
    for (const line of setCookies) {
      const [pair = ''] = line.split(';');
      const at = pair.indexOf('=');
      const [name, value] = [pair.slice(0, at), pair.slice(at + 1)];
      if (value === '') this.cookies.delete(name);
      else this.cookies.set(name, value);
    }
  }
}

function valueOf(params: object | undefined, name: string): string {
  const value = Object.entries(params ?? {}).find(([key]) => key === name)?.[1] as unknown;
  if (typeof value !== 'string' && typeof value !== 'number') throw new Error(`The path needs ${name}.`);
  return String(value);
}
