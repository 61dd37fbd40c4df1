import { expect, test } from 'vitest';
import { countTests } from '../lib/test-count.mjs';

const file = (status, ...assertions) => ({ status, assertionResults: assertions });

test('counts passed and failed tests', () => {
  const report = { numPassedTests: 2, numFailedTests: 1, testResults: [file('failed', {}, {}), file('passed', {})] };
  expect(countTests(report)).toEqual({ passed: 2, failed: 1 });
});

test('a file that could not be loaded is a failure', () => {
  const report = { numPassedTests: 2, numFailedTests: 0, testResults: [file('passed', {}, {}), file('failed')] };
  expect(countTests(report)).toEqual({ passed: 2, failed: 1 });
});

test('no report is a failure', () => {
  expect(countTests(null)).toEqual({ passed: 0, failed: 1 });
});
