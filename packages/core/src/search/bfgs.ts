import { dot, norm } from '../linalg/real-vector.js';
import { ThalwegError } from '../errors.js';
import { EPSILON, WOLFE_BISECTIONS, WOLFE_CURVATURE, WOLFE_DECREASE, WOLFE_VISIBLE } from '../tolerances.js';

/** Fills `gradient` and returns the value at x; may return +∞ or NaN outside its domain, where the gradient is ignored. */
export type Objective = (x: Float64Array, gradient: Float64Array) => number;

export interface BfgsOptions {
  /** Steps at most; default 500. */
  readonly maxIterations?: number;
  /** Stop when the Euclidean norm of the gradient is at most this; default 1e-10. */
  readonly gradientTolerance?: number;
  /** Stop when `patience` steps in a row each lower the value by at most this times max(1, |value|); default 1e-14. */
  readonly valueTolerance?: number;
  /** Default 5: a single short step is common at a kink, several in a row are not. */
  readonly patience?: number;
  /** Asked before every evaluation; true ends the search at the best point so far. */
  readonly stop?: () => boolean;
}

export type BfgsReason = 'gradient' | 'value' | 'iterations' | 'line-search' | 'unbounded' | 'stopped';

export interface BfgsResult {
  readonly x: Float64Array;
  /** Never above the value at the start. */
  readonly value: number;
  readonly iterations: number;
  readonly evaluations: number;
  /** `line-search` is the usual end at a non-smooth minimum: no step lowers the value any more. */
  readonly reason: BfgsReason;
}

/**
 * Minimise a function of n variables by BFGS with the weak Wolfe bisection line search, which is fit for minima where
 * the function is not differentiable (Lewis & Overton, Math. Program. 141 (2013)). The value decreases in every step.
 * Throws `usage` when the value at the start is not finite.
 */
export function minimiseBfgs(objective: Objective, x0: Float64Array, options: BfgsOptions = {}): BfgsResult {
  const { maxIterations = 500, gradientTolerance = 1e-10, valueTolerance = 1e-14, patience = 5, stop } = options;
  const w = workspace(x0);
  let value = objective(w.x, w.gradient);
  let evaluations = 1;
  let quiet = 0;
  let iterations = 0;
  let fresh = true;
  const finish = (reason: BfgsReason): BfgsResult => ({ x: w.x, value, iterations, evaluations, reason });
  if (value === -Infinity) return finish('unbounded');
  if (!Number.isFinite(value)) {
    throw new ThalwegError('usage', `expected a finite value at the start of a minimisation, got ${value}`);
  }
  for (;;) {
    if (norm(w.gradient) <= gradientTolerance) return finish('gradient');
    if (iterations >= maxIterations) return finish('iterations');
    const slope = descentDirection(w);
    if (!(slope < 0)) {
      if (fresh) return finish('line-search');
      resetInverse(w);
      fresh = true;
      continue;
    }
    const first = fresh ? Math.min(1, 1 / norm(w.gradient)) : 1;
    const step = wolfeSearch(objective, w, value, slope, first, stop);
    evaluations += step.evaluations;
    if (step.value < value) {
      iterations++;
      quiet = value - step.value <= valueTolerance * Math.max(1, Math.abs(step.value)) ? quiet + 1 : 0;
      value = step.value;
      fresh = !acceptStep(w, fresh) && fresh;
    } else if (step.outcome === 'failed' && fresh) {
      return finish('line-search');
    }
    if (step.outcome === 'stopped') return finish('stopped');
    if (value === -Infinity) return finish('unbounded');
    if (step.outcome === 'failed') {
      // One more try along the plain gradient: a bad inverse Hessian must not end the search.
      resetInverse(w);
      fresh = true;
    }
    if (quiet >= patience) return finish('value');
  }
}

/** All arrays of one minimisation, so that the loop allocates nothing that grows with n. */
interface Workspace {
  readonly n: number;
  readonly x: Float64Array;
  readonly gradient: Float64Array;
  readonly trial: Float64Array;
  readonly trialGradient: Float64Array;
  readonly best: Float64Array;
  readonly bestGradient: Float64Array;
  readonly direction: Float64Array;
  readonly difference: Float64Array;
  readonly product: Float64Array;
  /** Inverse Hessian estimate, row-major n×n. */
  readonly inverse: Float64Array;
}

function workspace(x0: Float64Array): Workspace {
  const n = x0.length;
  const vector = (): Float64Array => new Float64Array(n);
  const w: Workspace = {
    n,
    x: x0.slice(),
    gradient: vector(),
    trial: vector(),
    trialGradient: vector(),
    best: vector(),
    bestGradient: vector(),
    direction: vector(),
    difference: vector(),
    product: vector(),
    inverse: new Float64Array(n * n),
  };
  resetInverse(w);
  return w;
}

function resetInverse({ n, inverse }: Workspace, diagonal = 1): void {
  inverse.fill(0);
  for (let i = 0; i < n; i++) inverse[i * n + i] = diagonal;
}

/** direction = −inverse·gradient; returns the slope along it. */
function descentDirection({ n, inverse, gradient, direction }: Workspace): number {
  let slope = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0, k = i * n; j < n; j++, k++) sum += inverse[k] * gradient[j];
    direction[i] = -sum;
    slope -= sum * gradient[i];
  }
  return slope;
}

interface Step {
  readonly value: number;
  readonly evaluations: number;
  readonly outcome: 'wolfe' | 'failed' | 'stopped';
}

/** Lewis & Overton (2013), Algorithm 2.6. The best point with sufficient decrease is left in `best`, Wolfe or not. */
function wolfeSearch(
  objective: Objective,
  w: Workspace,
  value: number,
  slope: number,
  first: number,
  stop: (() => boolean) | undefined,
): Step {
  const { n, x, direction, trial, trialGradient, best, bestGradient } = w;
  let low = 0;
  let high = Infinity;
  let t = first;
  let bestValue = value;
  for (let evaluations = 1; evaluations <= WOLFE_BISECTIONS; evaluations++) {
    if (stop?.()) return { value: bestValue, evaluations: evaluations - 1, outcome: 'stopped' };
    // A decrease below the rounding of the value cannot be seen.
    if (-t * slope <= EPSILON * Math.abs(value) * WOLFE_VISIBLE) {
      return { value: bestValue, evaluations: evaluations - 1, outcome: 'failed' };
    }
    for (let i = 0; i < n; i++) trial[i] = x[i] + t * direction[i];
    const trialValue = objective(trial, trialGradient);
    if (trialValue <= value + WOLFE_DECREASE * t * slope) {
      if (trialValue < bestValue) {
        bestValue = trialValue;
        best.set(trial);
        bestGradient.set(trialGradient);
      }
      if (trialValue === -Infinity) return { value: trialValue, evaluations, outcome: 'wolfe' };
      if (dot(trialGradient, direction) >= WOLFE_CURVATURE * slope) {
        // The Wolfe point is the one to step to: only there is the curvature of the update positive.
        best.set(trial);
        bestGradient.set(trialGradient);
        return { value: trialValue, evaluations, outcome: trialValue < value ? 'wolfe' : 'failed' };
      }
      low = t;
    } else {
      high = t;
    }
    t = high < Infinity ? (low + high) / 2 : 2 * low;
    if (!(t > low) || !(t < high) || !Number.isFinite(t)) return { value: bestValue, evaluations, outcome: 'failed' };
  }
  return { value: bestValue, evaluations: WOLFE_BISECTIONS, outcome: 'failed' };
}

/** Move to `best` and update the inverse Hessian; false when the curvature along the step is not positive. */
function acceptStep(w: Workspace, first: boolean): boolean {
  const { n, x, gradient, best, bestGradient, direction: s, difference: y, product, inverse } = w;
  for (let i = 0; i < n; i++) {
    s[i] = best[i] - x[i];
    y[i] = bestGradient[i] - gradient[i];
  }
  x.set(best);
  gradient.set(bestGradient);
  const curvature = dot(s, y);
  const length = dot(y, y);
  if (!(curvature > 0) || !Number.isFinite(1 / curvature) || !Number.isFinite(length)) return false;
  if (first) resetInverse(w, curvature / length);
  let quadratic = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0, k = i * n; j < n; j++, k++) sum += inverse[k] * y[j];
    product[i] = sum;
    quadratic += sum * y[i];
  }
  const scale = (1 + quadratic / curvature) / curvature;
  for (let i = 0; i < n; i++) {
    const si = s[i] * scale - product[i] / curvature;
    const pi = s[i] / curvature;
    for (let j = 0, k = i * n; j < n; j++, k++) inverse[k] += si * s[j] - pi * product[j];
  }
  return true;
}
