import { requireFinite, requireSquare } from './shape-checks.js';
import { zeros, type ComplexMatrix } from './complex-matrix.js';
import { accumulateHermitian, reduceHermitian } from './hermitian-tridiagonal.js';
import { safeUnit } from './safe-unit.js';
import { orderDiagonal, sortPairs, symmetricEigenInto, symmetricWork } from './symmetric-eigen.js';
import { tridiagonalQL } from './tridiagonal-ql.js';

/** Eigenvalues ascending; column k of the unitary `vectors` belongs to values[k]. */
export interface HermitianEigen {
  readonly values: Float64Array;
  readonly vectors: ComplexMatrix;
}

/**
 * Eigenvalues and a unitary of eigenvectors of the Hermitian part (A + A*)/2. Complex Householder reduction and implicit
 * QL; a real matrix takes the real route and gets real vectors. Throws `dimension-mismatch`, `not-finite`,
 * `no-convergence`.
 */
export function hermitianEigen(a: ComplexMatrix): HermitianEigen {
  const vectors = zeros(a.rows);
  return { values: solve(a, vectors), vectors };
}

/** Ascending eigenvalues of (A + A*)/2. */
export function hermitianEigenvalues(a: ComplexMatrix): Float64Array {
  return solve(a, null);
}

function solve(a: ComplexMatrix, vectors: ComplexMatrix | null): Float64Array {
  requireSquare(a);
  const n = a.rows;
  const values = new Float64Array(n);
  requireFinite(a.im);
  if (isReal(a)) {
    symmetricEigenInto(a.re, n, values, vectors ? vectors.re : null, symmetricWork(n));
    return values;
  }
  requireFinite(a.re);
  const { re, im, order, unit } = load(a);
  const [e, h, phaseRe, phaseIm, c, s] = Array.from({ length: 6 }, () => new Float64Array(n));
  reduceHermitian(re, im, n, values, e, h, phaseRe, phaseIm);
  if (vectors) accumulateHermitian(re, im, n, h, phaseRe, phaseIm, vectors.re, vectors.im, order, c, s);
  const bases = vectors ? [vectors.re, vectors.im] : [];
  tridiagonalQL(values, e, n, bases, c, s);
  for (let i = 0; i < n; i++) values[i] *= unit;
  sortPairs(values, n, bases);
  return values;
}

function isReal(a: ComplexMatrix): boolean {
  return a.im.every((y) => y === 0);
}

/** The lower triangle of (A + A*)/2, scaled into range, with the diagonal ascending in modulus. */
function load(a: ComplexMatrix): { re: Float64Array; im: Float64Array; order: Int32Array; unit: number } {
  const n = a.rows;
  const unit = Math.max(safeUnit(a.re, n * n), safeUnit(a.im, n * n));
  const order = new Int32Array(n);
  orderDiagonal(a.re, n, order);
  const re = new Float64Array(n * n);
  const im = new Float64Array(n * n);
  const half = 0.5 / unit;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const p = order[i] * n + order[j];
      const q = order[j] * n + order[i];
      re[i * n + j] = half * a.re[p] + half * a.re[q];
      im[i * n + j] = half * a.im[p] - half * a.im[q];
    }
  }
  return { re, im, order, unit };
}
