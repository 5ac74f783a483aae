import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import path from 'node:path';
import type { Timed } from './studies.ts';

/**
 * A C program on SUNDIALS CVODES (Adams, ledgers as quadratures, rows every 10 s) that runs the same two sessions. It is no part
 * of this project: `VOLTIPLANO_ANCHOR_DIR` names the directory where it is installed.
 *
 * Its headers hold the station's ramp at 100 A/s where the study files take the default of 20: the same work, a slightly
 * different result.
 */
const PROGRAMS: Record<Timed, string> = { b1: 'cvode_m1', b12: 'cvode_m12' };
const RUNS = 20;

/** A way to time the program, or a line on why there is none. */
export function findAnchor(): { time: (name: Timed) => number } | { skipped: string } {
  const directory = process.env.VOLTIPLANO_ANCHOR_DIR;
  if (!directory) return { skipped: 'VOLTIPLANO_ANCHOR_DIR names no directory with the C program' };
  const missing = Object.values(PROGRAMS).find((program) => !existsSync(path.join(directory, program)));
  if (missing) return { skipped: `${missing} is not in VOLTIPLANO_ANCHOR_DIR` };
  return { time: (name) => medianMs(path.join(directory, PROGRAMS[name])) };
}

function medianMs(program: string): number {
  const { stdout, status } = spawnSync(program, ['adams', String(RUNS), '10', '1'], { encoding: 'utf8' });
  const ms = Number(/median\s+([\d.]+) ms/.exec(stdout ?? '')?.[1]);
  if (status !== 0 || !(ms > 0)) throw new Error(`${program} did not print its median: ${stdout}`);
  return ms;
}
