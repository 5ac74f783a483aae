import { Worker as Thread } from 'node:worker_threads';
import nodeEndpoint from 'comlink/dist/esm/node-adapter.mjs';
import { build } from 'esbuild';

// A browser's worker speaks through its global object; in a thread of Node that is the port to its parent.
const SESSION_WORKER = `
  import { parentPort } from 'node:worker_threads';
  import nodeEndpoint from 'comlink/dist/esm/node-adapter.mjs';
  Object.assign(globalThis, nodeEndpoint(parentPort));
  require('./session-worker.ts');
`;

/** The session worker as one program for a thread of Node. */
export async function bundleSessionWorker(): Promise<string> {
  const { outputFiles } = await build({
    stdin: { contents: SESSION_WORKER, resolveDir: import.meta.dirname, loader: 'ts' },
    bundle: true,
    format: 'cjs',
    platform: 'node',
    mainFields: ['module', 'main'],
    write: false,
  });
  return outputFiles[0].text;
}

/**
 * A thread of Node that looks to the pool like a browser's worker. A thread that ends by an uncaught error
 * says so by an `error` event, as a browser's does.
 *
 * @param program  plain JavaScript of a CommonJS module
 */
export function startNodeWorker(program: string): Worker {
  const thread = new Thread(program, { eval: true });
  const endpoint = nodeEndpoint(thread);
  const errors = new EventTarget();
  thread.on('error', (error) => errors.dispatchEvent(Object.assign(new Event('error'), { message: error.message })));
  thread.on('messageerror', () => errors.dispatchEvent(new Event('messageerror')));
  const worker: Pick<Worker, 'postMessage' | 'addEventListener' | 'removeEventListener' | 'terminate'> = {
    postMessage: (message: unknown, transfer?: unknown) => endpoint.postMessage(message, transfer as Transferable[]),
    addEventListener: (type: string, listener: EventListenerOrEventListenerObject) =>
      (type === 'message' ? endpoint : errors).addEventListener(type, listener),
    removeEventListener: (type: string, listener: EventListenerOrEventListenerObject) =>
      (type === 'message' ? endpoint : errors).removeEventListener(type, listener),
    terminate: () => void thread.terminate(),
  };
  return worker as Worker;
}
