import { once } from 'node:events';
import { createServer, type RequestListener } from 'node:http';
import type { AddressInfo } from 'node:net';
import { describe, expect, it } from 'vitest';
import { closeGracefully } from './close-gracefully.ts';

async function serve(listener: RequestListener) {
  const server = createServer(listener).listen(0);
  await once(server, 'listening');
  return { server, address: `http://localhost:${(server.address() as AddressInfo).port}` };
}

describe('closeGracefully', () => {
  it('lets a request under way finish, and does not wait for its connection to time out', async () => {
    const { server, address } = await serve((_req, res) => void setTimeout(() => res.end('whole'), 100));
    const arrived = once(server, 'request');
    const answer = fetch(address).then((res) => res.text());
    await arrived;
    const beganMs = performance.now();
    expect(await closeGracefully(server, 4000)).toBe(true);
    // Node keeps an idle connection for 5 s.
    expect(performance.now() - beganMs).toBeLessThan(2000);
    expect(await answer).toBe('whole');
  });

  it('cuts a request that never ends', async () => {
    const { server, address } = await serve(() => undefined);
    const arrived = once(server, 'request');
    const cut = expect(fetch(address)).rejects.toThrow();
    await arrived;
    expect(await closeGracefully(server, 50)).toBe(false);
    await cut;
  });

  it('takes no new request', async () => {
    const { server, address } = await serve((_req, res) => res.end('late'));
    await closeGracefully(server, 1000);
    await expect(fetch(address)).rejects.toThrow();
  });
});
