import { readFileSync, writeFileSync } from 'node:fs';
import { availableParallelism } from 'node:os';
import { parseArgs } from 'node:util';
import { parseSweepText, runCells, type SweepPlan, type SweepResult } from '../src/index.ts';
import { createSessionClient, createSweepRun, type ChunkRunner, type SweepRunOptions } from '../worker/index.ts';
import { bundleSessionWorker, startNodeWorker } from '../worker/node-worker.ts';
import { UsageError } from './arguments.ts';
import { describeError, type Streams } from './commands.ts';
import { keptIn } from './kept-sweep.ts';
import { progressTeller } from './sweep-progress.ts';
import { sweepCsv, sweepJson } from './sweep-output.ts';
import { sweepSummary } from './sweep-summary.ts';

const OPTIONS = {
  json: { type: 'string' },
  csv: { type: 'string' },
  jobs: { type: 'string' },
  keep: { type: 'string' },
} as const;
/** Up to here starting threads takes longer than they save. */
const FEW_CELLS = 200;
const MOST_JOBS = 256;

type SweepArguments = { file: string; json?: string; csv?: string; jobs?: number; keep?: string };

/**
 * Carries `voltiplano sweep …` out; progress goes to `err`.
 *
 * @param args  what follows `sweep`
 * @returns     the exit code: 0 (cells may have failed, the output says why), or 2 with the error written to `err`
 */
export async function sweepCommand(args: string[], streams: Streams): Promise<number> {
  try {
    const { file, json, csv, jobs, keep } = readSweepArguments(args);
    const plan = parseSweepText(readFileSync(file === '-' ? 0 : file, 'utf8'));
    const progress = progressTeller(streams.err);
    const options = keep === undefined ? { onProgress: progress } : keptIn(keep, plan, progress);
    const result = await runAll(plan, jobs ?? (plan.size <= FEW_CELLS ? 1 : availableParallelism()), options);
    if (json !== undefined) write(json, sweepJson(result), streams);
    if (csv !== undefined) write(csv, sweepCsv(result), streams);
    if (json !== '-' && csv !== '-') streams.out(sweepSummary(result));
    return 0;
  } catch (error) {
    streams.err(`${describeError(error as Error)}\n`);
    return 2;
  }
}

function readSweepArguments(args: string[]): SweepArguments {
  const { values, positionals } = parse(args);
  const [file, ...rest] = positionals;
  if (file === undefined) throw new UsageError('sweep needs a sweep file, or - for standard input.');
  if (rest.length > 0) throw new UsageError(`sweep takes one sweep file, but was given ${rest.length + 1}.`);
  const { json, csv, jobs, keep } = values;
  if (json === '-' && csv === '-') throw new UsageError('--json and --csv cannot both go to standard output.');
  return { file, json, csv, keep, ...(jobs === undefined ? {} : { jobs: wholeJobs(jobs) }) };
}

function wholeJobs(text: string): number {
  const jobs = Number(text);
  if (text.trim() !== '' && Number.isInteger(jobs) && jobs >= 1 && jobs <= MOST_JOBS) return jobs;
  throw new UsageError(`--jobs must be a whole number from 1 to ${MOST_JOBS}, but is "${text}".`);
}

function parse(args: string[]) {
  try {
    return parseArgs({ args, options: OPTIONS, allowPositionals: true });
  } catch (error) {
    throw new UsageError((error as Error).message);
  }
}

function write(file: string, text: string, { out }: Streams): void {
  if (file === '-') out(text);
  else writeFileSync(file, text);
}

async function runAll(plan: SweepPlan, jobs: number, options: SweepRunOptions): Promise<SweepResult> {
  if (jobs === 1) return createSweepRun(inProcess, plan, options).finished;
  const program = await bundleSessionWorker();
  const client = createSessionClient(() => startNodeWorker(program), jobs);
  try {
    return await client.sweep(plan, options).finished;
  } finally {
    client.close();
  }
}

/** Runs chunks in this thread, one after another. */
const inProcess: ChunkRunner = {
  lanes: 1,
  run: (plan, indices) => ({
    result: new Promise((resolve) => {
      setImmediate(() => {
        const began = performance.now();
        const chunk = runCells(plan, indices);
        resolve({ ...chunk, ms: performance.now() - began });
      });
    }),
    cancel: () => {},
  }),
};
