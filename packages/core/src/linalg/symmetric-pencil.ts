import { choleskyRealInto, notPositiveDefinite, solveLowerTransposed } from './cholesky-real.js';
import { requireFinite, requireLength } from './shape-checks.js';
import { symmetricEigenInto, symmetricWork, type SymmetricEigen, type SymmetricWork } from './symmetric-eigen.js';
import { smallestWork, symmetricSmallestInto, type SmallestWork } from './symmetric-smallest.js';

/** Buffers of the pencil routines for one size n. */
export interface PencilWork {
  readonly factor: Float64Array;
  readonly reduced: Float64Array;
  readonly eigen: SymmetricWork;
}

export interface SmallestPencilWork extends PencilWork {
  readonly eigen: SmallestWork;
}

/**
 * All solutions of a x = λ b x with a, b real symmetric row-major n × n and b positive definite: values ascending, columns
 * of `vectors` b-orthonormal (xᵀ b x = 1). Cholesky reduction (Martin & Wilkinson, Numer. Math. 11 (1968)). Throws
 * `not-positive-definite`, `dimension-mismatch`, `not-finite`.
 */
export function symmetricPencil(a: Float64Array, b: Float64Array, n: number): SymmetricEigen {
  checkPencil(a, b, n);
  const values = new Float64Array(n);
  const vectors = new Float64Array(n * n);
  const failed = symmetricPencilInto(a, b, n, values, vectors, pencilWork(n));
  if (failed >= 0) throw notPositiveDefinite(failed, n);
  return { values, vectors };
}

/** Smallest λ with a x = λ b x, n ≥ 1, and its vector with xᵀ b x = 1. Errors as `symmetricPencil`. */
export function symmetricPencilSmallest(
  a: Float64Array,
  b: Float64Array,
  n: number,
): { value: number; vector: Float64Array } {
  checkPencil(a, b, n);
  const vector = new Float64Array(n);
  const work = smallestPencilWork(n);
  const value = symmetricPencilSmallestInto(a, b, n, vector, work);
  if (Number.isNaN(value)) throw notPositiveDefinite(choleskyRealInto(b, n, work.factor), n);
  return { value, vector };
}

export function pencilWork(n: number): PencilWork {
  return { factor: new Float64Array(n * n), reduced: new Float64Array(n * n), eigen: symmetricWork(n) };
}

export function smallestPencilWork(n: number): SmallestPencilWork {
  return { factor: new Float64Array(n * n), reduced: new Float64Array(n * n), eigen: smallestWork(n) };
}

/** `symmetricPencil` without allocation; returns −1, or the index of the pivot at which b is not positive definite. */
export function symmetricPencilInto(
  a: Float64Array,
  b: Float64Array,
  n: number,
  values: Float64Array,
  vectors: Float64Array | null,
  work: PencilWork,
): number {
  const failed = reducePencil(a, b, n, work);
  if (failed >= 0) return failed;
  symmetricEigenInto(work.reduced, n, values, vectors, work.eigen);
  if (vectors) solveColumns(work.factor, n, vectors);
  return -1;
}

/** `symmetricPencilSmallest` without allocation; NaN when b is not positive definite. `vector` may be null. */
export function symmetricPencilSmallestInto(
  a: Float64Array,
  b: Float64Array,
  n: number,
  vector: Float64Array | null,
  work: SmallestPencilWork,
): number {
  if (reducePencil(a, b, n, work) >= 0) return NaN;
  const value = symmetricSmallestInto(work.reduced, n, vector, work.eigen);
  if (vector) solveLowerTransposed(work.factor, n, vector);
  return value;
}

function checkPencil(a: Float64Array, b: Float64Array, n: number): void {
  requireLength(a, n * n);
  requireLength(b, n * n);
  requireFinite(a);
  requireFinite(b);
}

/** work.factor = L with b = L Lᵀ, work.reduced = L⁻¹ a L⁻ᵀ in full. */
function reducePencil(a: Float64Array, b: Float64Array, n: number, work: PencilWork): number {
  const { factor: l, reduced: y } = work;
  const failed = choleskyRealInto(b, n, l);
  if (failed >= 0) return failed;
  // Y = L⁻¹ sym(a), row after row.
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let j = 0; j < n; j++) y[row + j] = 0.5 * (a[row + j] + a[j * n + i]);
    for (let k = 0; k < i; k++) {
      const x = l[row + k];
      for (let j = 0, p = row, q = k * n; j < n; j++, p++, q++) y[p] -= x * y[q];
    }
    const pivot = l[row + i];
    for (let p = row; p < row + n; p++) y[p] /= pivot;
  }
  // C = Y L⁻ᵀ, lower triangle; entries of Y right of the diagonal are not needed any more and take the mirror image.
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let j = 0; j <= i; j++) {
      const other = j * n;
      let sum = y[row + j];
      for (let k = 0; k < j; k++) sum -= y[row + k] * l[other + k];
      y[row + j] = sum / l[other + j];
    }
    for (let j = 0; j < i; j++) y[j * n + i] = y[row + j];
  }
  return -1;
}

/** Z ← L⁻ᵀ Z for a row-major n × n matrix. */
function solveColumns(l: Float64Array, n: number, z: Float64Array): void {
  for (let i = n - 1; i >= 0; i--) {
    const row = i * n;
    const pivot = l[row + i];
    for (let p = row; p < row + n; p++) z[p] /= pivot;
    for (let k = 0; k < i; k++) {
      const x = l[row + k];
      for (let j = 0, p = k * n, q = row; j < n; j++, p++, q++) z[p] -= x * z[q];
    }
  }
}
