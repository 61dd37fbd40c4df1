import { choleskySolveReal } from '../linalg/cholesky-real.js';
import {
  ACTION_ARMIJO,
  ACTION_DAMPING,
  ACTION_DECREMENT,
  ACTION_HALVINGS,
  ACTION_ITERATIONS,
  ACTION_RIDGES,
} from './tolerances.js';
import { type BlockTridiagonal, solveBlockTridiagonal } from './block-tridiagonal.js';
import { type Action, type DiscretePath, type Piece, actionOf } from './discrete-path.js';
import type { MetricKernel } from './metric-kernel.js';
import type { TangentSpace } from './tangent-space.js';

export interface MinimisedPath extends DiscretePath {
  readonly action: Action;
  readonly iterations: number;
  /** Newton decrement at the end, relative to the action: twice the relative distance to the minimum. */
  readonly decrement: number;
}

/**
 * Minimise the midpoint action over the inner nodes of a path by Newton's method with block tridiagonal Hessians (the action is
 * jointly convex: Carlen & Maas, J. Stat. Phys. 178 (2020); the discretisation of Benamou & Brenier, Numer. Math. 84 (2000)), damped
 * where its steps leave the faithful states. Null when the path that it starts from does.
 */
export function minimiseAction(
  kernel: MetricKernel,
  space: TangentSpace,
  start: DiscretePath,
  stop: () => boolean = () => false,
): MinimisedPath | null {
  const first = actionOf(kernel, space, start);
  if (!first) return null;
  let path = start;
  let action: Action = first;
  let decrement = Infinity;
  let damping = 0;
  let iterations = 0;
  while (iterations < ACTION_ITERATIONS && start.states.length > 2) {
    const { gradient, hessian } = derivativesOf(space, action.pieces);
    const step = newtonStep(hessian, gradient, space.count);
    decrement = step.slope / action.value;
    if (!(decrement > ACTION_DECREMENT) || stop()) break;
    let next: Moved | null = damping === 0 ? lineSearch(kernel, space, path, action, step) : null;
    while (!next && damping < ACTION_DAMPING.most) {
      damping = Math.max(ACTION_DAMPING.least, ACTION_DAMPING.factor * damping);
      const damped = dampedHessian(kernel, space, hessian, path, damping * action.value);
      next = lineSearch(kernel, space, path, action, newtonStep(damped, gradient, space.count));
    }
    if (!next) break;
    ({ path, action } = next);
    damping = damping > ACTION_DAMPING.least ? damping / ACTION_DAMPING.factor ** 2 : 0;
    iterations++;
  }
  return { ...path, action, iterations, decrement: Number.isFinite(decrement) ? decrement : 0 };
}

/**
 * The Hessian with `weight` · step · D²(−log det ρ_k) added at every inner node: its steps stay in the ellipsoids in which no eigenvalue
 * changes by more than a part of itself, where plain ones run into the boundary of state space.
 */
function dampedHessian(
  kernel: MetricKernel,
  space: TangentSpace,
  hessian: BlockTridiagonal,
  { times, states }: DiscretePath,
  weight: number,
): BlockTridiagonal {
  const diagonal = hessian.diagonal.map((block, k) => {
    const curvature = space.reduceMatrix(kernel.barrier(states[k + 1]));
    const factor = (weight * (times[k + 2] - times[k])) / 2;
    return block.map((x, p) => x + factor * curvature[p]);
  });
  return { diagonal, below: hessian.below };
}

interface Moved {
  readonly path: DiscretePath;
  readonly action: Action;
}

interface NewtonStep {
  readonly direction: readonly Float64Array[];
  /** −<gradient, direction>. */
  readonly slope: number;
}

function lineSearch(
  kernel: MetricKernel,
  space: TangentSpace,
  path: DiscretePath,
  action: Action,
  { direction, slope }: NewtonStep,
): Moved | null {
  const moves = direction.map((y) => space.expand(y));
  for (let k = 0, t = 1; k < ACTION_HALVINGS; k++, t /= 2) {
    const states = path.states.map((x, i) => {
      const move = moves[i - 1];
      return move ? x.map((value, p) => value + t * move[p]) : x;
    });
    const isFaithful = states.every((x, i) => i === 0 || i === states.length - 1 || kernel.isFaithful(x));
    const next = isFaithful ? actionOf(kernel, space, { times: path.times, states }) : null;
    if (next && next.value <= action.value - ACTION_ARMIJO * t * slope) {
      return { path: { times: path.times, states }, action: next };
    }
  }
  return null;
}

/** −H⁻¹g; the diagonal is raised where rounding leaves H without a factor. */
function newtonStep(hessian: BlockTridiagonal, gradient: readonly Float64Array[], d: number): NewtonStep {
  for (const ridge of ACTION_RIDGES) {
    const raised = ridge === 0 ? hessian : { ...hessian, diagonal: hessian.diagonal.map((m) => raise(m, d, ridge)) };
    const solution = solveBlockTridiagonal(raised, gradient, d);
    if (!solution) continue;
    let slope = 0;
    const direction = solution.map((x, k) => {
      x.forEach((value, i) => (slope += value * gradient[k][i]));
      return x.map((value) => -value);
    });
    if (slope >= 0) return { direction, slope };
  }
  return { direction: gradient.map((g) => g.map(() => 0)), slope: 0 };
}

function raise(m: Float64Array, d: number, ridge: number): Float64Array {
  const out = m.slice();
  for (let i = 0; i < d; i++) out[i * d + i] += ridge * (Math.abs(m[i * d + i]) || 1);
  return out;
}

interface Derivatives {
  readonly gradient: Float64Array[];
  readonly hessian: BlockTridiagonal;
}

/**
 * Gradient and Hessian in the inner nodes. For c(ρ,v) = <v,𝒟⁻¹v> with a = 𝒟⁻¹v, g = ∂_ρ‖a‖²_ρ, T: η ↦ 𝒟′[η]a and H = ∂²_ρ‖a‖²_ρ:
 * c_v = 2a, c_ρ = −g, c_vv = 2𝒟⁻¹, c_vρ = −2𝒟⁻¹T, c_ρρ = 2Tᵀ𝒟⁻¹T − H.
 */
function derivativesOf(space: TangentSpace, pieces: readonly Piece[]): Derivatives {
  const d = space.count;
  const inner = pieces.length - 1;
  const block = (): Float64Array => new Float64Array(d * d);
  const gradient = Array.from({ length: inner }, () => new Float64Array(d));
  const diagonal = Array.from({ length: inner }, block);
  const below = Array.from({ length: Math.max(0, inner - 1) }, block);
  pieces.forEach((piece, k) => {
    const { step, potential } = piece;
    const a = space.expand(potential);
    const g = space.reduce(piece.at.gradient(a));
    const { inverse, cross, second } = pieceHessian(piece, space, piece.at.mixed(a), piece.at.hessian(a));
    for (const [node, sign] of [
      [k - 1, -1],
      [k, 1],
    ] as const) {
      if (node < 0 || node >= inner) continue;
      for (let i = 0; i < d; i++) {
        gradient[node][i] += 2 * sign * potential[i] - (step / 2) * g[i];
        for (let j = 0; j < d; j++) {
          diagonal[node][i * d + j] +=
            (step / 4) * second[i * d + j] +
            (sign / 2) * (cross[i * d + j] + cross[j * d + i]) +
            inverse[i * d + j] / step;
        }
      }
    }
    if (k === 0 || k >= inner) return;
    const out = below[k - 1];
    // Row: node k (sign +), column: node k − 1 (sign −); `cross` has velocities as rows.
    for (let i = 0; i < d; i++) {
      for (let j = 0; j < d; j++) {
        out[i * d + j] +=
          (step / 4) * second[i * d + j] + (cross[i * d + j] - cross[j * d + i]) / 2 - inverse[i * d + j] / step;
      }
    }
  });
  return { gradient, hessian: { diagonal, below } };
}

/** c_vv, c_vρ and c_ρρ of one piece, d×d. */
function pieceHessian(
  { factor }: Piece,
  space: TangentSpace,
  mixed: Float64Array,
  hessian: Float64Array,
): { inverse: Float64Array; cross: Float64Array; second: Float64Array } {
  const d = space.count;
  const t = space.reduceMatrix(mixed);
  const second = space.reduceMatrix(hessian).map((x) => -x);
  const [inverse, cross] = [new Float64Array(d * d), new Float64Array(d * d)];
  const column = new Float64Array(d);
  for (let k = 0; k < d; k++) {
    column.fill(0);
    column[k] = 1;
    choleskySolveReal(factor, d, column);
    for (let i = 0; i < d; i++) inverse[i * d + k] = 2 * column[i];
    for (let i = 0; i < d; i++) column[i] = t[i * d + k];
    choleskySolveReal(factor, d, column);
    for (let i = 0; i < d; i++) cross[i * d + k] = -2 * column[i];
  }
  for (let k = 0; k < d; k++) {
    for (let i = 0; i < d; i++) {
      const x = t[k * d + i];
      if (x === 0) continue;
      for (let j = 0; j < d; j++) second[i * d + j] -= x * cross[k * d + j];
    }
  }
  return { inverse, cross, second };
}
