import type { Interval } from '../checker/arithmetic/interval.js';
import { ThalwegError } from '../errors.js';

/** Null where the arithmetic proves nothing: a matrix not proved definite, or one without finite bounds. */
export function attempt(enclose: () => Interval): Interval | null {
  try {
    const found = enclose();
    return Number.isFinite(found.lo) && Number.isFinite(found.hi) ? found : null;
  } catch (error) {
    if (error instanceof ThalwegError && UNPROVED.has(error.code)) return null;
    throw error;
  }
}

const UNPROVED: ReadonlySet<string> = new Set([
  'not-positive-definite',
  'not-hermitian',
  'no-convergence',
  'not-finite',
  'state-not-positive',
  'usage',
]);
