import { ThalwegError } from '../errors.js';
import { requireFinite, requireLength } from './shape-checks.js';

/**
 * Lower triangular L (row-major, zeros above) with L Lᵀ = a, a symmetric positive definite n × n; only the lower triangle
 * of `a` is read. Throws `not-positive-definite` with the index of the failing pivot, `dimension-mismatch`, `not-finite`.
 */
export function choleskyReal(a: Float64Array, n: number): Float64Array {
  requireLength(a, n * n);
  requireFinite(a);
  const l = new Float64Array(n * n);
  const failed = choleskyRealInto(a, n, l);
  if (failed >= 0) throw notPositiveDefinite(failed, n);
  return l;
}

/**
 * Writes the lower triangle of the factor into `l` (which may be `a` itself; above the diagonal it is not touched) and
 * returns −1, or the index of the first pivot that is not positive.
 */
export function choleskyRealInto(a: Float64Array, n: number, l: Float64Array): number {
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let j = 0; j < i; j++) {
      const other = j * n;
      let sum = a[row + j];
      for (let k = 0; k < j; k++) sum -= l[row + k] * l[other + k];
      l[row + j] = sum / l[other + j];
    }
    let pivot = a[row + i];
    for (let k = row; k < row + i; k++) pivot -= l[k] * l[k];
    if (!(pivot > 0)) return i;
    l[row + i] = Math.sqrt(pivot);
  }
  return -1;
}

/** Solves a x = b from the factor of a; b is overwritten by x and returned. */
export function choleskySolveReal(l: Float64Array, n: number, b: Float64Array): Float64Array {
  solveLower(l, n, b);
  return solveLowerTransposed(l, n, b);
}

/** x ← L⁻¹ x for x = the n entries of `x` from `offset`. */
function solveLower(l: Float64Array, n: number, x: Float64Array, offset: number = 0): Float64Array {
  for (let i = 0; i < n; i++) {
    const row = i * n;
    let sum = x[offset + i];
    for (let k = 0; k < i; k++) sum -= l[row + k] * x[offset + k];
    x[offset + i] = sum / l[row + i];
  }
  return x;
}

/** x ← L⁻ᵀ x for x = the n entries of `x` from `offset`. */
export function solveLowerTransposed(l: Float64Array, n: number, x: Float64Array, offset: number = 0): Float64Array {
  for (let i = n - 1; i >= 0; i--) {
    const row = i * n;
    const value = x[offset + i] / l[row + i];
    x[offset + i] = value;
    for (let k = 0; k < i; k++) x[offset + k] -= l[row + k] * value;
  }
  return x;
}

export function notPositiveDefinite(pivot: number, n: number): ThalwegError {
  return new ThalwegError(
    'not-positive-definite',
    `expected a positive definite matrix of size ${n}, got a pivot that is not positive at index ${pivot}`,
    { details: { pivot, size: n } },
  );
}
