import { parentPort, workerData } from 'node:worker_threads';
import { computeHeadline } from './compute-headline.ts';

// One study in, one headline out; an error nobody foresaw ends the thread.
parentPort?.on('message', (inputs: unknown) => {
  parentPort?.postMessage(computeHeadline(inputs, String(workerData)));
});
