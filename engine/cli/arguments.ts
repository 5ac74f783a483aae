import { parseArgs } from 'node:util';

/** A command line that cannot be understood; the message says what and how to mend it. */
export class UsageError extends Error {}

export type Command =
  | { name: 'run'; file: string; json?: string; csv?: string; everyS: number; rtol?: number }
  | { name: 'check'; file: string }
  | { name: 'schema'; of: 'study' | 'sweep' }
  | { name: 'help' };

export const USAGE = `Usage:
  voltiplano run STUDY.json [--json OUT.json|-] [--csv OUT.csv|-] [--every 10] [--rtol 2e-6]
      Runs a study. Without --json or --csv - prints a summary of one screen.
  voltiplano check STUDY.json
      Says whether a study is valid, and if not what is wrong, where, and the value found.
  voltiplano schema [study|sweep]
      Prints the JSON Schema of study files, or of sweep files.
  voltiplano sweep SWEEP.json [--json OUT.json|-] [--csv OUT.csv|-] [--jobs N]
      Runs a sweep, a sensitivity or a spread on N threads. Progress goes to standard error.
STUDY.json may be - for standard input. Exit code 0, or 2 with the error on standard error.
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
  if (name !== 'run' && name !== 'check')
    throw new UsageError(`Unknown command "${name}": use run, check, schema or sweep.`);
  if (file === undefined) throw new UsageError(`${name} needs a study file, or - for standard input.`);
  if (rest.length > 0) throw new UsageError(`${name} takes one study file, but was given ${rest.length + 1}.`);
  if (name === 'check') return { name, file };
  const { json, csv } = values;
  if (json === '-' && csv === '-') throw new UsageError('--json and --csv cannot both go to standard output.');
  const everyS = values.every === undefined ? 10 : within('--every', values.every, 0.01, 86400);
  const rtol = values.rtol === undefined ? {} : { rtol: within('--rtol', values.rtol, 1e-12, 1e-2) };
  return { name, file, everyS, ...rtol, ...(json ? { json } : {}), ...(csv ? { csv } : {}) };
}

function schemaOf(kind = 'study'): 'study' | 'sweep' {
  if (kind === 'study' || kind === 'sweep') return kind;
  throw new UsageError(`No schema of "${kind}": use study or sweep.`);
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
