import { expect, it } from 'vitest';
import { countTests } from '../../scripts/test/count.mjs';

const file = (status: string, tests: number) => ({
  status,
  assertionResults: Array<unknown>(tests).fill({}),
});

it('passed and failed tests are counted', () => {
  const report = {
    numPassedTests: 7,
    numFailedTests: 2,
    testResults: [file('failed', 4), file('passed', 5)],
  };
  expect(countTests(report, 1)).toEqual({ passed: 7, failed: 2 });
});

it('a file that cannot be read counts as a failure', () => {
  const report = {
    numPassedTests: 7,
    numFailedTests: 0,
    testResults: [file('failed', 0), file('passed', 7)],
  };
  expect(countTests(report, 1)).toEqual({ passed: 7, failed: 1 });
});

it('an error outside any test counts as a failure', () => {
  const report = { numPassedTests: 7, numFailedTests: 0, testResults: [file('passed', 7)] };
  expect(countTests(report, 1)).toEqual({ passed: 7, failed: 1 });
});

it('a run that left no report counts as a failure', () => {
  expect(countTests(null, 0)).toEqual({ passed: 0, failed: 1 });
});
