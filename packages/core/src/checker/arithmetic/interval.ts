import { ThalwegError } from '../../errors.js';
import { addDown, addUp, divDown, divUp, mulDown, mulUp, sqrtDown, sqrtUp, subDown, subUp } from './rounding.js';

/**
 * A closed interval of real numbers, lo ≤ hi; an infinite end means unbounded. Every operation returns an interval that
 * contains the results for all choices of points in its arguments. The arithmetic operations are monotone under inclusion
 * (to a unit in the last place where over- or underflow is near, see limits.ts).
 */
export interface Interval {
  readonly lo: number;
  readonly hi: number;
}

export const ZERO: Interval = { lo: 0, hi: 0 };
export const ONE: Interval = { lo: 1, hi: 1 };
export const ENTIRE: Interval = { lo: -Infinity, hi: Infinity };

/** [lo, hi]; throws `usage` unless lo ≤ hi. */
export function interval(lo: number, hi: number): Interval {
  if (!(lo <= hi)) throw new ThalwegError('usage', `expected interval ends lo ≤ hi, got ${lo} and ${hi}`);
  return { lo, hi };
}

/** The interval of one finite double; throws `not-finite` otherwise. */
export function point(x: number): Interval {
  if (!Number.isFinite(x)) throw new ThalwegError('not-finite', `expected a finite number, got ${x}`);
  return { lo: x, hi: x };
}

export function contains(x: Interval, value: number): boolean {
  return x.lo <= value && value <= x.hi;
}

/** True when x lies in y. */
export function isSubset(x: Interval, y: Interval): boolean {
  return y.lo <= x.lo && x.hi <= y.hi;
}

/** Smallest interval that contains both. */
export function hull(x: Interval, y: Interval): Interval {
  return { lo: Math.min(x.lo, y.lo), hi: Math.max(x.hi, y.hi) };
}

/** Common part, null when there is none. */
export function intersection(x: Interval, y: Interval): Interval | null {
  const lo = Math.max(x.lo, y.lo);
  const hi = Math.min(x.hi, y.hi);
  return lo <= hi ? { lo, hi } : null;
}

/** Upper bound of hi − lo. */
export function width(x: Interval): number {
  return subUp(x.hi, x.lo);
}

/** Largest modulus of a point of x. */
export function magnitude(x: Interval): number {
  return Math.max(-x.lo, x.hi);
}

/** Smallest modulus of a point of x. */
export function mignitude(x: Interval): number {
  return Math.max(0, x.lo, -x.hi);
}

export function neg(x: Interval): Interval {
  return { lo: 0 - x.hi, hi: 0 - x.lo };
}

export function abs(x: Interval): Interval {
  return { lo: mignitude(x), hi: magnitude(x) };
}

export function add(x: Interval, y: Interval): Interval {
  return { lo: addDown(x.lo, y.lo), hi: addUp(x.hi, y.hi) };
}

export function sub(x: Interval, y: Interval): Interval {
  return { lo: subDown(x.lo, y.hi), hi: subUp(x.hi, y.lo) };
}

export function mul(x: Interval, y: Interval): Interval {
  return { lo: productLow(x.lo, x.hi, y.lo, y.hi), hi: productHigh(x.lo, x.hi, y.lo, y.hi) };
}

/** x/y; a divisor that contains zero in its inside gives the whole line, one that ends at zero a half-line. */
export function div(x: Interval, y: Interval): Interval {
  if (y.lo > 0) return quotientByPositive(x, y);
  if (y.hi < 0) return neg(quotientByPositive(x, neg(y)));
  if (y.lo === 0 && y.hi > 0) return quotientByHalfLine(x, y.hi);
  if (y.hi === 0 && y.lo < 0) return neg(quotientByHalfLine(x, -y.lo));
  return ENTIRE;
}

/** x². */
export function sqr(x: Interval): Interval {
  const small = mignitude(x);
  const large = magnitude(x);
  return { lo: mulDown(small, small), hi: mulUp(large, large) };
}

/** √x over the part of x that is not negative; throws `usage` when there is none. */
export function sqrt(x: Interval): Interval {
  if (x.hi < 0) throw new ThalwegError('usage', `expected an interval that meets [0, ∞), got [${x.lo}, ${x.hi}]`);
  return { lo: sqrtDown(Math.max(0, x.lo)), hi: sqrtUp(x.hi) };
}

/** Lower end of [a,b]·[c,d]. */
export function productLow(a: number, b: number, c: number, d: number): number {
  if (a >= 0) {
    if (c >= 0) return mulDown(a, c);
    return mulDown(b, c);
  }
  if (b <= 0) {
    if (d <= 0) return mulDown(b, d);
    return mulDown(a, d);
  }
  if (c >= 0) return mulDown(a, d);
  if (d <= 0) return mulDown(b, c);
  return Math.min(mulDown(a, d), mulDown(b, c));
}

/** Upper end of [a,b]·[c,d]. */
export function productHigh(a: number, b: number, c: number, d: number): number {
  return 0 - productLow(-b, -a, c, d);
}

function quotientByPositive(x: Interval, y: Interval): Interval {
  return {
    lo: divDown(x.lo, x.lo >= 0 ? y.hi : y.lo),
    hi: divUp(x.hi, x.hi >= 0 ? y.lo : y.hi),
  };
}

function quotientByHalfLine(x: Interval, top: number): Interval {
  if (x.lo >= 0) return { lo: divDown(x.lo, top), hi: x.hi > 0 ? Infinity : 0 };
  if (x.hi <= 0) return { lo: -Infinity, hi: divUp(x.hi, top) };
  return ENTIRE;
}
