import { readText } from './files.mjs';

const none = { passed: 0, failed: 0, skipped: 0 };

function readJson(file) {
  try {
    return JSON.parse(readText(file) ?? '');
  } catch {
    return undefined;
  }
}

/** A stage that counts as one: lint, types, build. */
export const ofOne = (code) => ({ ...none, [code === 0 ? 'passed' : 'failed']: 1 });

/** A run that failed without a failed test, or left no report, still counts as one failure. */
const withCode = (counts, code) => (code !== 0 && counts.failed === 0 ? { ...counts, failed: 1 } : counts);

/**
 * Counts Vitest's JSON report. A file that could not be loaded counts as one failure.
 * @param code - exit code of the run
 */
export function ofVitest(file, code) {
  const report = readJson(file);
  if (!report) return ofOne(code || 1);
  const unloaded = report.testResults.filter((one) => one.status === 'failed' && !one.assertionResults.some((test) => test.status === 'failed'));
  const counts = {
    passed: report.numPassedTests,
    failed: report.numFailedTests + unloaded.length,
    skipped: report.numPendingTests + report.numTodoTests,
  };
  return withCode(counts, code);
}

/**
 * Counts Playwright's JSON report. A test that passed only when tried again counts as failed.
 * @param code - exit code of the run
 */
export function ofPlaywright(file, code) {
  const report = readJson(file);
  if (!report) return ofOne(code || 1);
  const { expected, unexpected, flaky, skipped } = report.stats;
  return withCode({ passed: expected, failed: unexpected + flaky + report.errors.length, skipped }, code);
}

export const sum = (all) =>
  all.reduce((a, b) => ({ passed: a.passed + b.passed, failed: a.failed + b.failed, skipped: a.skipped + b.skipped }), none);
