import { type ChildProcess, spawn } from 'node:child_process';
import path from 'node:path';

export type ServerProcess = { child: ChildProcess; address: string };

/**
 * Starts the server as a process of its own, which can be killed.
 *
 * @param dir  data directory, which also holds an `index.html` in place of the studio
 */
export async function startServerProcess(dir: string): Promise<ServerProcess> {
  const child = spawn(process.execPath, ['--import', 'tsx', path.join(import.meta.dirname, '../main.ts')], {
    env: {
      ...process.env,
      NODE_ENV: 'test',
      STUDIO_DIR: dir,
      DATA_DIR: dir,
      DEMO: 'off',
      PORT: '0',
      LOG_LEVEL: 'silent',
    },
    stdio: ['ignore', 'pipe', 'inherit'],
  });
  let stdout = '';
  const address = await new Promise<string>((resolve, reject) => {
    child.stdout.on('data', (chunk: Buffer) => {
      stdout += chunk.toString();
      const found = /Voltiplano: (http:\S+)\n/.exec(stdout)?.[1];
      if (found) resolve(found);
    });
    child.once('exit', () => {
      reject(new Error(`The server did not start: ${stdout}`));
    });
  });
  return { child, address };
}

/** Writes again and again until the server is gone. */
export async function untilKilled(write: () => Promise<void>): Promise<void> {
  for (;;) {
    try {
      await write();
    } catch (error) {
      // fetch rejects with a TypeError when the connection breaks; anything else is a fault of the test.
      if (error instanceof TypeError) return;
      throw error;
    }
  }
}
