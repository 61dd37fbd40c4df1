import { ThalwegError } from '../../errors.js';
import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import { requireBlockDiagonal } from './block-diagonal.js';
import { widenCorners } from './widen-corners.js';
import { rotated, unitaryFrame } from './unitary-frame.js';
import { type RotatedJump, commutator, encloseDualAtDiagonal, encloseGenerator } from './canonical-enclosure.js';
import { encloseFlowForm, encloseForm } from './form-enclosure.js';
import { exp } from './interval-exp.js';
import type { EnclosedMeanName } from './interval-mean.js';
import { type Interval, ZERO, add, div, mul, point, sub } from './interval.js';
import { type MeanTableEnclosure, meanTableEnclosure } from './mean-table-enclosure.js';

/** A generator in canonical form, L(A) = Σ_j e^{−ω_j/2}(2V_j*AV_j − {V_j*V_j,A}) projected to the blocks, and a mean. */
export interface CanonicalModel {
  /** Sizes of the blocks of the algebra, N = Σ blocks. */
  readonly blocks: readonly number[];
  /** N×N matrices V_j with frequencies ω_j; the doubles are taken as exact numbers. */
  readonly jumps: readonly { readonly matrix: ComplexMatrix; readonly frequency: number }[];
  readonly mean: EnclosedMeanName;
}

/**
 * Many such generators: each jump within `radius` of V_j in the Frobenius norm, in the corners (block × block) that V_j reaches, with
 * any frequency of an interval.
 */
export interface CanonicalModels extends Pick<CanonicalModel, 'blocks' | 'mean'> {
  readonly jumps: readonly {
    readonly matrix: ComplexMatrix;
    readonly frequency: number | Interval;
    readonly radius?: number;
  }[];
}

/** What is proved at one (ρ, A). */
export interface QuotientEnclosure {
  /** Contains q_ρ(A)/‖A‖²_ρ, a rate: no K with q ≥ K‖·‖² is above its upper end. */
  readonly quotient: Interval;
  /** Contains q_ρ(A) = ½ Σ_j <∂_jA,D[ρ;L†ρ]_j∂_jA> − Re Σ_j <∂_jA,[ρ]_j∂_jLA>. */
  readonly curvature: Interval;
  /** Contains ‖A‖²_ρ = Σ_j <∂_jA,[ρ]_j∂_jA>. */
  readonly metric: Interval;
  /** Bound of ‖Ũ − u‖₂. */
  readonly rotation: number;
}

/**
 * Enclose both forms of the gradient estimate (Carlen & Maas, J. Funct. Anal. 273 (2017), §5) at ρ = Ũ diag(λ) Ũ* and an
 * observable A of the algebra, where Ũ is the exactly unitary polar factor of u (null: the identity). λ_k > 0 belongs to
 * column k of u, in any scale. Throws `dimension-mismatch`, `not-finite`, `state-not-positive`, and `usage` when u is not
 * nearly unitary.
 */
export function encloseQuotient(
  model: CanonicalModels,
  frame: { readonly lambda: ArrayLike<number>; readonly u: ComplexMatrix | null },
  observable: ComplexMatrix,
): QuotientEnclosure {
  const { blocks } = model;
  const lambda = eigenvalues(frame.lambda, blocks);
  requireBlockDiagonal(blocks, observable, 'the observable');
  if (frame.u) requireBlockDiagonal(blocks, frame.u, 'the frame of the state');
  const rotation = unitaryFrame(frame.u);
  const a = rotated(rotation, observable);
  const frequencies = model.jumps.map(({ frequency }) =>
    typeof frequency === 'number' ? point(frequency) : frequency,
  );
  const jumps = model.jumps.map(({ matrix, radius = 0 }, j): RotatedJump => {
    if (matrix.rows !== lambda.length || matrix.cols !== lambda.length) throw wrongSide(lambda.length, matrix.rows);
    const inFrame = rotated(rotation, matrix);
    const jump = radius > 0 ? widenCorners(inFrame, matrix, blocks, radius) : inFrame;
    return { matrix: jump, weight: exp(mul(point(-0.5), frequencies[j])) };
  });
  const flow = encloseDualAtDiagonal(blocks, jumps, lambda);
  const image = encloseGenerator(blocks, jumps, a);
  const tables = new Map<string, MeanTableEnclosure>();
  let metric = ZERO;
  let transport = ZERO;
  let cross = ZERO;
  jumps.forEach(({ matrix: v }, j) => {
    const key = `${frequencies[j].lo} ${frequencies[j].hi}`;
    const table = tables.get(key) ?? meanTableEnclosure(model.mean, lambda, frequencies[j]);
    tables.set(key, table);
    const x = commutator(v, a);
    const y = commutator(v, image);
    metric = add(metric, encloseForm(table, x, x));
    cross = add(cross, encloseForm(table, x, y));
    transport = add(transport, encloseFlowForm(table, blocks, x, flow));
  });
  const curvature = sub(mul(point(0.5), transport), cross);
  const positive = { lo: Math.max(0, metric.lo), hi: metric.hi };
  return {
    quotient: div(curvature, positive),
    curvature,
    metric: positive,
    rotation: rotation.distance,
  };
}

function eigenvalues(lambda: ArrayLike<number>, blocks: readonly number[]): Interval[] {
  const n = blocks.reduce((sum, size) => sum + size, 0);
  if (lambda.length !== n) throw wrongSide(n, lambda.length);
  return Array.from(lambda, (x) => {
    if (!(x > 0 && x < Infinity)) {
      throw new ThalwegError('state-not-positive', `expected finite eigenvalues > 0 of the state, got ${x}`);
    }
    return point(x);
  });
}

function wrongSide(expected: number, got: number): ThalwegError {
  return new ThalwegError('dimension-mismatch', `expected side ${expected} as the blocks have, got ${got}`);
}
