/**
 * Runs every check and test in order and goes on after a failure, so that one run shows everything.
 * Each static check and the build count as one; tests count as their runners report them.
 * The last line is "N passed, N failed"; the exit code is 1 on any failure.
 *
 *   node .ci/test.mjs                 everything
 *   node .ci/test.mjs --checks-only   types, lint, boundaries, format, unused code
 */
import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { countPlaywright, countVitest } from './count-results.mjs';
import { findChromium } from './find-chromium.mjs';

const ROOT = path.resolve(import.meta.dirname, '..');
const STATIC_CHECKS = ['types', 'lint', 'boundaries', 'format:check', 'unused'];

/** @type {{ name: string, passed: number, failed: number }[]} */
const results = [];
const reports = mkdtempSync(path.join(tmpdir(), 'voltiplano-test-'));

try {
  for (const script of STATIC_CHECKS) runCheck(script);
  if (!process.argv.includes('--checks-only')) {
    runVitest();
    const built = runCheck('build');
    if (built) runEndToEnd();
    else record('end to end', { passed: 0, failed: 1 }, 'not run: the studio did not build');
  }
} finally {
  rmSync(reports, { recursive: true, force: true });
}
finish();

/** @param {string} script  a script of package.json that passes or fails as a whole */
function runCheck(script) {
  heading(script);
  const ok = run('npm', ['run', '--silent', script]) === 0;
  record(script, { passed: ok ? 1 : 0, failed: ok ? 0 : 1 });
  return ok;
}

function runVitest() {
  heading('unit tests and validation');
  const file = path.join(reports, 'vitest.json');
  const exitCode = run('npx', ['vitest', 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${file}`]);
  recordReport('unit tests and validation', file, (report) => countVitest(report, exitCode));
}

function runEndToEnd() {
  heading('end to end');
  const file = path.join(reports, 'playwright.json');
  /** @type {string} */
  let chromiumPath;
  try {
    chromiumPath = findChromium();
  } catch (error) {
    record('end to end', { passed: 0, failed: 1 }, String(error));
    return;
  }
  const env = { CHROMIUM_PATH: chromiumPath, PLAYWRIGHT_JSON_OUTPUT_FILE: file };
  const exitCode = run('npm', ['run', '--silent', 'test:e2e', '--', '--reporter=list,json'], env);
  recordReport('end to end', file, (report) => countPlaywright(report, exitCode));
}

/**
 * @param {string} name
 * @param {string} file  a runner's JSON report; a runner that wrote none has failed
 * @param {(report: any) => import('./count-results.mjs').Counts} count
 */
function recordReport(name, file, count) {
  if (existsSync(file)) record(name, count(JSON.parse(readFileSync(file, 'utf8'))));
  else record(name, { passed: 0, failed: 1 }, 'the runner wrote no report');
}

/**
 * @param {string} name
 * @param {{ passed: number, failed: number }} counts
 * @param {string} [reason]
 */
function record(name, counts, reason) {
  results.push({ name, ...counts });
  console.log(`${counts.failed > 0 ? 'FAILED' : 'passed'}: ${name}${reason ? ` (${reason})` : ''}`);
}

function finish() {
  const passed = results.reduce((sum, result) => sum + result.passed, 0);
  const failed = results.reduce((sum, result) => sum + result.failed, 0);
  heading('summary');
  for (const result of results) console.log(`${result.name}: ${result.passed} passed, ${result.failed} failed`);
  process.exitCode = failed > 0 ? 1 : 0;
  console.log(`\n${passed} passed, ${failed} failed`);
}

/** @param {string} text */
function heading(text) {
  console.log(`\n== ${text} ==`);
}

/**
 * @param {string} command
 * @param {string[]} args
 * @param {Record<string, string>} [env]
 * @returns {number} exit code
 */
function run(command, args, env = {}) {
  const { status } = spawnSync(command, args, { cwd: ROOT, stdio: 'inherit', env: { ...process.env, ...env } });
  return status ?? 1;
}
