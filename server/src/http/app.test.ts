import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pino } from 'pino';
import request from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openDatabase } from '../db/database.ts';
import { startTestServer, type TestServer } from '../testing/test-server.ts';
import { createApp } from './app.ts';

let studioDir: string;
let nowMs = 0;
let logged: string[] = [];
let server: TestServer;

const INDEX = '<!doctype html><title>Voltiplano</title>';
const HTML = 'text/html,application/xhtml+xml,*/*;q=0.8';

function app(clock = () => nowMs) {
  const logger = pino({ level: 'info' }, { write: (line: string) => void logged.push(line) });
  return createApp({ ...server.appDeps, studioDir, core: { ...server.core, logger }, nowMs: clock });
}

beforeAll(async () => {
  server = await startTestServer();
  studioDir = mkdtempSync(path.join(tmpdir(), 'voltiplano-studio-'));
  mkdirSync(path.join(studioDir, 'assets'));
  writeFileSync(path.join(studioDir, 'index.html'), INDEX);
  writeFileSync(path.join(studioDir, 'mark.svg'), '<svg xmlns="http://www.w3.org/2000/svg"/>');
  writeFileSync(path.join(studioDir, 'assets/desk-1a2b3c.js'), 'export {};');
  writeFileSync(path.join(studioDir, '.secret'), 'no');
});

afterAll(async () => {
  rmSync(studioDir, { recursive: true });
  await server.close();
});

describe('GET /api/health', () => {
  it('answers status, version and uptime in seconds, and is not cached', async () => {
    nowMs = 1000;
    const running = app();
    nowMs = 3500;
    const res = await request(running).get('/api/health').expect(200);
    expect(res.body).toEqual({ status: 'ok', version: '1.2.3', uptimeS: 2.5 });
    expect(res.headers['cache-control']).toBe('no-store');
  });
});

describe('GET /api/ready', () => {
  it('answers once every migration is applied', async () => {
    const res = await request(app()).get('/api/ready').expect(200);
    expect(res.body).toEqual({ status: 'ready' });
  });

  it('answers a problem on a database without its schema, and on one that is closed', async () => {
    const empty = openDatabase(':memory:');
    const deps = { ...server.appDeps, studioDir, core: { ...server.core, db: empty } };
    const before = await request(createApp(deps)).get('/api/ready').expect(503);
    expect(JSON.parse(before.text)).toMatchObject({ code: 'NOT_READY' });
    await empty.destroy();
    await request(createApp(deps)).get('/api/ready').expect(503);
  });
});

describe('the studio', () => {
  it('serves hashed assets for a year, unchanging', async () => {
    const res = await request(app()).get('/assets/desk-1a2b3c.js').expect(200);
    expect(res.headers['cache-control']).toBe('public, max-age=31536000, immutable');
    expect(res.headers['content-type']).toContain('javascript');
  });

  it('packs a large script on the wire where the browser takes it packed', async () => {
    const script = `export const text = '${'charge '.repeat(2000)}';`;
    writeFileSync(path.join(studioDir, 'assets/large-4d5e6f.js'), script);
    const res = await request(app()).get('/assets/large-4d5e6f.js').set('Accept-Encoding', 'gzip').expect(200);
    expect(res.headers['content-encoding']).toBe('gzip');
    expect(res.headers['vary']).toContain('Accept-Encoding');
    const plain = await request(app()).get('/assets/large-4d5e6f.js').set('Accept-Encoding', 'identity').expect(200);
    expect(plain.headers['content-encoding']).toBeUndefined();
    expect(plain.headers['content-length']).toBe(String(script.length));
  });

  it('serves files without a hash to be asked for anew', async () => {
    const res = await request(app()).get('/mark.svg').expect(200);
    expect(res.headers['cache-control']).toBe('no-cache');
  });

  it.each(['/', '/index.html', '/try', '/studies/7?tab=log'])('answers a page for %s', async (address) => {
    const res = await request(app()).get(address).set('Accept', HTML).expect(200);
    expect(res.text).toBe(INDEX);
    expect(res.headers['cache-control']).toBe('no-cache');
  });

  it('answers no page where a script or an image is missing', async () => {
    await request(app()).get('/assets/gone-9f.js').set('Accept', '*/*').expect(404);
    await request(app()).get('/assets/gone-9f.js').set('Accept', HTML).expect(404);
    await request(app()).get('/gone.png').set('Accept', 'image/*').expect(404);
  });

  it('answers no page to other methods', async () => {
    await request(app()).post('/try').set('Accept', HTML).expect(404);
  });

  it('keeps what lies outside, and hidden files', async () => {
    await request(app()).get('/.secret').set('Accept', '*/*').expect(404);
    await request(app()).get('/..%2f..%2fetc%2fpasswd').set('Accept', '*/*').expect(404);
  });
});

describe('problems', () => {
  it('answers RFC 9457 problems for an unknown address under /api, also to a browser', async () => {
    const res = await request(app()).get('/api/nothing').set('Accept', HTML).expect(404);
    expect(res.headers['content-type']).toContain('application/problem+json');
    expect(JSON.parse(res.text)).toEqual({
      type: 'about:blank',
      title: 'Not Found',
      status: 404,
      detail: 'Nothing answers GET /api/nothing.',
      code: 'NOT_FOUND',
      requestId: res.headers['x-request-id'],
    });
  });

  it('keeps the status of a client mistake found by the file server', async () => {
    const res = await request(app()).get('/assets/desk-1a2b3c.js').set('Range', 'bytes=9000-').expect(416);
    expect(res.headers['content-type']).toContain('application/problem+json');
    expect(JSON.parse(res.text)).toMatchObject({ code: 'BAD_REQUEST', status: 416, title: 'Range Not Satisfiable' });
    expect(res.headers['cache-control']).toBe('no-store');
  });

  it('finds nothing at an address that cannot be decoded', async () => {
    await request(app()).get('/%E0%A4%A').set('Accept', '*/*').expect(404);
    await request(app()).get('/api/%E0%A4%A').expect(404);
  });

  it('hides the text of an unforeseen error and logs it under the request id', async () => {
    logged = [];
    const broken = app(failsAfterStart());
    const res = await request(broken).get('/api/health').expect(500);
    expect(res.text).not.toContain('clock stopped');
    expect(JSON.parse(res.text)).toMatchObject({ code: 'INTERNAL', status: 500 });
    const line = logged.find((entry) => entry.includes('clock stopped'));
    expect(line).toContain(res.headers['x-request-id']);
  });

  it('gives each request an id of its own, whatever the client sends', async () => {
    const one = await request(app()).get('/api/health').set('X-Request-Id', 'mine');
    const two = await request(app()).get('/api/health').set('X-Request-Id', 'mine');
    expect(one.headers['x-request-id']).not.toBe('mine');
    expect(one.headers['x-request-id']).not.toBe(two.headers['x-request-id']);
  });
});

describe('security headers', () => {
  it.each(['/', '/api/health', '/api/nothing', '/assets/desk-1a2b3c.js'])('stand on %s', async (address) => {
    const res = await request(app()).get(address).set('Accept', HTML);
    expect(res.headers['content-security-policy']).toBe(
      "default-src 'self';script-src 'self';style-src 'self' 'unsafe-inline';img-src 'self' data: blob:;font-src 'self';" +
        "connect-src 'self';worker-src 'self';object-src 'none';base-uri 'self';frame-ancestors 'none';form-action 'self'",
    );
    expect(res.headers['x-content-type-options']).toBe('nosniff');
    expect(res.headers['referrer-policy']).toBe('no-referrer');
    expect(res.headers['x-powered-by']).toBeUndefined();
  });
});

/** A clock that can be read once, when the application is made. */
function failsAfterStart(): () => number {
  let reads = 0;
  return () => {
    reads += 1;
    if (reads > 1) throw new Error('clock stopped');
    return 0;
  };
}
