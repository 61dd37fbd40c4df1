import { type ComplexInterval, addComplex, conjugateComplex, mulComplex } from './arithmetic/complex-interval.js';
import {
  GAUSSIAN_ZERO,
  type GaussianRational,
  addGaussian,
  conjugateGaussian,
  isZeroGaussian,
  multiplyGaussian,
} from './arithmetic/gaussian-rational.js';
import { neg } from './arithmetic/interval.js';
import { negateGaussian } from './arithmetic/gaussian-rational.js';
import { type Scalar, doubleOf, intervalOf, rationalOf } from './scalar.js';

/** Complex numbers in one of three arithmetics, so that each formula of the checker is written once. */
export interface Ring<T> {
  readonly zero: T;
  of(re: Scalar, im: Scalar): T;
  add(x: T, y: T): T;
  multiply(x: T, y: T): T;
  negate(x: T): T;
  conjugate(x: T): T;
  /** True for the exact zero only. */
  isZero(x: T): boolean;
}

export interface Complex {
  readonly re: number;
  readonly im: number;
}

/** Plain doubles. */
export const DOUBLES: Ring<Complex> = {
  zero: { re: 0, im: 0 },
  of: (re, im) => ({ re: doubleOf(re), im: doubleOf(im) }),
  add: (x, y) => ({ re: x.re + y.re, im: x.im + y.im }),
  multiply: (x, y) => ({ re: x.re * y.re - x.im * y.im, im: x.re * y.im + x.im * y.re }),
  negate: (x) => ({ re: -x.re, im: -x.im }),
  conjugate: (x) => ({ re: x.re, im: -x.im }),
  isZero: (x) => x.re === 0 && x.im === 0,
};

/** Intervals with directed rounding. */
export const INTERVALS: Ring<ComplexInterval> = {
  zero: { re: { lo: 0, hi: 0 }, im: { lo: 0, hi: 0 } },
  of: (re, im) => ({ re: intervalOf(re), im: intervalOf(im) }),
  add: addComplex,
  multiply: mulComplex,
  negate: (x) => ({ re: neg(x.re), im: neg(x.im) }),
  conjugate: conjugateComplex,
  isZero: ({ re, im }) => re.lo === 0 && re.hi === 0 && im.lo === 0 && im.hi === 0,
};

/** Gaussian rationals. */
export const RATIONALS: Ring<GaussianRational> = {
  zero: GAUSSIAN_ZERO,
  of: (re, im) => ({ re: rationalOf(re), im: rationalOf(im) }),
  add: addGaussian,
  multiply: multiplyGaussian,
  negate: negateGaussian,
  conjugate: conjugateGaussian,
  isZero: isZeroGaussian,
};
