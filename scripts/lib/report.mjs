// @ts-check

/**
 * How many checks passed and failed, out of the reports that the test runners write themselves.
 *
 * @typedef {object} Row one line of the summary
 * @property {string} name
 * @property {number} passed
 * @property {number} failed
 * @property {number} milliseconds
 * @property {readonly string[]} remarks what the person has to know of a failure that no runner has named
 *
 * @typedef {Pick<Row, 'passed' | 'failed' | 'remarks'>} Count
 *
 * @typedef {object} VitestReport
 * @property {number} numPassedTests
 * @property {number} numFailedTests
 * @property {number} numPendingTests
 * @property {number} numTodoTests
 * @property {readonly { readonly name: string, readonly status: string, readonly assertionResults: readonly unknown[] }[]} testResults
 *
 * @typedef {object} PlaywrightReport
 * @property {{ readonly expected: number, readonly unexpected: number, readonly flaky: number, readonly skipped: number }} stats
 * @property {readonly unknown[]} errors
 */

/**
 * A check that either holds or does not.
 *
 * @param {number | null} exitCode
 * @returns {Count}
 */
export function countCheck(exitCode) {
  return exitCode === 0 ? { passed: 1, failed: 0, remarks: [] } : { passed: 0, failed: 1, remarks: [] };
}

/**
 * A part that could not be run at all.
 *
 * @param {string} why
 * @returns {Count}
 */
export function countNotRun(why) {
  return { passed: 0, failed: 1, remarks: [why] };
}

/**
 * @param {string | null} text the report of Vitest's json reporter, null when it wrote none
 * @param {number | null} exitCode
 * @param {object} [how]
 * @param {boolean} [how.skippedFail] false when the person chose tests by name, which skips the others
 * @returns {Count}
 */
export function countVitest(text, exitCode, { skippedFail = true } = {}) {
  const report = /** @type {VitestReport | null} */ (parse(text));
  if (!Array.isArray(report?.testResults)) return countDead(exitCode);
  const skipped = report.numPendingTests + report.numTodoTests;
  // A file that does not load has no tests of its own to fail.
  const broken = report.testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0);
  return judge({
    passed: report.numPassedTests,
    failed: report.numFailedTests + broken.length,
    skipped: skippedFail ? skipped : 0,
    flaky: 0,
    exitCode,
  });
}

/**
 * @param {string | null} text the report of Playwright's json reporter, null when it wrote none
 * @param {number | null} exitCode
 * @returns {Count}
 */
export function countPlaywright(text, exitCode) {
  const report = /** @type {PlaywrightReport | null} */ (parse(text));
  if (report?.stats === undefined) return countDead(exitCode);
  const { expected, unexpected, flaky, skipped } = report.stats;
  return judge({
    passed: expected,
    failed: unexpected + (report.errors?.length ?? 0),
    skipped,
    flaky,
    exitCode,
  });
}

/**
 * A skipped test guards nothing, a flaky one cannot be believed, and a runner that found no test has not run: each
 * counts as failed. So does an exit code that says there is a failure which the report does not name.
 *
 * @param {{ passed: number, failed: number, skipped: number, flaky: number, exitCode: number | null }} counts
 * @returns {Count}
 */
function judge({ passed, failed, skipped, flaky, exitCode }) {
  const remarks = [];
  let all = failed + skipped + flaky;
  if (skipped > 0) remarks.push(`${skipped} skipped, which counts as failed`);
  if (flaky > 0) remarks.push(`${flaky} passed only when repeated, which counts as failed`);
  if (passed + all === 0) {
    all = 1;
    remarks.push('no test was found, which counts as one failed');
  } else if (all === 0 && exitCode !== 0) {
    all = 1;
    remarks.push(`the runner ended with code ${exitCode ?? 'none'} though no test failed, which counts as one failed`);
  }
  return { passed, failed: all, remarks };
}

/**
 * @param {number | null} exitCode
 * @returns {Count}
 */
function countDead(exitCode) {
  return countNotRun(`the runner ended with code ${exitCode ?? 'none'} and left no report, which counts as one failed`);
}

/** @param {string | null} text */
function parse(text) {
  try {
    return text === null ? null : JSON.parse(text);
  } catch {
    return null;
  }
}

/**
 * The summary, and as its last line the count of everything.
 *
 * @param {readonly Row[]} rows
 * @param {(milliseconds: number) => string} duration
 * @returns {{ readonly lines: readonly string[], readonly failed: number }}
 */
export function summary(rows, duration) {
  const passed = rows.reduce((sum, row) => sum + row.passed, 0);
  const failed = rows.reduce((sum, row) => sum + row.failed, 0);
  const cells = [
    ['', 'passed', 'failed', 'time'],
    ...rows.map((row) => [row.name, String(row.passed), String(row.failed), duration(row.milliseconds)]),
  ];
  return {
    lines: [
      ...table(cells),
      ...rows.flatMap((row) => row.remarks.map((remark) => `${row.name}: ${remark}`)),
      '',
      `${passed} passed, ${failed} failed`,
    ],
    failed,
  };
}

/**
 * Lines of columns, the first to the left and the others to the right.
 *
 * @param {readonly (readonly string[])[]} rows
 * @returns {string[]}
 */
export function table(rows) {
  const columns = Math.max(0, ...rows.map((row) => row.length));
  const widths = Array.from({ length: columns }, (_, column) => Math.max(...rows.map((row) => (row[column] ?? '').length)));
  return rows.map((row) =>
    widths
      .map((width, column) => (column === 0 ? (row[column] ?? '').padEnd(width) : (row[column] ?? '').padStart(width)))
      .join('  ')
      .trimEnd(),
  );
}
