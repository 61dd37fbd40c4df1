import { ThalwegError } from '../errors.js';
import { EPSILON } from '../tolerances.js';

export interface ScalarMinimum {
  readonly x: number;
  readonly value: number;
  readonly evaluations: number;
}

/**
 * A local minimum of f on [lower, upper] by golden section and parabolas (Brent, Algorithms for Minimization without
 * Derivatives (1973), ch. 5); the global one when f is unimodal. `tolerance` is the absolute accuracy asked of x; below
 * √2⁻⁵²·|x| it cannot be met and costs evaluations only. A value NaN counts as +∞. The end points themselves are
 * approached, not evaluated. Throws `usage` unless lower ≤ upper are finite.
 */
export function minimiseScalar(
  f: (x: number) => number,
  lower: number,
  upper: number,
  tolerance: number,
): ScalarMinimum {
  if (!Number.isFinite(lower) || !Number.isFinite(upper) || lower > upper) {
    throw new ThalwegError('usage', `expected a finite interval with lower ≤ upper, got [${lower}, ${upper}]`);
  }
  let evaluations = 0;
  const evaluate = (x: number): number => {
    evaluations++;
    const value = f(x);
    return Number.isNaN(value) ? Infinity : value;
  };
  let a = lower;
  let b = upper;
  // x: least value so far; w: second least; v: the previous w.
  let x = a + GOLDEN * (b - a);
  let w = x;
  let v = x;
  let fx = evaluate(x);
  let fw = fx;
  let fv = fx;
  let step = 0;
  let before = 0;
  for (let iteration = 0; iteration < MAX_ITERATIONS; iteration++) {
    const middle = (a + b) / 2;
    const tol = 4 * EPSILON * Math.abs(x) + tolerance / 3;
    if (Math.abs(x - middle) <= 2 * tol - (b - a) / 2 || !(tol > 0)) break;
    const parabolic = Math.abs(before) > tol ? parabolaStep(x, w, v, fx, fw, fv) : NaN;
    if (Math.abs(parabolic) < Math.abs(before) / 2 && x + parabolic > a && x + parabolic < b) {
      before = step;
      step = parabolic;
      const u = x + step;
      if (u - a < 2 * tol || b - u < 2 * tol) step = x < middle ? tol : -tol;
    } else {
      before = x < middle ? b - x : a - x;
      step = GOLDEN * before;
    }
    const u = x + (Math.abs(step) >= tol ? step : step > 0 ? tol : -tol);
    const fu = evaluate(u);
    if (fu <= fx) {
      if (u < x) b = x;
      else a = x;
      [v, fv, w, fw, x, fx] = [w, fw, x, fx, u, fu];
    } else {
      if (u < x) a = u;
      else b = u;
      if (fu <= fw || w === x) [v, fv, w, fw] = [w, fw, u, fu];
      else if (fu <= fv || v === x || v === w) [v, fv] = [u, fu];
    }
  }
  return { x, value: fx, evaluations };
}

/** (3 − √5)/2, the golden section of an interval. */
const GOLDEN = 0.3819660112501051;

const MAX_ITERATIONS = 500;

/** Step from x to the vertex of the parabola through the three points; NaN or ±∞ when there is none. */
function parabolaStep(x: number, w: number, v: number, fx: number, fw: number, fv: number): number {
  const r = (x - w) * (fx - fv);
  const q = (x - v) * (fx - fw);
  return -((x - v) * q - (x - w) * r) / (2 * (q - r));
}
