import { readFileSync } from 'node:fs';

export type Counts = { readonly passed: number; readonly failed: number; readonly skipped: number };

export const NOTHING: Counts = { passed: 0, failed: 0, skipped: 0 };
export const ONE_PASSED: Counts = { ...NOTHING, passed: 1 };
export const ONE_FAILED: Counts = { ...NOTHING, failed: 1 };

export function sum(all: readonly Counts[]): Counts {
  return all.reduce(
    (a, b) => ({ passed: a.passed + b.passed, failed: a.failed + b.failed, skipped: a.skipped + b.skipped }),
    NOTHING,
  );
}

/** The part of the report that jest and vitest have in common (`--json`, `--reporter=json`). */
type Report = {
  readonly numPassedTests: number;
  readonly numFailedTests: number;
  readonly numPendingTests: number;
  readonly testResults: readonly {
    readonly status: string;
    readonly assertionResults: readonly { readonly status: string }[];
  }[];
};

/**
 * Counts a report. What a runner does not count as a test is a failure all the same: a file that could not
 * be loaded, a runner that ended badly after good tests, a report that is missing, no test at all.
 * @param code the runner's exit code
 */
export function readReport(file: string, code: number): Counts {
  let report: Report;
  try {
    report = JSON.parse(readFileSync(file, 'utf8')) as Report;
  } catch {
    return ONE_FAILED;
  }
  const broken = report.testResults.filter(
    ({ status, assertionResults }) =>
      status === 'failed' && !assertionResults.some((assertion) => assertion.status === 'failed'),
  ).length;
  const failed = report.numFailedTests + broken;
  const bad = code !== 0 || report.numPassedTests === 0;
  return {
    passed: report.numPassedTests,
    failed: failed === 0 && bad ? 1 : failed,
    skipped: report.numPendingTests,
  };
}
