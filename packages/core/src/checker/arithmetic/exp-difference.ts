import { exp } from './interval-exp.js';
import { type Interval, ZERO, div, mul, sub } from './interval.js';
import { DIVIDED_DIFFERENCE_RANGE, EXP_DIFFERENCE_TERMS } from './limits.js';
import { mulDown, mulUp, subDown, subUp } from './rounding.js';

/**
 * Divided difference exp[x_0,…,x_k], k ≤ 4, arguments equal or not, infinite ones by limits: the mean of exp over their simplex
 * divided by k!, hence increasing in every argument (Hermite–Genocchi). exp[0,z] = (e^z−1)/z, exp[0,0,z] = (e^z−1−z)/z².
 */
export function expDifference(args: readonly Interval[]): Interval {
  const low = differenceOfPoints(args.map(({ lo }) => lo).sort(ascending));
  if (args.every(({ lo, hi }) => lo === hi)) return low;
  return { lo: low.lo, hi: differenceOfPoints(args.map(({ hi }) => hi).sort(ascending)).hi };
}

const ascending = (x: number, y: number): number => x - y || 0;

/** Ascending doubles. */
function differenceOfPoints(x: readonly number[]): Interval {
  const k = x.length - 1;
  const first = x[0];
  const last = x[k];
  if (k === 0) return exp({ lo: first, hi: first });
  if (first === -Infinity) return last === Infinity ? { lo: 0, hi: Infinity } : ZERO;
  if (last === Infinity) return { lo: Number.MAX_VALUE, hi: Infinity };
  const spread: Interval = { lo: subDown(last, first), hi: subUp(last, first) };
  if (spread.hi <= DIVIDED_DIFFERENCE_RANGE) return nearFirst(x);
  const { lo, hi } = div(sub(differenceOfPoints(x.slice(1)), differenceOfPoints(x.slice(0, k))), spread);
  return { lo: Math.max(0, lo), hi };
}

/** e^{x_0} Σ_j h_j(x − x_0)/(j+k)!, h_j the complete symmetric polynomials: no term is negative. */
function nearFirst(x: readonly number[]): Interval {
  const base = exp({ lo: x[0], hi: x[0] });
  const low = series(x.map((y) => subDown(y, x[0])));
  const high = x[x.length - 1] === x[0] ? low : series(x.map((y) => subUp(y, x[0])));
  return mul(base, { lo: mulDown(low, 1 - SERIES_ERROR), hi: mulUp(high, 1 + SERIES_ERROR) });
}

/**
 * Relative error of the sum: every monomial meets at most 2(n+k) + n + 2 < 80 roundings of 2^-53 for n = EXP_DIFFERENCE_TERMS,
 * k ≤ 4; h_j ≤ C(j+k,k) for arguments up to 1, so that the terms left out are below Σ_{j≥n} 1/j! < 2^-56 of the first.
 */
const SERIES_ERROR = 48 * Number.EPSILON;

/** Σ_j h_j(d)/(j+k)! in doubles, 0 ≤ d ≤ 1. */
function series(d: readonly number[]): number {
  const k = d.length - 1;
  H.fill(0);
  H[0] = 1;
  for (const y of d) {
    if (y > 0) for (let j = 1; j < EXP_DIFFERENCE_TERMS; j++) H[j] += y * H[j - 1];
  }
  let sum = 0;
  for (let j = EXP_DIFFERENCE_TERMS - 1; j >= 0; j--) sum += H[j] / FACTORIALS[j + k];
  return sum;
}

const H = new Float64Array(EXP_DIFFERENCE_TERMS);

/** j! for j ≤ 22, exact as doubles. */
const FACTORIALS = Float64Array.from({ length: 23 }, (_, n) => {
  let product = 1;
  for (let i = 2; i <= n; i++) product *= i;
  return product;
});
