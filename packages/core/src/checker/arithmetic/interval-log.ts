import { ThalwegError } from '../../errors.js';
import { binaryParts } from './binary-parts.js';
import { type Interval, add, div, mul, point } from './interval.js';
import { ARTANH_RANGE, ARTANH_TERMS } from './limits.js';
import { addDown, addUp, mulDown, mulUp, nextDown, nextUp } from './rounding.js';

/** log 2 in two parts, the first with 21 trailing zero bits: k·LN2_HIGH is exact for |k| < 2^21 (Tang, ACM TOMS 16 (1990)). */
export const LN2_HIGH = 6.9314718036912381649e-1;
export const LN2_LOW: Interval = { lo: nextDown(1.90821492927058770002e-10), hi: nextUp(1.90821492927058770002e-10) };

/** Natural logarithm over the part of x that is positive; throws `usage` when there is none. */
export function log(x: Interval): Interval {
  if (!(x.hi > 0)) throw new ThalwegError('usage', `expected an interval that meets (0, ∞), got [${x.lo}, ${x.hi}]`);
  return {
    lo: x.lo > 0 && x.lo < Infinity ? logRatio(x.lo, 1).lo : -Infinity,
    hi: x.hi < Infinity ? logRatio(x.hi, 1).hi : Infinity,
  };
}

/** log(1 + x) over the part of x above −1; throws `usage` when there is none. */
export function log1p(x: Interval): Interval {
  if (!(x.hi > -1)) throw new ThalwegError('usage', `expected an interval that meets (−1, ∞), got [${x.lo}, ${x.hi}]`);
  return {
    lo: x.lo > -1 ? log1pOfPoint(x.lo).lo : -Infinity,
    hi: x.hi < Infinity ? log1pOfPoint(x.hi).hi : Infinity,
  };
}

/** log(x/y) for finite doubles x, y > 0, to a few units in the last place for every ratio, however near 1. */
export function logRatio(x: number, y: number): Interval {
  const u = binaryParts(x);
  const v = binaryParts(y);
  let k = u.exponent - v.exponent;
  let { mantissa: a } = u;
  let { mantissa: b } = v;
  if (a > Math.SQRT2 * b) {
    b *= 2;
    k++;
  } else if (b > Math.SQRT2 * a) {
    a *= 2;
    k--;
  }
  // a and b are within a factor 2, so that a − b is exact (Sterbenz); |a−b|/(a+b) < 0.1716.
  const t = div(point(a - b), { lo: addDown(a, b), hi: addUp(a, b) });
  const rest = twiceArtanh(t);
  if (k === 0) return rest;
  return add(add(mul(point(k), LN2_LOW), rest), point(k * LN2_HIGH));
}

function log1pOfPoint(x: number): Interval {
  if (x > -0.25 && x < 0.35) {
    const t = div(point(x), { lo: addDown(2, x), hi: addUp(2, x) });
    if (t.lo >= -ARTANH_RANGE && t.hi <= ARTANH_RANGE) return twiceArtanh(t);
  }
  return log({ lo: Math.max(0, addDown(1, x)), hi: addUp(1, x) });
}

/** 1/(2k+3) for k < ARTANH_TERMS. */
const COEFFICIENTS = Float64Array.from({ length: ARTANH_TERMS }, (_, k) => 1 / (2 * k + 3));

/** 2 artanh t = 2t(1 + s·Q(s)), s = t², Q(s) = Σ s^k/(2k+3), for |t| ≤ ARTANH_RANGE up to rounding. */
function twiceArtanh(t: Interval): Interval {
  const large = Math.max(-t.lo, t.hi);
  const small = Math.max(0, t.lo, -t.hi);
  const sLow = mulDown(small, small);
  const sHigh = mulUp(large, large);
  const q = horner(sHigh);
  const low = addDown(1, mulDown(sLow, mulDown(sLow === sHigh ? q : horner(sLow), 1 - HORNER_ERROR)));
  const high = addUp(1, mulUp(sHigh, mulUp(q, 1 + HORNER_ERROR)));
  return mul({ lo: 2 * t.lo, hi: 2 * t.hi }, { lo: low, hi: high });
}

/**
 * Relative error of Horner's rule below: all terms are positive and each meets at most 2·ARTANH_TERMS+1 roundings of 2^-53
 * (Higham 2002, §5.1); the terms left out are below s^n/((2n+3)(1−s)) < 2^-60 of the sum.
 */
const HORNER_ERROR = (ARTANH_TERMS + 4) * Number.EPSILON;

/** Q(s), 0 ≤ s ≤ ARTANH_RANGE². */
function horner(s: number): number {
  let sum = 0;
  for (let k = ARTANH_TERMS - 1; k >= 0; k--) sum = sum * s + COEFFICIENTS[k];
  return sum;
}
