import { ThalwegError } from '../errors.js';
import { requireFinite, requireLength } from './shape-checks.js';

/**
 * X with a X = b for a general real n × n matrix and an n × cols right-hand side, by Gaussian elimination with partial
 * pivoting. Throws `singular-matrix`, `not-finite`, `dimension-mismatch`.
 */
export function solveReal(a: Float64Array, n: number, b: Float64Array, cols: number = 1): Float64Array {
  requireLength(a, n * n);
  requireLength(b, n * cols);
  requireFinite(a);
  requireFinite(b);
  const lu = a.slice();
  const x = b.slice();
  for (let k = 0; k < n; k++) {
    const pivot = pivotRow(lu, n, k);
    if (pivot !== k) {
      swapRows(lu, n, k, pivot);
      swapRows(x, cols, k, pivot);
    }
    const diagonal = lu[k * n + k];
    for (let i = k + 1; i < n; i++) {
      const ratio = lu[i * n + k] / diagonal;
      // Exactly zero multipliers change nothing.
      if (ratio === 0) continue;
      for (let j = k + 1, p = i * n + k + 1, q = k * n + k + 1; j < n; j++, p++, q++) lu[p] -= ratio * lu[q];
      for (let j = 0, p = i * cols, q = k * cols; j < cols; j++, p++, q++) x[p] -= ratio * x[q];
    }
  }
  for (let i = n - 1; i >= 0; i--) {
    for (let k = i + 1; k < n; k++) {
      const u = lu[i * n + k];
      for (let j = 0, p = i * cols, q = k * cols; j < cols; j++, p++, q++) x[p] -= u * x[q];
    }
    const diagonal = lu[i * n + i];
    for (let p = i * cols; p < (i + 1) * cols; p++) x[p] /= diagonal;
  }
  return x;
}

function pivotRow(lu: Float64Array, n: number, k: number): number {
  let best = k;
  for (let i = k + 1; i < n; i++) if (Math.abs(lu[i * n + k]) > Math.abs(lu[best * n + k])) best = i;
  if (!(Math.abs(lu[best * n + k]) > 0)) {
    throw new ThalwegError(
      'singular-matrix',
      `expected an invertible matrix, got one whose column ${k} depends on earlier ones`,
    );
  }
  return best;
}

function swapRows(a: Float64Array, cols: number, i: number, k: number): void {
  for (let j = 0, p = i * cols, q = k * cols; j < cols; j++, p++, q++) {
    const x = a[p];
    a[p] = a[q];
    a[q] = x;
  }
}
