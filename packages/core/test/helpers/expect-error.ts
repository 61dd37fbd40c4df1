import { expect } from 'vitest';
import { type ErrorCode, ThalwegError } from '../../src/errors.js';

/** Fails unless `run` throws a ThalwegError with this code, pointer and a message that matches. */
export function expectError(run: () => unknown, code: ErrorCode, message: RegExp, pointer?: string): ThalwegError {
  let caught: unknown;
  try {
    run();
  } catch (error) {
    caught = error;
  }
  expect(caught, `expected a ThalwegError "${code}"`).toBeInstanceOf(ThalwegError);
  const error = caught as ThalwegError;
  expect(error.code).toBe(code);
  expect(error.message).toMatch(message);
  if (pointer !== undefined) expect(error.pointer).toBe(pointer);
  return error;
}
