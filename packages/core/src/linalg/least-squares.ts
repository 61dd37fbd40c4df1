import { EPSILON, LEAST_SQUARES_RANK } from '../tolerances.js';
import { orthogonalColumns, packedQR, upperTriangle } from './qr-real.js';
import { transposeReal, realTimesVector } from './real-matrix.js';
import { requireFinite, requireLength } from './shape-checks.js';

export interface LeastSquares {
  /** The minimiser of least norm. */
  readonly x: Float64Array;
  /** ‖a x − b‖. */
  readonly residual: number;
  readonly rank: number;
}

/**
 * Minimises ‖a x − b‖ for a real m × n matrix of any rank, by a complete orthogonal decomposition. `rankTolerance` is
 * relative to the largest column norm. Throws `dimension-mismatch`, `not-finite`.
 */
export function leastSquares(
  a: Float64Array,
  m: number,
  n: number,
  b: Float64Array,
  rankTolerance: number = LEAST_SQUARES_RANK * EPSILON * Math.max(m, n),
): LeastSquares {
  requireLength(b, m);
  requireFinite(b);
  const factors = packedQR(a, m, n, true);
  const r = upperTriangle(factors);
  const rank = numericalRank(r, Math.min(m, n), n, rankTolerance);
  const q = orthogonalColumns(factors, 0, rank);
  const c = realTimesVector(transposeReal(q, m, rank), rank, m, b);
  const x = new Float64Array(n);
  leastNormSolution(r, rank, n, c).forEach((value, j) => (x[factors.pivots[j]] = value));
  const fitted = realTimesVector(a, m, n, x);
  const residual = Math.sqrt(fitted.reduce((sum, y, i) => sum + (y - b[i]) ** 2, 0));
  return { x, residual, rank };
}

function numericalRank(r: Float64Array, steps: number, n: number, tolerance: number): number {
  const least = steps > 0 ? tolerance * Math.abs(r[0]) : 0;
  let rank = 0;
  while (rank < steps && Math.abs(r[rank * n + rank]) > least) rank++;
  return rank;
}

/** The y of least norm with [R11 R12] y = c: with [R11 R12]ᵀ = Z T, y = Z T⁻ᵀ c. */
function leastNormSolution(r: Float64Array, rank: number, n: number, c: Float64Array): Float64Array {
  const factors = packedQR(transposeReal(r.slice(0, rank * n), rank, n), n, rank, false);
  const t = upperTriangle(factors);
  const y = c.slice();
  for (let i = 0; i < rank; i++) {
    for (let k = 0; k < i; k++) y[i] -= t[k * rank + i] * y[k];
    y[i] /= t[i * rank + i];
  }
  return realTimesVector(orthogonalColumns(factors, 0, rank), n, rank, y);
}
