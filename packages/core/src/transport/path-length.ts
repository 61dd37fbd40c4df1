import { choleskyRealInto, choleskySolveReal } from '../linalg/cholesky-real.js';
import { EPSILON } from '../tolerances.js';
import { BOUNDARY_EIGENVALUE, BOUNDARY_PARTS, BOUNDARY_RATIO, METRIC_ROUNDING, STEEP_PIECE } from './tolerances.js';
import type { DiscretePath } from './discrete-path.js';
import type { MetricKernel } from './metric-kernel.js';
import { between } from './refine-path.js';
import type { TangentSpace } from './tangent-space.js';

/** Upper bound of the length of a polygon of states. */
export interface LengthBound {
  /** A length; +∞ where the metric could not be resolved. */
  readonly value: number;
  /** Bound on its rounding error. */
  readonly margin: number;
}

/**
 * The polygon through the states of a path is an admissible curve, and along a straight piece ρ + sΔ the action <Δ,𝒟⁻¹Δ> is
 * convex in s, as it is jointly convex in state and velocity: the trapezoidal rule bounds it from above, so each piece is at most
 * √(mean of the action at its ends) long. A piece from a state that is not faithful is cut in a geometric sequence; what is left,
 * of relative size τ, is at most 2√(τ c) long with c the action at the faithful end, since ρ ≥ s·(faithful end) there.
 */
export function lengthBound(kernel: MetricKernel, space: TangentSpace, path: DiscretePath): LengthBound {
  let value = 0;
  let margin = 0;
  const add = (found: LengthBound): void => {
    value += found.value;
    margin += found.margin;
  };
  const nodes = path.states.map((x) => speedAt(kernel, space, x));
  for (let k = 0; k + 1 < nodes.length; k++) {
    const [from, to] = [path.states[k], path.states[k + 1]];
    const [near, far] = [nodes[k], nodes[k + 1]];
    if (!near && !far) return { value: Infinity, margin: 0 };
    add(straightLength(kernel, space, [from, near], [to, far]));
  }
  return { value, margin };
}

type Node = readonly [state: Float64Array, speed: SpeedAt | null];

/** A straight piece, cut where the action at one end is much larger than at the other. */
function straightLength(kernel: MetricKernel, space: TangentSpace, from: Node, to: Node): LengthBound {
  const step = space.reduce(difference(from[0], to[0]));
  const [near, far] = [from[1], to[1]];
  const [c, e] = [near, far].map((speed) => speed?.squared(step).value ?? Infinity);
  if (near && far && c <= STEEP_PIECE * e && e <= STEEP_PIECE * c) return pieceLength(near, far, step);
  return c > e ? steepLength(kernel, space, from, to) : steepLength(kernel, space, to, from);
}

/** <v,𝒟_ρ⁻¹v> for a reduced velocity, with a bound on its error; and on the length of the step that rounds ρ to doubles. */
interface SpeedAt {
  squared(velocity: Float64Array): LengthBound;
  readonly rounding: number;
}

function speedAt(kernel: MetricKernel, space: TangentSpace, rho: Float64Array): SpeedAt | null {
  const at = kernel.at(rho);
  if (!at || !(at.smallest > BOUNDARY_EIGENVALUE)) return null;
  const d = space.count;
  const metric = space.reduceMatrix(at.metric());
  let size = 0;
  for (const x of metric) size += x * x;
  const rounding = METRIC_ROUNDING * space.dimension * EPSILON;
  const factor = new Float64Array(d * d);
  if (choleskyRealInto(metric, d, factor) >= 0) return null;
  const inverseTrace = traceOfInverse(factor, d);
  return {
    // A state is known to rounding only; the step to what it stands for is straight and as short as this.
    rounding: rounding * Math.sqrt(inverseTrace),
    squared(velocity) {
      const a = choleskySolveReal(factor, d, velocity.slice());
      let value = 0;
      let residual = 0;
      let norm = 0;
      for (let i = 0; i < d; i++) {
        let r = velocity[i];
        for (let j = 0; j < d; j++) r -= metric[i * d + j] * a[j];
        residual += r * r;
        value += velocity[i] * a[i];
        norm += a[i] * a[i];
      }
      // √c(v) ≤ √<a,𝒟a> + √<r,𝒟⁻¹r> for v = 𝒟a + r.
      const missed = Math.sqrt(residual * inverseTrace);
      const margin = rounding * Math.sqrt(size) * norm + 2 * Math.sqrt(Math.max(0, value)) * missed + missed * missed;
      return { value, margin };
    },
  };
}

function pieceLength(near: SpeedAt, far: SpeedAt, velocity: Float64Array): LengthBound {
  const [p, q] = [near.squared(velocity), far.squared(velocity)];
  const value = Math.sqrt(Math.max(0, (p.value + q.value) / 2));
  const squaredMargin = (p.margin + q.margin) / 2;
  const margin = Math.sqrt(value * value + squaredMargin) - value;
  return { value, margin: margin + near.rounding + far.rounding };
}

/** Length bound of the straight piece between `edge`, on the boundary or near it, and the faithful state `inner`. */
function steepLength(
  kernel: MetricKernel,
  space: TangentSpace,
  [edge, atEdge]: Node,
  [inner, atInner]: Node,
): LengthBound {
  if (!atInner) return { value: Infinity, margin: 0 };
  const whole = space.reduce(difference(edge, inner));
  let value = 0;
  let margin = 0;
  let outer = atInner;
  let share = 1;
  for (let k = 0; k < BOUNDARY_PARTS; k++) {
    const next = speedAt(kernel, space, between(edge, inner, share * BOUNDARY_RATIO));
    if (!next) break;
    const piece = pieceLength(
      next,
      outer,
      whole.map((x) => share * (1 - BOUNDARY_RATIO) * x),
    );
    value += piece.value;
    margin += piece.margin;
    outer = next;
    share *= BOUNDARY_RATIO;
  }
  const full = atInner.squared(whole);
  const rest = 2 * Math.sqrt(share * (Math.max(0, full.value) + full.margin));
  if (!atEdge) return { value: value + rest, margin };
  const straight = pieceLength(
    atEdge,
    outer,
    whole.map((x) => share * x),
  );
  return straight.value < rest
    ? { value: value + straight.value, margin: margin + straight.margin }
    : { value: value + rest, margin };
}

function difference(from: Float64Array, to: Float64Array): Float64Array {
  return from.map((x, i) => to[i] - x);
}

/** Tr (LLᵀ)⁻¹ = ‖L⁻¹‖²_F. */
function traceOfInverse(l: Float64Array, d: number): number {
  const column = new Float64Array(d);
  let sum = 0;
  for (let k = 0; k < d; k++) {
    column.fill(0);
    column[k] = 1;
    for (let i = k; i < d; i++) {
      for (let j = k; j < i; j++) column[i] -= l[i * d + j] * column[j];
      column[i] /= l[i * d + i];
      sum += column[i] * column[i];
    }
  }
  return sum;
}
