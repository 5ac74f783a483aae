/**
 * What a session costs. `npm run bench` times two sessions of 47 minutes with ledges, two RC pairs, two nodes and every guard on,
 * beside a C program where one is installed; `-- --browser` adds a worker in Chromium; `-- --json FILE` writes the numbers;
 * `-- --turns 40` takes more turns than 15.
 */
import { writeFileSync } from 'node:fs';
import { parseArgs } from 'node:util';
import { bytesPerEvaluation } from './allocation.ts';
import { findAnchor } from './anchor.ts';
import { median, timeDerivative, timeRuns, warmUp, type Measured } from './measure-session.ts';
import { referenceStudies, timed, timedStudy, type Timed } from './studies.ts';
import { compareSwitchOvers } from './switch-overs.ts';

const RUNS_A_TURN = 20;
const DERIVATIVE_RUNS = 60;

const { values: options } = parseArgs({
  options: { json: { type: 'string' }, browser: { type: 'boolean' }, turns: { type: 'string', default: '15' } },
});

const turns = Number(options.turns);
if (!(turns >= 1)) throw new Error(`--turns must be a number from 1, but is ${options.turns}`);

const studies = { b1: timedStudy('b1'), b12: timedStudy('b12') };
const anchor = findAnchor();
for (const name of timed) warmUp(studies[name]);

// Turn by turn, so that whatever else the machine does weighs on both alike.
const ours: Record<Timed, number[]> = { b1: [], b12: [] };
const anchors: Record<Timed, number[]> = { b1: [], b12: [] };
for (let turn = 0; turn < turns; turn++) {
  for (const name of timed) {
    ours[name].push(median(timeRuns(studies[name], RUNS_A_TURN)));
    if ('time' in anchor) anchors[name].push(anchor.time(name));
  }
}

const measured = { b1: measure('b1'), b12: measure('b12') };
console.log(`\nmedian of ${turns} turns of ${RUNS_A_TURN} runs, default accuracy, full 10 s series, metrics, ledgers`);
for (const name of timed) print(name, measured[name]);
if ('skipped' in anchor) console.log(`C program on CVODES: skipped, ${anchor.skipped}`);
else for (const name of timed) printRatio(name);
for (const name of timed)
  console.log(
    `${label(name)} ${(await bytesPerEvaluation(studies[name])).toFixed(0)} bytes per evaluation, boxed numbers`,
  );
printSwitchOvers();
if (options.browser) await printBrowser();
if (options.json) writeFileSync(options.json, `${JSON.stringify(measured, null, 2)}\n`);

function measure(name: Timed): Measured {
  return { msPerRun: median(ours[name]), ...timeDerivative(studies[name], DERIVATIVE_RUNS) };
}

function label(name: Timed): string {
  return `${name.padEnd(4)}(${String(studies[name].pack.segments).padStart(2)} segments)`;
}

function print(name: Timed, { msPerRun, evaluations, microsPerEvaluation }: Measured): void {
  const outside = 1 - (evaluations * microsPerEvaluation) / 1000 / msPerRun;
  console.log(
    `${label(name)} ${msPerRun.toFixed(2)} ms per run, ${evaluations} evaluations, ` +
      `${microsPerEvaluation.toFixed(2)} µs per evaluation, ${(100 * outside).toFixed(0)} % outside the derivative`,
  );
}

function printRatio(name: Timed): void {
  const ratios = ours[name].map((ms, turn) => ms / anchors[name][turn]);
  const ms = median(anchors[name]).toFixed(2);
  console.log(
    `${label(name)} ${ms} ms in the C program on CVODES: ratio ${median(ratios).toFixed(2)}, below 1 is faster`,
  );
}

function printSwitchOvers(): void {
  console.log('\nevaluations, stopping where one limit hands over to another / stepping across');
  const named: [string, typeof studies.b1][] = [['b1', studies.b1], ['b12', studies.b12], ...referenceStudies()];
  for (const { name, stopping, across } of compareSwitchOvers(named)) {
    const saved = 1 - stopping / across;
    console.log(`${name.padEnd(32)} ${stopping} / ${across}: stopping saves ${(100 * saved).toFixed(0)} %`);
  }
}

async function printBrowser(): Promise<void> {
  const { timeInBrowser } = await import('./in-browser.ts');
  const inBrowser = await timeInBrowser(studies);
  console.log('');
  for (const name of timed)
    console.log(`${label(name)} ${inBrowser[name].toFixed(2)} ms per run in a worker of Chromium`);
}
