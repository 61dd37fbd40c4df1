import { type Interval, add, contains, mul, neg, point, sqr, sub } from './interval.js';

/** A rectangle of complex numbers with sides parallel to the axes. */
export interface ComplexInterval {
  readonly re: Interval;
  readonly im: Interval;
}

/** The rectangle of one complex number; throws `not-finite` unless both parts are finite. */
export function complexPoint(re: number, im: number = 0): ComplexInterval {
  return { re: point(re), im: point(im) };
}

export function addComplex(x: ComplexInterval, y: ComplexInterval): ComplexInterval {
  return { re: add(x.re, y.re), im: add(x.im, y.im) };
}

export function subComplex(x: ComplexInterval, y: ComplexInterval): ComplexInterval {
  return { re: sub(x.re, y.re), im: sub(x.im, y.im) };
}

export function mulComplex(x: ComplexInterval, y: ComplexInterval): ComplexInterval {
  return { re: sub(mul(x.re, y.re), mul(x.im, y.im)), im: add(mul(x.re, y.im), mul(x.im, y.re)) };
}

/** The product with a real interval. */
export function scaleComplex(x: ComplexInterval, factor: Interval): ComplexInterval {
  return { re: mul(x.re, factor), im: mul(x.im, factor) };
}

export function conjugateComplex(x: ComplexInterval): ComplexInterval {
  return { re: x.re, im: neg(x.im) };
}

/** |x|². */
export function squaredModulus(x: ComplexInterval): Interval {
  return add(sqr(x.re), sqr(x.im));
}

export function containsComplex(x: ComplexInterval, re: number, im: number): boolean {
  return contains(x.re, re) && contains(x.im, im);
}
