import { ThalwegError } from '@thalweg/core';

/** The error of a computation that SIGINT or SIGTERM ended; `kept` says what stays of it. */
export function interruptedError(kept: string | null = null): ThalwegError {
  return new ThalwegError('interrupted', `interrupted before it finished: ${kept ?? 'no result was written'}`);
}
