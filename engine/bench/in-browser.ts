import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { chromium } from '@playwright/test';
import { build } from 'esbuild';
import type { Timed } from './studies.ts';

const SYSTEM_CHROMIUM = '/usr/bin/chromium';
const FLAGS = ['--no-sandbox', '--disable-gpu', '--disable-quic', '--no-first-run', '--disable-background-networking'];

/** Milliseconds per run in a worker of Chromium, of study files by name; the bundle lives in a temporary directory. */
export async function timeInBrowser(studies: Record<Timed, unknown>): Promise<Record<Timed, number>> {
  const directory = mkdtempSync(path.join(tmpdir(), 'voltiplano-bench-'));
  const outfile = path.join(directory, 'worker.js');
  const entry = path.join(import.meta.dirname, 'in-browser-worker.ts');
  await build({ entryPoints: [entry], outfile, bundle: true, format: 'esm', target: 'es2022', minify: true });
  const server = await serve(outfile);
  const executablePath = [process.env.CHROMIUM_PATH, SYSTEM_CHROMIUM].find((file) => file && existsSync(file));
  const browser = await chromium.launch({ executablePath, args: FLAGS });
  try {
    const page = await browser.newPage();
    await page.goto(`http://127.0.0.1:${(server.address() as AddressInfo).port}/`);
    const time = (study: unknown) => page.evaluate(runInWorker, study);
    return { b1: await time(studies.b1), b12: await time(studies.b12) };
  } finally {
    await browser.close();
    server.close();
    rmSync(directory, { recursive: true, force: true });
  }
}

function serve(workerFile: string): Promise<Server> {
  const server = createServer((request, response) => {
    if (request.url === '/worker.js')
      response.setHeader('content-type', 'text/javascript').end(readFileSync(workerFile));
    else response.setHeader('content-type', 'text/html').end('<!doctype html><title>Bench</title>');
  });
  return new Promise((resolve) => server.listen(0, '127.0.0.1', () => resolve(server)));
}

/** Runs in the page. */
function runInWorker(study: unknown): Promise<number> {
  return new Promise((resolve, reject) => {
    const worker = new Worker('/worker.js', { type: 'module' });
    worker.onmessage = ({ data }) => resolve(data as number);
    worker.onerror = ({ message }) => reject(new Error(message));
    worker.postMessage(study);
  });
}
