import {
  RATIONAL_ONE,
  RATIONAL_ZERO,
  type Rational,
  addRational,
  divideRational,
  multiplyRational,
  negateRational,
  rationalFromDouble,
  subtractRational,
} from './rational.js';

/** A complex number with rational parts. */
export interface GaussianRational {
  readonly re: Rational;
  readonly im: Rational;
}

export const GAUSSIAN_ZERO: GaussianRational = { re: RATIONAL_ZERO, im: RATIONAL_ZERO };
export const GAUSSIAN_ONE: GaussianRational = { re: RATIONAL_ONE, im: RATIONAL_ZERO };

export function gaussian(re: Rational, im: Rational = RATIONAL_ZERO): GaussianRational {
  return { re, im };
}

/** The exact value of two finite doubles. */
export function gaussianFromDoubles(re: number, im: number): GaussianRational {
  return { re: rationalFromDouble(re), im: rationalFromDouble(im) };
}

export function addGaussian(a: GaussianRational, b: GaussianRational): GaussianRational {
  return { re: addRational(a.re, b.re), im: addRational(a.im, b.im) };
}

export function subtractGaussian(a: GaussianRational, b: GaussianRational): GaussianRational {
  return { re: subtractRational(a.re, b.re), im: subtractRational(a.im, b.im) };
}

export function multiplyGaussian(a: GaussianRational, b: GaussianRational): GaussianRational {
  if (a.im.numerator === 0n && b.im.numerator === 0n) {
    return { re: multiplyRational(a.re, b.re), im: RATIONAL_ZERO };
  }
  return {
    re: subtractRational(multiplyRational(a.re, b.re), multiplyRational(a.im, b.im)),
    im: addRational(multiplyRational(a.re, b.im), multiplyRational(a.im, b.re)),
  };
}

/** a/b; throws `usage` when b is zero. */
export function divideGaussian(a: GaussianRational, b: GaussianRational): GaussianRational {
  const norm = addRational(multiplyRational(b.re, b.re), multiplyRational(b.im, b.im));
  const product = multiplyGaussian(a, conjugateGaussian(b));
  return { re: divideRational(product.re, norm), im: divideRational(product.im, norm) };
}

export function conjugateGaussian(a: GaussianRational): GaussianRational {
  return { re: a.re, im: negateRational(a.im) };
}

export function negateGaussian(a: GaussianRational): GaussianRational {
  return { re: negateRational(a.re), im: negateRational(a.im) };
}

export function isZeroGaussian(a: GaussianRational): boolean {
  return a.re.numerator === 0n && a.im.numerator === 0n;
}

export function equalGaussian(a: GaussianRational, b: GaussianRational): boolean {
  return isZeroGaussian(subtractGaussian(a, b));
}
