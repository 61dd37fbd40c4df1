import { ThalwegError } from '../errors.js';

/** Throws `usage` unless x is a whole number in [least, most]. */
export function requireWhole(x: number, least: number, most: number, what: string): void {
  if (Number.isInteger(x) && x >= least && x <= most) return;
  throw new ThalwegError('usage', `expected ${what} to be a whole number from ${least} to ${most}, got ${x}`);
}

/** Throws `usage` unless x is a finite number of at least 0. */
export function requireNonNegative(x: number, what: string): void {
  if (Number.isFinite(x) && x >= 0) return;
  throw new ThalwegError('usage', `expected ${what} to be a finite number of at least 0, got ${x}`);
}
