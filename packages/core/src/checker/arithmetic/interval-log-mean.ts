import { type Interval, ZERO, add, div, mul, point, sub } from './interval.js';
import { logRatio } from './interval-log.js';
import { DIVIDED_DIFFERENCE_RANGE, DIVIDED_DIFFERENCE_TERMS } from './limits.js';
import { addUp, divDown, divUp, mulDown, mulUp, sqrtDown, sqrtUp, subDown, subUp } from './rounding.js';

/*
 * The logarithmic mean is a divided difference of the exponential: Λ(x,y) = exp[log x, log y]. Hence
 *     (Λ(x1,y) − Λ(x2,y))/(x1 − x2) = S(x1,x2,y)/Λ(x1,x2),   S(x,y,z) = exp[log x, log y, log z],
 * with S symmetric in its three arguments. S is formed from the pair of arguments farthest apart, or by its series when
 * all three are close: either way without cancellation.
 */

/** Λ(x,y) = (x−y)/(log x−log y) for x, y ≥ 0: increasing in both. */
export function logarithmicMean(x: Interval, y: Interval): Interval {
  const low = meanOfPoints(x.lo, y.lo);
  if (x.lo === x.hi && y.lo === y.hi) return low;
  return { lo: low.lo, hi: meanOfPoints(x.hi, y.hi).hi };
}

/** ∂Λ(x,y)/∂x for x, y ≥ 0: decreasing in x, increasing in y. */
export function logarithmicMeanSlope(x: Interval, y: Interval): Interval {
  return logarithmicMeanDifference(x, x, y);
}

/** (Λ(x1,y) − Λ(x2,y))/(x1 − x2), the slope where x1 = x2: decreasing in x1 and x2 (Λ is concave), increasing in y. */
export function logarithmicMeanDifference(x1: Interval, x2: Interval, y: Interval): Interval {
  const low = differenceOfPoints(x1.hi, x2.hi, y.lo);
  if (x1.lo === x1.hi && x2.lo === x2.hi && y.lo === y.hi) return low;
  return { lo: low.lo, hi: differenceOfPoints(x1.lo, x2.lo, y.hi).hi };
}

function meanOfPoints(x: number, y: number): Interval {
  if (!(x > 0 && y > 0)) return ZERO;
  if (x === Infinity || y === Infinity) return { lo: 0, hi: Infinity };
  if (x === y) return { lo: x, hi: x };
  return div({ lo: subDown(x, y), hi: subUp(x, y) }, logRatio(x, y));
}

function differenceOfPoints(x1: number, x2: number, y: number): Interval {
  if (!(y > 0) || x1 === Infinity || x2 === Infinity) return ZERO;
  const a = Math.min(x1, x2);
  const b = Math.max(x1, x2);
  if (y === Infinity || !(b > 0)) return { lo: 0, hi: Infinity };
  if (!(a > 0)) return div(meanOfPoints(b, y), point(b));
  return div(secondDifferenceOfExp(a, b, y), meanOfPoints(a, b));
}

/** exp[log x, log y, log z] for finite doubles x, y, z > 0. */
function secondDifferenceOfExp(x: number, y: number, z: number): Interval {
  const a = Math.min(x, y, z);
  const c = Math.max(x, y, z);
  if (a === c) return { lo: mulDown(a, 0.5), hi: mulUp(a, 0.5) };
  const b = Math.max(Math.min(x, y), Math.min(Math.max(x, y), z));
  const spread = logRatio(c, a);
  if (spread.lo > DIVIDED_DIFFERENCE_RANGE) return div(sub(meanOfPoints(b, c), meanOfPoints(a, b)), spread);
  // Around m = √(ac) the arguments are −g, t, g with |t| ≤ g ≤ 1/2: e^m Σ h_k/(k+2)! over complete symmetric polynomials.
  const g: Interval = { lo: spread.lo / 2, hi: spread.hi / 2 };
  const twice = add(logRatio(b, a), logRatio(b, c));
  const series = symmetricSeries({ lo: twice.lo / 2, hi: twice.hi / 2 }, g);
  return mul(mul({ lo: sqrtDown(a), hi: sqrtUp(a) }, { lo: sqrtDown(c), hi: sqrtUp(c) }), series);
}

const SIXTH: Interval = { lo: divDown(1, 6), hi: divUp(1, 6) };

/** 1/(k+2)! for k < DIVIDED_DIFFERENCE_TERMS. */
const COEFFICIENTS = inverseFactorials();

/** exp[−g, t, g] = Σ_k h_k(−g,t,g)/(k+2)! = 1/2 + t/6 + f(t,g) for |t| ≤ g ≤ 1/2, up to rounding. */
function symmetricSeries(t: Interval, g: Interval): Interval {
  const f = seriesFromSecond(t.hi, g.hi);
  // Third divided differences of exp lie in [e^{-1/2}, e^{1/2}]/6 here, so |∂f/∂t| < 0.11 and |∂f/∂g| < 0.18.
  const spread = Math.max(subUp(t.hi, t.lo), subUp(g.hi, g.lo));
  const error = addUp(SERIES_ERROR, mulUp(0.34, spread));
  return add(add({ lo: 0.5, hi: 0.5 }, mul(t, SIXTH)), { lo: subDown(f, error), hi: addUp(f, error) });
}

/**
 * Absolute error of the sum below. Each monomial of h_k meets at most 3k+4 roundings of 2^-53 on its way and
 * |h_k| ≤ (k+1)(k+2)g^k/2, so that the error is at most Σ_{k≥2} (3k+4)g^k/(2·k!) < 0.79 of 2^-53 for g ≤ 1/2; the terms
 * left out are below g^n/n! < 2^-60.
 */
const SERIES_ERROR = 0.5 * Number.EPSILON;

/** Σ_{k≥2} h_k(−g,t,g)/(k+2)! with h_k = t h_{k−1} + (g^k if k is even). */
function seriesFromSecond(t: number, g: number): number {
  const squared = g * g;
  let power = squared;
  let h = t * t + squared;
  TERMS[2] = h * COEFFICIENTS[2];
  for (let k = 3; k < DIVIDED_DIFFERENCE_TERMS; k++) {
    h *= t;
    if (k % 2 === 0) {
      power *= squared;
      h += power;
    }
    TERMS[k] = h * COEFFICIENTS[k];
  }
  let sum = 0;
  for (let k = DIVIDED_DIFFERENCE_TERMS - 1; k >= 2; k--) sum += TERMS[k];
  return sum;
}

const TERMS = new Float64Array(DIVIDED_DIFFERENCE_TERMS);

function inverseFactorials(): Float64Array {
  let factorial = 1; // exact as a double up to 22!
  return Float64Array.from({ length: DIVIDED_DIFFERENCE_TERMS }, (_, k) => 1 / (factorial *= k + 2));
}
