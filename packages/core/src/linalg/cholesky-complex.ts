import { notPositiveDefinite } from './cholesky-real.js';
import { zeros, copy, type ComplexMatrix } from './complex-matrix.js';
import { requireFinite, requireInner, requireSquare } from './shape-checks.js';

/**
 * Lower triangular L with positive diagonal and L L* = A, A Hermitian positive definite; only the lower triangle of A is
 * read and the imaginary part of its diagonal is taken as zero. Throws `not-positive-definite`, `dimension-mismatch`,
 * `not-finite`.
 */
export function choleskyComplex(a: ComplexMatrix): ComplexMatrix {
  requireSquare(a);
  requireFinite(a.re);
  requireFinite(a.im);
  const n = a.rows;
  const l = zeros(n);
  const { re, im } = l;
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let j = 0; j < i; j++) {
      const other = j * n;
      let x = a.re[row + j];
      let y = a.im[row + j];
      for (let k = 0; k < j; k++) {
        x -= re[row + k] * re[other + k] + im[row + k] * im[other + k];
        y -= im[row + k] * re[other + k] - re[row + k] * im[other + k];
      }
      re[row + j] = x / re[other + j];
      im[row + j] = y / re[other + j];
    }
    let pivot = a.re[row + i];
    for (let k = row; k < row + i; k++) pivot -= re[k] * re[k] + im[k] * im[k];
    if (!(pivot > 0)) throw notPositiveDefinite(i, n);
    re[row + i] = Math.sqrt(pivot);
  }
  return l;
}

/** X with A X = B, from the factor L of A. */
export function choleskySolveComplex(l: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return solveLowerAdjoint(l, solveLowerComplex(l, b));
}

/** L⁻¹ B for lower triangular L with real diagonal. */
export function solveLowerComplex(l: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  requireInner(l.cols, b.rows);
  const x = copy(b);
  for (let i = 0; i < l.rows; i++) {
    for (let k = 0; k < i; k++) subtractRow(x, i, k, l.re[i * l.cols + k], l.im[i * l.cols + k]);
    divideRow(x, i, l.re[i * l.cols + i]);
  }
  return x;
}

/** L*⁻¹ B for lower triangular L with real diagonal. */
export function solveLowerAdjoint(l: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  requireInner(l.cols, b.rows);
  const x = copy(b);
  for (let i = l.rows - 1; i >= 0; i--) {
    divideRow(x, i, l.re[i * l.cols + i]);
    for (let k = 0; k < i; k++) subtractRow(x, k, i, l.re[i * l.cols + k], -l.im[i * l.cols + k]);
  }
  return x;
}

/** Row i of x −= (re + i im) row k. */
function subtractRow(x: ComplexMatrix, i: number, k: number, re: number, im: number): void {
  for (let j = 0, p = i * x.cols, q = k * x.cols; j < x.cols; j++, p++, q++) {
    x.re[p] -= re * x.re[q] - im * x.im[q];
    x.im[p] -= re * x.im[q] + im * x.re[q];
  }
}

function divideRow(x: ComplexMatrix, i: number, value: number): void {
  for (let p = i * x.cols; p < (i + 1) * x.cols; p++) {
    x.re[p] /= value;
    x.im[p] /= value;
  }
}
