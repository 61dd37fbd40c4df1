import type { Interval } from './arithmetic/interval.js';
import { type Rational, rationalFromDouble } from './arithmetic/rational.js';
import { intervalFromRational } from './arithmetic/rational-rounding.js';

/** A number of a certificate: a double, which stands for its exact value, or a rational number. */
export type Scalar = number | Rational;

export function rationalOf(x: Scalar): Rational {
  return typeof x === 'number' ? rationalFromDouble(x) : x;
}

/** The largest double that is not above x. */
export function doubleOf(x: Scalar): number {
  return typeof x === 'number' ? x : intervalFromRational(x).lo;
}

export function intervalOf(x: Scalar): Interval {
  return typeof x === 'number' ? { lo: x, hi: x } : intervalFromRational(x);
}
