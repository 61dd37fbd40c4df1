import { ERROR_CODES, ThalwegError, type ErrorCode } from '@thalweg/core';
import { expect, test } from 'vitest';
import { EXIT_STATUS, EXIT_STATUS_OF_ERROR } from '../src/exit-status.js';
import { printError } from '../src/output/print-error.js';
import { fakeTerminal } from './helpers/fake-terminal.js';

test('every error code has an exit code, and no other code has', () => {
  expect(Object.keys(EXIT_STATUS_OF_ERROR).sort()).toEqual(Object.keys(ERROR_CODES).sort());
});

test('no error ends with an exit code that means an answer', () => {
  const answers: number[] = [EXIT_STATUS.yes, EXIT_STATUS.no, EXIT_STATUS.undecided];
  for (const [code, status] of Object.entries(EXIT_STATUS_OF_ERROR)) expect(answers, code).not.toContain(status);
});

test.each<[ErrorCode, number]>([
  ['usage', 64],
  ['not-json', 65],
  ['not-hermitian', 65],
  ['not-found', 66],
  ['internal', 70],
  ['cannot-write', 73],
  ['interrupted', 130],
])('%s ends with %i', (code, status) => {
  const terminal = fakeTerminal();
  expect(printError(new ThalwegError(code, 'message'), terminal, { json: false, color: true })).toBe(status);
});
