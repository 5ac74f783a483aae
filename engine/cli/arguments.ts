import { parseArgs } from 'node:util';

/** A command line that cannot be understood; the message says what and how to mend it. */
export class UsageError extends Error {}

export type Command =
  | { name: 'run'; file: string; json?: string; csv?: string; everyS: number; rtol?: number }
  | { name: 'tune'; file: string; json?: string }
  | { name: 'check'; file: string }
  | { name: 'schema'; of: 'study' | 'sweep' | 'tune' }
  | { name: 'help' };

export const USAGE = `Usage:
  voltiplano run STUDY.json [--json OUT.json|-] [--csv OUT.csv|-] [--every 10] [--rtol 2e-6]
      Runs a study. Without --json or --csv - prints a summary of one screen.
  voltiplano tune REQUEST.json [--json OUT.json|-]
      Finds the fastest taper within the request's bounds. Without --json - prints a summary of one screen.
      Takes seconds to a minute. A request that no taper meets is an answer, not an error.
  voltiplano check STUDY.json
      Says whether a study is valid, and if not what is wrong, where, and the value found.
  voltiplano schema [study|sweep|tune]
      Prints the JSON Schema of study files, of sweep files, or of requests to tune.
  voltiplano sweep SWEEP.json [--json OUT.json|-] [--csv OUT.csv|-] [--jobs N] [--keep FILE]
      Runs a sweep, a sensitivity or a spread on N threads. Progress goes to standard error.
      Finished cells are kept in FILE; started again with the same FILE, it carries on from them.
STUDY.json, SWEEP.json and REQUEST.json may be - for standard input. Exit code 0, or 2 with the error on standard error.
`;

const OPTIONS = {
  json: { type: 'string' },
  csv: { type: 'string' },
  every: { type: 'string' },
  rtol: { type: 'string' },
  help: { type: 'boolean', short: 'h' },
} as const;

/**
 * @throws {UsageError} naming the argument, the rule and the value
 */
export function readArguments(args: string[]): Command {
  const { values, positionals } = parse(args);
  const [name, file, ...rest] = positionals;
  if (values.help || name === undefined || name === 'help') return { name: 'help' };
  if (name === 'schema') return { name, of: schemaOf(file) };
  if (name !== 'run' && name !== 'check' && name !== 'tune')
    throw new UsageError(`Unknown command "${name}": use run, tune, check, schema or sweep.`);
  const what = name === 'tune' ? 'request file' : 'study file';
  if (file === undefined) throw new UsageError(`${name} needs a ${what}, or - for standard input.`);
  if (rest.length > 0) throw new UsageError(`${name} takes one ${what}, but was given ${rest.length + 1}.`);
  if (name === 'check') return { name, file };
  const { json, csv } = values;
  if (name === 'tune') return { name, file, ...(json ? { json } : {}) };
  if (json === '-' && csv === '-') throw new UsageError('--json and --csv cannot both go to standard output.');
  const everyS = values.every === undefined ? 10 : within('--every', values.every, 0.01, 86400);
  const rtol = values.rtol === undefined ? {} : { rtol: within('--rtol', values.rtol, 1e-12, 1e-2) };
  return { name, file, everyS, ...rtol, ...(json ? { json } : {}), ...(csv ? { csv } : {}) };
}

function schemaOf(kind = 'study'): 'study' | 'sweep' | 'tune' {
  if (kind === 'study' || kind === 'sweep' || kind === 'tune') return kind;
  throw new UsageError(`No schema of "${kind}": use study, sweep or tune.`);
}

function parse(args: string[]) {
  try {
    return parseArgs({ args, options: OPTIONS, allowPositionals: true });
  } catch (error) {
    throw new UsageError((error as Error).message);
  }
}

function within(option: string, text: string, least: number, most: number): number {
  const value = Number(text);
  if (text.trim() !== '' && value >= least && value <= most) return value;
  throw new UsageError(`${option} must be a number from ${least} to ${most}, but is "${text}".`);
}
