import { nearestRational } from '../checker/arithmetic/rational-rounding.js';
import type { Rational } from '../checker/arithmetic/rational.js';
import { doubleOf } from '../checker/scalar.js';

/** The rational number with a denominator up to `limit` that x stands for within `tolerance`, null when there is none. */
export function guessRational(x: number, limit: number, tolerance: number): Rational | null {
  if (!Number.isFinite(x)) return null;
  const guess = nearestRational(x, BigInt(limit));
  return Math.abs(doubleOf(guess) - x) <= tolerance ? guess : null;
}
