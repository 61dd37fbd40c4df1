import { dot, norm } from '../linalg/real-vector.js';
import { ThalwegError } from '../errors.js';
import { solveReal } from '../linalg/lu-real.js';
import { nullSpaceReal } from '../linalg/null-space.js';
import { transposeReal } from '../linalg/real-matrix.js';
import { KERNEL_TOLERANCE } from '../tolerances.js';

/** Bases of ker L and ker Lᵀ for a real d×d matrix. */
export interface KernelPair {
  readonly dimension: number;
  /** Orthonormal coordinate vectors with Lx = 0. */
  readonly right: readonly Float64Array[];
  /** Orthonormal coordinate vectors with Lᵀy = 0. */
  readonly left: readonly Float64Array[];
}

/**
 * Null vectors of a row-major d×d matrix on both sides: singular values below KERNEL_TOLERANCE·‖L‖_F count as zero.
 * Throws `no-convergence` when the two sides disagree, which means that the rank is not resolved.
 */
export function kernelPair(matrix: Float64Array, d: number): KernelPair {
  const known = pairs.get(matrix);
  if (known) return known;
  const tolerance = KERNEL_TOLERANCE * norm(matrix);
  const right = columns(nullSpaceReal(matrix, d, d, tolerance), d);
  const left = columns(nullSpaceReal(transposeReal(matrix, d, d), d, d, tolerance), d);
  if (left.length !== right.length) {
    throw new ThalwegError(
      'no-convergence',
      `expected left and right kernels of one dimension, got ${left.length} and ${right.length}; some rates are too slow beside others to be told from zero`,
    );
  }
  const pair = { dimension: right.length, right, left };
  pairs.set(matrix, pair);
  return pair;
}

/**
 * The projection X(YᵀX)⁻¹Yᵀ onto span X along the common kernel of the left vectors: for null vectors of L, the limit of e^{tL}.
 * Returns the f×d factor (YᵀX)⁻¹Yᵀ, row-major, so that the projection of x has coordinates `factor x` in the basis X.
 */
export function projectionFactor(right: readonly Float64Array[], left: readonly Float64Array[]): Float64Array {
  const f = right.length;
  const d = right[0].length;
  const overlap = new Float64Array(f * f);
  const rows = new Float64Array(f * d);
  left.forEach((y, i) => {
    rows.set(y, i * d);
    right.forEach((x, j) => (overlap[i * f + j] = dot(y, x)));
  });
  return solveReal(overlap, f, rows, d);
}

const pairs = new WeakMap<Float64Array, KernelPair>();

function columns({ basis, dimension }: { basis: Float64Array; dimension: number }, d: number): Float64Array[] {
  return Array.from({ length: dimension }, (_, j) =>
    Float64Array.from({ length: d }, (_, i) => basis[i * dimension + j]),
  );
}
