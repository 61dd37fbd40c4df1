import { ThalwegError } from '../../errors.js';
import {
  type ComplexIntervalMatrix,
  type IntervalMatrix,
  intervalZeros,
  subIntervalMatrix,
} from './interval-matrix.js';
import { pointMatrix, transposeIntervalMatrix } from './interval-matrix.js';
import { type Interval, add, div, intersection } from './interval.js';
import { multiplyIntervalMatrix } from './interval-product.js';
import { jacobiEigen } from './jacobi-eigen.js';
import { hermitianNormBound } from './norm-bound.js';
import { addUp, subDown } from './rounding.js';
import { symmetricCentre, unscaledDown } from './symmetric-centre.js';
import { symmetricEmbedding } from './symmetric-embedding.js';

/**
 * Enclosures of all eigenvalues of every Hermitian matrix in A, in ascending order. With approximate eigenvectors V and
 * VᵀAV = D + F, VᵀV = 1 + G: Ostrowski's theorem gives λ_i(VᵀAV) = θ_iλ_i(A), |θ_i − 1| ≤ ‖G‖, and Weyl's inequality
 * |λ_i(VᵀAV) − d_i| ≤ ‖F‖ (Horn & Johnson 2013, Theorems 4.5.9 and 4.3.1). Throws `not-hermitian`, `dimension-mismatch`,
 * and `no-convergence` for an unbounded matrix or when V is not nearly orthogonal.
 */
export function encloseEigenvalues(a: ComplexIntervalMatrix): Interval[] {
  const embedding = symmetricEmbedding(a);
  const centre = symmetricCentre(embedding);
  if (!centre) throw failed();
  const around: Interval = { lo: -centre.radius, hi: centre.radius };
  const all = encloseSpectrum(centre.mid, centre.n).map((x) => unscaled(add(x, around), centre.scale));
  if (embedding.copies === 1) return all;
  // Every eigenvalue stands twice: both enclosures hold it.
  return Array.from({ length: all.length / 2 }, (_, k) => {
    const common = intersection(all[2 * k], all[2 * k + 1]);
    if (!common) throw new ThalwegError('internal', 'expected the two copies of an eigenvalue to agree');
    return common;
  });
}

/** Enclosures of the eigenvalues of one symmetric matrix (row-major n×n), ascending. */
function encloseSpectrum(matrix: Float64Array, n: number): Interval[] {
  const { values, vectors } = jacobiEigen(matrix, n);
  if (!vectors.every(Number.isFinite)) throw failed();
  const v = pointMatrix(vectors, n);
  const vt = transposeIntervalMatrix(v);
  const rest = defect(multiplyIntervalMatrix(vt, multiplyIntervalMatrix(pointMatrix(matrix, n), v)), values);
  const skew = defect(multiplyIntervalMatrix(vt, v), new Float64Array(n).fill(1));
  if (!(skew < 1 && rest < Infinity)) throw failed();
  const theta = { lo: subDown(1, skew), hi: addUp(1, skew) };
  return Array.from(values, (d) => div(add({ lo: d, hi: d }, { lo: -rest, hi: rest }), theta));
}

function unscaled(x: Interval, scale: number): Interval {
  return { lo: unscaledDown(x.lo, scale), hi: 0 - unscaledDown(-x.hi, scale) };
}

/** Upper bound of ‖M − diag(d)‖₂ for the symmetric matrices in M. */
function defect(m: IntervalMatrix, d: Float64Array): number {
  const n = m.rows;
  const target = intervalZeros(n);
  for (let i = 0; i < n; i++) {
    target.lo[i * n + i] = d[i];
    target.hi[i * n + i] = d[i];
  }
  return hermitianNormBound({ rows: n, cols: n, re: subIntervalMatrix(m, target), im: intervalZeros(n) });
}

function failed(): ThalwegError {
  return new ThalwegError('no-convergence', 'expected nearly orthogonal eigenvectors of a bounded matrix, got none');
}
