import { ThalwegError } from '@thalweg/core';
import type { TaskOutcome } from './pool.js';

/** The result of a batch of one task; throws `time-limit` when the time limit ended it. */
export function only<Result>(outcomes: readonly TaskOutcome<Result>[]): Result {
  const [outcome] = outcomes;
  if (outcome?.done) return outcome.result;
  throw new ThalwegError('time-limit', 'the time limit passed before there was a result; give more with --time-limit');
}
