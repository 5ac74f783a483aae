/**
 * @typedef {{ passed: number, failed: number }} Counts
 * @typedef {{ status: string }} Assertion
 * @typedef {{ status: string, assertionResults: Assertion[] }} VitestFile
 * @typedef {{ stats: { expected: number, unexpected: number, flaky: number, skipped: number }, errors?: unknown[] }} PlaywrightReport
 */

/**
 * Counts a Vitest JSON report. A file that could not be loaded counts as one failure; a run that ended badly
 * although no test failed (an unhandled rejection, no tests at all) counts as one failure too.
 *
 * @param {{ testResults: VitestFile[] }} report  what `--reporter=json` wrote
 * @param {number} exitCode  how Vitest ended
 * @returns {Counts}
 */
export function countVitest(report, exitCode) {
  let passed = 0;
  let failed = 0;
  for (const file of report.testResults) {
    const failedHere = file.assertionResults.filter(({ status }) => status === 'failed').length;
    passed += file.assertionResults.filter(({ status }) => status === 'passed').length;
    failed += file.status === 'failed' && failedHere === 0 ? 1 : failedHere;
  }
  return withExitCode({ passed, failed }, exitCode);
}

/**
 * Counts a Playwright JSON report. A test that passed only on a second try counts as failed, and so does one
 * that was skipped: every journey is meant to run.
 *
 * @param {PlaywrightReport} report  what `--reporter=json` wrote
 * @param {number} exitCode  how Playwright ended
 * @returns {Counts}
 */
export function countPlaywright(report, exitCode) {
  const { expected, unexpected, flaky, skipped } = report.stats;
  const outsideTests = unexpected === 0 ? (report.errors?.length ?? 0) : 0;
  return withExitCode({ passed: expected, failed: unexpected + flaky + skipped + outsideTests }, exitCode);
}

/**
 * @param {Counts} counts
 * @param {number} exitCode
 * @returns {Counts}
 */
function withExitCode({ passed, failed }, exitCode) {
  return { passed, failed: exitCode !== 0 && failed === 0 ? 1 : failed };
}
