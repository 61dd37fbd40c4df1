/**
 * Counts passed and failed tests of a vitest JSON report. A file that could not be loaded holds no test and counts as
 * one failure; so does a report that is missing.
 */
export function countTests(report) {
  if (report === null) return { passed: 0, failed: 1 };
  const unloaded = report.testResults.filter((file) => file.status === 'failed' && file.assertionResults.length === 0);
  return { passed: report.numPassedTests, failed: report.numFailedTests + unloaded.length };
}
