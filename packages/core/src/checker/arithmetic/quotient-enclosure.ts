import { ThalwegError } from '../../errors.js';
import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import { requireBlockDiagonal } from './block-diagonal.js';
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
  model: CanonicalModel,
  frame: { readonly lambda: ArrayLike<number>; readonly u: ComplexMatrix | null },
  observable: ComplexMatrix,
): QuotientEnclosure {
  const { blocks } = model;
  const lambda = eigenvalues(frame.lambda, blocks);
  requireBlockDiagonal(blocks, observable, 'the observable');
  if (frame.u) requireBlockDiagonal(blocks, frame.u, 'the frame of the state');
  const rotation = unitaryFrame(frame.u);
  const a = rotated(rotation, observable);
  const jumps = model.jumps.map(({ matrix, frequency }): RotatedJump => {
    if (matrix.rows !== lambda.length || matrix.cols !== lambda.length) throw wrongSide(lambda.length, matrix.rows);
    return { matrix: rotated(rotation, matrix), weight: exp(point(-frequency / 2)) };
  });
  const flow = encloseDualAtDiagonal(blocks, jumps, lambda);
  const image = encloseGenerator(blocks, jumps, a);
  const tables = new Map<number, MeanTableEnclosure>();
  let metric = ZERO;
  let transport = ZERO;
  let cross = ZERO;
  jumps.forEach(({ matrix: v }, j) => {
    const { frequency } = model.jumps[j];
    const table = tables.get(frequency) ?? meanTableEnclosure(model.mean, lambda, frequency);
    tables.set(frequency, table);
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
