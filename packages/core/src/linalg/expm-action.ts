import { ThalwegError } from '../errors.js';
import { EPSILON, TAYLOR_STEP_NORM } from '../tolerances.js';
import { requireFinite } from './shape-checks.js';

/**
 * e^{tL} x by Taylor steps whose degree is fixed beforehand from `normBound` ≥ ‖L‖ (any operator norm): with h = |t| ‖L‖ /
 * steps ≤ 2 the remainder of each step is at most ε ‖x‖, so the truncation is below rounding (Al-Mohy & Higham, SIAM J.
 * Sci. Comput. 33 (2011) choose longer steps; these lose digits to cancellation). Error about ε(1 + |t|‖L‖) sup ‖e^{sL}x‖.
 * `apply` returns L y as a new array. Throws `not-finite`, and `usage` for a bound that is not a number ≥ 0.
 */
export function expmAction(
  apply: (x: Float64Array) => Float64Array,
  t: number,
  x: Float64Array,
  normBound: number,
): Float64Array {
  requireFinite(x);
  const total = Math.abs(t) * normBound;
  if (!(normBound >= 0) || !(total < Infinity)) {
    throw new ThalwegError('usage', `expected a finite time and a norm bound ≥ 0, got ${t} and ${normBound}`);
  }
  const steps = Math.max(1, Math.ceil(total / TAYLOR_STEP_NORM));
  const degree = taylorDegree(total / steps);
  let y: Float64Array = x.slice();
  for (let step = 0; step < steps; step++) y = taylorStep(apply, t / steps, y, degree);
  return y;
}

/** The least m with Σ_{k>m} h^k/k! ≤ ε. */
function taylorDegree(h: number): number {
  let m = 0;
  let next = h;
  // The tail is at most its first term times 1/(1 − h/(m + 2)).
  while (next * (m + 2) > EPSILON * (m + 2 - h) || m + 2 <= h) {
    m++;
    next *= h / (m + 1);
  }
  return m;
}

function taylorStep(
  apply: (x: Float64Array) => Float64Array,
  t: number,
  x: Float64Array,
  degree: number,
): Float64Array {
  const terms = [x];
  for (let k = 1; k <= degree; k++) {
    const image = apply(terms[k - 1]);
    const factor = t / k;
    terms.push(image.map((value) => value * factor));
  }
  // Smallest terms first.
  const sum = terms[degree].slice();
  for (let k = degree - 1; k >= 0; k--) {
    const term = terms[k];
    for (let i = 0; i < sum.length; i++) sum[i] += term[i];
  }
  return sum;
}
