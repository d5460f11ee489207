import { existsSync, readFileSync } from 'node:fs';

/** { passed, failed, skipped } of one vitest run, from its JSON report. A run that ended without one failed. */
export function countsOfReport(file) {
  if (!existsSync(file)) return { passed: 0, failed: 1, skipped: 0 };
  const report = JSON.parse(readFileSync(file, 'utf8'));
  const skipped = report.numPendingTests + report.numTodoTests;
  // A file that cannot even be loaded has no tests to count, and must not pass for that.
  const broken = report.testResults.filter(
    ({ status, assertionResults }) => status === 'failed' && assertionResults.every((each) => each.status !== 'failed'),
  );
  const failed = report.numFailedTests + broken.length;
  return { passed: report.numPassedTests, failed: failed === 0 && !report.success ? 1 : failed, skipped };
}
