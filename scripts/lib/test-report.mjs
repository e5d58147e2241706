// @ts-check

/**
 * @typedef {{ passed: number, failed: number, skipped: number }} Counts
 * @typedef {object} Report what vitest's JSON reporter writes, as far as it is read here
 * @property {number} numPassedTests
 * @property {number} numFailedTests
 * @property {number} numPendingTests
 * @property {number} numTodoTests
 * @property {{ status: string, assertionResults: { status: string }[] }[]} testResults one for each file
 */

/**
 * Counts tests. A file that failed without a failed test in it (it did not even load) counts as one failure, and so
 * does a run that ended badly for a reason no file shows.
 * @param {Report | undefined} report undefined where vitest wrote none
 * @param {boolean} endedWell
 * @returns {Counts}
 */
export function countTests(report, endedWell) {
  if (report === undefined) return { passed: 0, failed: 1, skipped: 0 };
  const brokenFiles = report.testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && !assertionResults.some((test) => test.status === 'failed'),
  );
  const failed = report.numFailedTests + brokenFiles.length;
  return {
    passed: report.numPassedTests,
    failed: failed === 0 && !endedWell ? 1 : failed,
    skipped: report.numPendingTests + report.numTodoTests,
  };
}
