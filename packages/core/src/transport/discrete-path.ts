import { choleskyRealInto, choleskySolveReal } from '../linalg/cholesky-real.js';
import type { MetricAt, MetricKernel } from './metric-kernel.js';
import type { TangentSpace } from './tangent-space.js';

/** A path of states on a mesh: ρ_k = base + B y_k at times t_0 = 0 < … < t_K = 1. */
export interface DiscretePath {
  readonly times: Float64Array;
  /** K + 1 vectors of D coordinates. */
  readonly states: readonly Float64Array[];
}

/** One piece of a path: the metric at its midpoint and the potential that moves it. */
export interface Piece {
  /** t_{k+1} − t_k. */
  readonly step: number;
  /** Midpoint state, D coordinates. */
  readonly middle: Float64Array;
  /** Bᵀ(ρ_{k+1} − ρ_k)/step, length d. */
  readonly velocity: Float64Array;
  readonly at: MetricAt;
  /** Cholesky factor of Bᵀ𝒟B at the midpoint. */
  readonly factor: Float64Array;
  /** a = (Bᵀ𝒟B)⁻¹ velocity. */
  readonly potential: Float64Array;
  /** <velocity, a>, the squared speed. */
  readonly speed: number;
}

export interface Action {
  /** Σ step · speed, the midpoint rule for ∫ Tr ρ̇ 𝒟_ρ⁻¹ ρ̇ dt; convex in the states. */
  readonly value: number;
  readonly pieces: readonly Piece[];
}

/** The midpoint action of a path; null where a midpoint or a node inside is no faithful state. */
export function actionOf(kernel: MetricKernel, space: TangentSpace, { times, states }: DiscretePath): Action | null {
  const pieces: Piece[] = [];
  let value = 0;
  for (let k = 0; k + 1 < states.length; k++) {
    const step = times[k + 1] - times[k];
    const [from, to] = [states[k], states[k + 1]];
    const middle = from.map((x, i) => (x + to[i]) / 2);
    const velocity = space.reduce(from.map((x, i) => (to[i] - x) / step));
    const at = kernel.at(middle);
    if (!at) return null;
    const factor = space.reduceMatrix(at.metric());
    if (choleskyRealInto(factor, space.count, factor) >= 0) return null;
    const potential = choleskySolveReal(factor, space.count, velocity.slice());
    let speed = 0;
    for (let i = 0; i < potential.length; i++) speed += potential[i] * velocity[i];
    value += step * speed;
    pieces.push({ step, middle, velocity, at, factor, potential, speed });
  }
  return Number.isFinite(value) ? { value, pieces } : null;
}
