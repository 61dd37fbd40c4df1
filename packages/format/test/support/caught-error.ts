import { ThalwegError } from '@thalweg/core';

/** The ThalwegError that the function throws; anything else, or nothing, fails the test. */
export function caughtError(run: () => unknown): ThalwegError {
  let result: unknown;
  try {
    result = run();
  } catch (error) {
    if (error instanceof ThalwegError) return error;
    throw error;
  }
  throw new Error(`expected a ThalwegError, got the result ${String(JSON.stringify(result)).slice(0, 200)}`);
}

/** [code, pointer, message] of the error: what a caller sees of it. */
export function refusal(run: () => unknown): [string, string | undefined, string] {
  const { code, pointer, message } = caughtError(run);
  return [code, pointer, message];
}
