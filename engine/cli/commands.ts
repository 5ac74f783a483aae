import { readFileSync, writeFileSync } from 'node:fs';
import {
  parseStudyText,
  runStudy,
  StudyError,
  studyJsonSchema,
  SweepDataError,
  sweepJsonSchema,
  tuneJsonSchema,
} from '../src/index.ts';
import { readArguments, USAGE, UsageError, type Command } from './arguments.ts';
import { checkFile } from './check-file.ts';
import { seriesCsv } from './series-csv.ts';
import { summary } from './summary.ts';
import { tuneFromText, tuneSummary } from './tune-command.ts';

export type Streams = { out: (text: string) => void; err: (text: string) => void };

const FAILED = 2;
const SCHEMAS = { study: studyJsonSchema, sweep: sweepJsonSchema, tune: tuneJsonSchema };

/**
 * Carries one command line out.
 *
 * @returns the exit code: 0, or 2 with the error written to `err`
 */
export function runCommand(args: string[], streams: Streams): number {
  try {
    carryOut(readArguments(args), streams);
    return 0;
  } catch (error) {
    streams.err(`${describeError(error as Error)}\n`);
    return FAILED;
  }
}

function carryOut(command: Command, { out }: Streams): void {
  switch (command.name) {
    case 'help':
      return out(USAGE);
    case 'schema':
      return out(`${JSON.stringify(SCHEMAS[command.of](), null, 2)}\n`);
    case 'check':
      return out(checkFile(read(command.file)));
    case 'run':
      return run(command, out);
    case 'tune':
      return tune(command, out);
  }
}

function run({ file, json, csv, everyS, rtol }: Command & { name: 'run' }, out: Streams['out']): void {
  const study = parseStudyText(read(file));
  const result = runStudy(study, { everyS, ...(rtol === undefined ? {} : { rtol }) });
  if (json !== undefined) write(json, `${JSON.stringify(result)}\n`, out);
  if (csv !== undefined) write(csv, seriesCsv(result), out);
  if (json !== '-' && csv !== '-') out(summary(study, result));
}

function tune({ file, json }: Command & { name: 'tune' }, out: Streams['out']): void {
  const result = tuneFromText(read(file));
  if (json !== undefined) write(json, `${JSON.stringify(result)}\n`, out);
  if (json !== '-') out(tuneSummary(result));
}

function read(file: string): string {
  return readFileSync(file === '-' ? 0 : file, 'utf8');
}

function write(file: string, text: string, out: Streams['out']): void {
  if (file === '-') out(text);
  else writeFileSync(file, text);
}

function isFileError(error: unknown): error is NodeJS.ErrnoException {
  return error instanceof Error && 'syscall' in error;
}

/** An error as the command line writes it. */
export function describeError(error: Error): string {
  if (error instanceof UsageError) return `${error.message}\n\n${USAGE.trimEnd()}`;
  if (isFileError(error)) return `Cannot use ${error.path ?? 'the file'}: ${error.message}`;
  return error instanceof StudyError || error instanceof SweepDataError
    ? error.message
    : `Unexpected: ${error.stack ?? error.message}`;
}
