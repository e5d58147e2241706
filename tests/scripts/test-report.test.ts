import { describe, expect, test } from 'vitest';
import { countTests } from '#scripts/lib/test-report.mjs';

const report = {
  numPassedTests: 7,
  numFailedTests: 0,
  numPendingTests: 0,
  numTodoTests: 0,
  testResults: [{ status: 'passed', assertionResults: [{ status: 'passed' }] }],
};

describe('countTests', () => {
  test('counts what passed and failed', () => {
    expect(countTests(report, true)).toEqual({ passed: 7, failed: 0, skipped: 0 });
    expect(countTests({ ...report, numFailedTests: 2 }, false)).toMatchObject({ failed: 2 });
  });

  test('a file that did not load is a failure', () => {
    const broken = { status: 'failed', assertionResults: [] };
    expect(countTests({ ...report, testResults: [broken] }, false)).toMatchObject({ failed: 1 });
  });

  test('a run that ended badly without a failed test is a failure', () => {
    expect(countTests(report, false)).toMatchObject({ passed: 7, failed: 1 });
    expect(countTests(undefined, true)).toEqual({ passed: 0, failed: 1, skipped: 0 });
  });

  test('what was left out is counted', () => {
    expect(countTests({ ...report, numPendingTests: 1, numTodoTests: 2 }, true).skipped).toBe(3);
  });
});
