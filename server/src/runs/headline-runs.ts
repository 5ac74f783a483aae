import { readFileSync } from 'node:fs';
import path from 'node:path';
import { Worker } from 'node:worker_threads';
import type { Headline, StudyFile } from '../contract/study.ts';
import { failedHeadline } from './compute-headline.ts';

/** A hundred times what a usual session takes [ms]. */
const TIME_LIMIT_MS = 20_000;

/** Version of the engine that makes the headlines. */
export const engineVersion = (
  JSON.parse(readFileSync(path.join(import.meta.dirname, '../../../engine/package.json'), 'utf8')) as {
    version: string;
  }
).version;

type Options = {
  /** How long a run may take before its thread is replaced [ms]. */
  timeLimitMs?: number;
  /** Starts a thread that answers each study with its headline. */
  startThread?: () => Worker;
};

type RunUnderWay = { answer: (headline: Headline) => void; stop: (reason: Error) => void };

/** The engine, working beside the server: one run after another on a thread that starts with the first. */
export class HeadlineRuns {
  private readonly timeLimitMs: number;
  private readonly startThread: () => Worker;
  private queue: Promise<unknown> = Promise.resolve();
  private thread: Worker | null = null;
  private underWay: RunUnderWay | null = null;
  private isClosed = false;

  constructor({ timeLimitMs = TIME_LIMIT_MS, startThread = start }: Options = {}) {
    this.timeLimitMs = timeLimitMs;
    this.startThread = startThread;
  }

  /**
   * Runs a study after those that were asked for before. Whatever goes wrong with the run stands in its headline.
   *
   * @throws once the runs are closed
   */
  headlineOf(inputs: StudyFile): Promise<Headline> {
    const turn = this.queue.then(() => this.run(inputs));
    this.queue = turn.catch(() => undefined);
    return turn;
  }

  /** Ends the thread. The run under way and those that wait are rejected. */
  async close(): Promise<void> {
    this.isClosed = true;
    const { thread, underWay } = this;
    this.thread = null;
    underWay?.stop(closed());
    await thread?.terminate();
  }

  private run(inputs: StudyFile): Promise<Headline> {
    if (this.isClosed) throw closed();
    const thread = (this.thread ??= this.openThread());
    // Only a run keeps the process alive, not a thread at rest.
    thread.ref();
    return new Promise((resolve, reject) => {
      const settle = (outcome: () => void) => {
        clearTimeout(timer);
        this.underWay = null;
        thread.unref();
        outcome();
      };
      this.underWay = {
        answer: (headline) => {
          settle(() => {
            resolve(headline);
          });
        },
        stop: (reason) => {
          settle(() => {
            reject(reason);
          });
        },
      };
      const timer = setTimeout(() => {
        this.lose(thread, `The run took longer than ${this.timeLimitMs / 1000} s and was stopped.`);
        void thread.terminate();
      }, this.timeLimitMs);
      thread.postMessage(inputs);
    });
  }

  private openThread(): Worker {
    const thread = this.startThread();
    thread.on('message', (headline: Headline) => {
      if (this.thread === thread) this.underWay?.answer(headline);
    });
    thread.on('error', (error) => {
      this.lose(thread, `The run broke down: ${error instanceof Error ? error.message : String(error)}`);
    });
    thread.on('exit', (code) => {
      this.lose(thread, `The run broke down: its thread ended with ${code}.`);
    });
    return thread;
  }

  /** Drops a thread; the next run starts another. */
  private lose(thread: Worker, failure: string): void {
    if (this.thread !== thread) return;
    this.thread = null;
    this.underWay?.answer(failedHeadline(failure, engineVersion));
  }
}

function closed(): Error {
  return new Error('The server is closing.');
}

function start(): Worker {
  return new Worker(new URL('./headline-thread.mjs', import.meta.url), { workerData: engineVersion });
}
