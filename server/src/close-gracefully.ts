import type { Server } from 'node:http';

/**
 * Stops taking requests and waits for those under way.
 *
 * @param patienceMs  after this long [ms] the connections still open are cut
 * @returns           whether every request was answered
 */
export async function closeGracefully(server: Server, patienceMs: number): Promise<boolean> {
  let answeredAll = true;
  const closed = new Promise<void>((resolve, reject) => {
    server.close((error) => {
      if (error) reject(error);
      else resolve();
    });
  });
  // A browser keeps its connection after the answer; each is closed as soon as it is idle.
  const idle = setInterval(() => {
    server.closeIdleConnections();
  }, 50);
  const timer = setTimeout(() => {
    answeredAll = false;
    server.closeAllConnections();
  }, patienceMs);
  await closed;
  clearInterval(idle);
  clearTimeout(timer);
  return answeredAll;
}
