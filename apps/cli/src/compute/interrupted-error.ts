import { ThalwegError } from '@thalweg/core';

/** The error of a computation that SIGINT or SIGTERM ended. */
export function interruptedError(): ThalwegError {
  return new ThalwegError('interrupted', 'interrupted before it finished: no result was written');
}
