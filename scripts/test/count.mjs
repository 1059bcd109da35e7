// What the last line of `npm test` counts.

/**
 * Passed and failed tests from vitest's JSON report. A file that could not be read at all has no tests to count but is a
 * failure; so is an error outside any test (a broken set-up, an unhandled rejection), which shows only in the exit code.
 */
export function countTests(report, exitCode) {
  if (report === null) return { passed: 0, failed: 1 };
  const unread = report.testResults.filter(
    (file) => file.status === 'failed' && file.assertionResults.length === 0,
  );
  const failed = report.numFailedTests + unread.length;
  return { passed: report.numPassedTests, failed: failed === 0 && exitCode !== 0 ? 1 : failed };
}
