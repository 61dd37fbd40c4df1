import { safeUnit } from './safe-unit.js';
import { requireLength } from './shape-checks.js';
import { accumulateReflectors, reduceSymmetric } from './symmetric-tridiagonal.js';
import { tridiagonalQL } from './tridiagonal-ql.js';

/** Eigenvalues ascending; column k of the row-major n × n `vectors` is the unit eigenvector of values[k]. */
export interface SymmetricEigen {
  readonly values: Float64Array;
  readonly vectors: Float64Array;
}

/** Buffers for one size n, reusable by every symmetric eigenproblem of that size. */
export interface SymmetricWork {
  readonly n: number;
  readonly a: Float64Array;
  readonly d: Float64Array;
  readonly e: Float64Array;
  readonly h: Float64Array;
  readonly c: Float64Array;
  readonly s: Float64Array;
  readonly order: Int32Array;
}

/**
 * Eigenvalues and orthonormal eigenvectors of the real symmetric matrix (a + aᵀ)/2, a row-major n × n. Householder
 * reduction and implicit QL, after ordering the diagonal by size, which keeps small eigenvalues of graded matrices
 * accurate. Throws `dimension-mismatch`, `not-finite`, `no-convergence`.
 */
export function symmetricEigen(a: Float64Array, n: number): SymmetricEigen {
  requireLength(a, n * n);
  const values = new Float64Array(n);
  const vectors = new Float64Array(n * n);
  symmetricEigenInto(a, n, values, vectors, symmetricWork(n));
  return { values, vectors };
}

/** Ascending eigenvalues of (a + aᵀ)/2. */
export function symmetricEigenvalues(a: Float64Array, n: number): Float64Array {
  requireLength(a, n * n);
  const values = new Float64Array(n);
  symmetricEigenInto(a, n, values, null, symmetricWork(n));
  return values;
}

export function symmetricWork(n: number): SymmetricWork {
  const vector = (): Float64Array => new Float64Array(n);
  const order = new Int32Array(n);
  return { n, a: new Float64Array(n * n), d: vector(), e: vector(), h: vector(), c: vector(), s: vector(), order };
}

/** `symmetricEigen` without allocation: fills `values` and, unless null, `vectors` (exact lengths n and n²). */
export function symmetricEigenInto(
  a: Float64Array,
  n: number,
  values: Float64Array,
  vectors: Float64Array | null,
  work: SymmetricWork,
): void {
  const { d, e, h, c, s } = work;
  const unit = loadSymmetric(a, n, work);
  reduceSymmetric(work.a, n, d, e, h);
  if (vectors) accumulateReflectors(work.a, n, h, vectors, work.order, c);
  tridiagonalQL(d, e, n, vectors ? [vectors] : [], c, s);
  for (let i = 0; i < n; i++) values[i] = d[i] * unit;
  if (vectors) sortPairs(values, n, [vectors]);
  else values.subarray(0, n).sort();
}

/**
 * Copies the lower triangle of (a + aᵀ)/2 into work.a with the diagonal ascending in modulus, work.order[k] being the
 * original index, and returns the power of two it was divided by.
 */
export function loadSymmetric(a: Float64Array, n: number, work: SymmetricWork): number {
  const { order } = work;
  const unit = safeUnit(a, n * n);
  const half = 0.5 / unit;
  orderDiagonal(a, n, order);
  for (let i = 0; i < n; i++) {
    const row = order[i] * n;
    const col = order[i];
    for (let j = 0, p = i * n; j < i; j++, p++) {
      const k = order[j];
      work.a[p] = half * a[row + k] + half * a[k * n + col];
    }
    work.a[i * n + i] = a[row + col] / unit;
  }
  return unit;
}

/** Stable insertion sort of the indices by |a_ii|. */
export function orderDiagonal(a: Float64Array, n: number, order: Int32Array): void {
  for (let i = 0; i < n; i++) {
    const x = Math.abs(a[i * n + i]);
    let j = i - 1;
    for (; j >= 0 && Math.abs(a[order[j] * n + order[j]]) > x; j--) order[j + 1] = order[j];
    order[j + 1] = i;
  }
}

/** Sorts the values ascending by selection, exchanging whole columns of the row-major matrices with n columns. */
export function sortPairs(values: Float64Array, n: number, matrices: readonly Float64Array[]): void {
  for (let i = 0; i < n - 1; i++) {
    let k = i;
    for (let j = i + 1; j < n; j++) if (values[j] < values[k]) k = j;
    if (k === i) continue;
    const value = values[i];
    values[i] = values[k];
    values[k] = value;
    for (const z of matrices) {
      for (let p = 0; p < z.length; p += n) {
        const x = z[p + i];
        z[p + i] = z[p + k];
        z[p + k] = x;
      }
    }
  }
}
