import { dot, norm } from '../linalg/real-vector.js';
import { fromCoordinates } from '../algebra/block-algebra.js';
import { choleskyRealInto, choleskySolveReal } from '../linalg/cholesky-real.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { EPSILON } from '../tolerances.js';
import { DUAL_HALVINGS, DUAL_RIDGE, DUAL_STEPS, METRIC_ROUNDING, SLOPE_ROUNDING } from './tolerances.js';
import type { DiscretePath } from './discrete-path.js';
import type { MetricAt, MetricKernel } from './metric-kernel.js';
import type { Control, PotentialSpline } from './potential-spline.js';
import { controlsOf } from './potential-spline.js';
import type { TangentSpace } from './tangent-space.js';

export interface DualBound {
  /** Lower bound of W²/2. */
  readonly value: number;
  readonly margin: number;
}

export interface DualOptions {
  /** Equal parts into which every piece of the spline is cut. */
  readonly parts: number;
  /** What of W²/2 may be lost, in all, by not finding the best supporting state. */
  readonly tolerance: number;
  readonly stop?: () => boolean;
}

/**
 * Lower bound of W²/2 by a path of potentials A_t, any path at all (Kantorovich duality in its Hamilton–Jacobi form: Otto &
 * Villani 2000; Erbar, Maas & Wirth, Calc. Var. 58 (2019)): along every curve with ρ̇ = 𝒟_ρB,
 * d/dt Tr ρA = Tr ρȦ + <B,𝒟_ρA> ≤ Tr ρȦ + ½‖A‖²_ρ + ½‖B‖²_ρ, so
 * W²/2 ≥ Tr ρ₁A₁ − Tr ρ₀A₀ − ∫ m(t) dt, m(t) ≥ Tr ρȦ + ½‖A‖²_ρ for all ρ with E†ρ = E†ρ₀.
 * On a quadratic piece with control points P_i, ‖A_t‖² ≤ Σ b_i(t)‖P_i‖² by convexity, so three bounds m_i make one integral. Each
 * is a concave, homogeneous function of ρ, below its supporting hyperplane at any ρ̂: m ≤ Tr E†ρ₀ f + λ_max(Q + ½∂‖P‖² − f) for
 * every f among the fixed points. Newton's method looks for the best ρ̂; a bad one costs sharpness, never truth.
 */
export function dualBound(
  kernel: MetricKernel,
  space: TangentSpace,
  spline: PotentialSpline,
  path: DiscretePath,
  { parts, tolerance, stop }: DualOptions,
): DualBound | null {
  const [start, end] = [path.states[0], path.states[path.states.length - 1]];
  const controls = controlsOf(kernel, spline, path, parts);
  const [first, last] = [controls[0], controls[controls.length - 1]];
  let value = dot(last.point, end) - dot(first.point, start);
  let margin = METRIC_ROUNDING * EPSILON * (norm(last.point) * norm(end) + norm(first.point) * norm(start));
  for (const control of controls) {
    if (stop?.()) return null;
    const found = supportingBound(kernel, space, control, start, tolerance);
    if (!found) return null;
    value -= control.weight * found.value;
    margin += control.weight * found.margin + SLOPE_ROUNDING * EPSILON * norm(control.point);
  }
  return { value, margin };
}

/** Upper bound of Tr ρQ + ½‖P‖²_ρ over states with the conserved part of `start`. */
function supportingBound(
  kernel: MetricKernel,
  space: TangentSpace,
  { point, slope, guess }: Control,
  start: Float64Array,
  tolerance: number,
): DualBound | null {
  let best: DualBound | null = null;
  let rho = guess;
  let at = kernel.at(rho);
  for (let k = 0; at && k < DUAL_STEPS; k++) {
    const gradient = at.gradient(point).map((g, i) => slope[i] + g / 2);
    const found = hyperplane(kernel, space, gradient, start, norm(slope));
    if (!best || found.value < best.value) best = found;
    // What the hyperplane bound exceeds the function by at ρ̂ is all that can be gained.
    if (found.value - dot(gradient, rho) <= tolerance) break;
    const next = newtonState(kernel, space, at, rho, gradient, point);
    if (!next) break;
    ({ rho, at } = next);
  }
  return best;
}

function hyperplane(
  { model: { algebra } }: MetricKernel,
  space: TangentSpace,
  gradient: Float64Array,
  start: Float64Array,
  size: number,
): DualBound {
  const fixed = space.fixedPart(gradient);
  const rest = gradient.map((x, i) => x - fixed[i]);
  const top = kernelTop(
    fromCoordinates(algebra, rest),
    algebra.blocks.every((n) => n === 1),
  );
  const margin = METRIC_ROUNDING * algebra.size * EPSILON * (norm(gradient) + size);
  return { value: dot(fixed, start) + top, margin };
}

function kernelTop(a: ReturnType<typeof fromCoordinates>, commutative: boolean): number {
  if (!commutative) {
    const values = hermitianEigenvalues(a);
    return values[values.length - 1];
  }
  let top = -Infinity;
  for (let i = 0; i < a.rows; i++) top = Math.max(top, a.re[i * a.rows + i]);
  return top;
}

/** One damped Newton step of the concave maximisation, inside the faithful states. */
function newtonState(
  kernel: MetricKernel,
  space: TangentSpace,
  at: MetricAt,
  rho: Float64Array,
  gradient: Float64Array,
  point: Float64Array,
): { rho: Float64Array; at: MetricAt } | null {
  const d = space.count;
  const hessian = space.reduceMatrix(at.hessian(point));
  let size = 0;
  for (let i = 0; i < d; i++) size = Math.max(size, Math.abs(hessian[i * d + i]));
  for (let p = 0; p < hessian.length; p++) hessian[p] /= -2;
  for (let i = 0; i < d; i++) hessian[i * d + i] += DUAL_RIDGE * size;
  if (!(size > 0) || choleskyRealInto(hessian, d, hessian) >= 0) return null;
  const step = space.expand(choleskySolveReal(hessian, d, space.reduce(gradient)));
  for (let k = 0, t = 1; k < DUAL_HALVINGS; k++, t /= 2) {
    const next = rho.map((x, i) => x + t * step[i]);
    const found = kernel.at(next);
    if (found) return { rho: next, at: found };
  }
  return null;
}
