import { requireLength } from './shape-checks.js';

/** Real matrices are flat row-major arrays; every function takes the shape. */

export function identityReal(n: number): Float64Array {
  const a = new Float64Array(n * n);
  for (let i = 0; i < n; i++) a[i * n + i] = 1;
  return a;
}

/** The cols × rows transpose of a rows × cols matrix. */
export function transposeReal(a: Float64Array, rows: number, cols: number): Float64Array {
  requireLength(a, rows * cols);
  const t = new Float64Array(rows * cols);
  for (let i = 0, k = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++, k++) t[j * rows + i] = a[k];
  }
  return t;
}

/** a x for a rows × cols matrix. */
export function realTimesVector(a: Float64Array, rows: number, cols: number, x: Float64Array): Float64Array {
  requireLength(a, rows * cols);
  requireLength(x, cols);
  const y = new Float64Array(rows);
  for (let i = 0, k = 0; i < rows; i++) {
    let sum = 0;
    for (let j = 0; j < cols; j++, k++) sum += a[k] * x[j];
    y[i] = sum;
  }
  return y;
}

/** Largest column sum of moduli. */
export function oneNormReal(a: Float64Array, rows: number, cols: number): number {
  let top = 0;
  for (let j = 0; j < cols; j++) {
    let sum = 0;
    for (let i = 0; i < rows; i++) sum += Math.abs(a[i * cols + j]);
    top = Math.max(top, sum);
  }
  return top;
}

/** a b for a rows × inner and an inner × cols matrix. */
export function multiplyReal(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  cols: number,
): Float64Array {
  requireLength(a, rows * inner);
  requireLength(b, inner * cols);
  const c = new Float64Array(rows * cols);
  const panel = new Float64Array(4 * inner);
  for (let j = 0; j < cols; j += 4) {
    const width = Math.min(4, cols - j);
    for (let k = 0; k < inner; k++) {
      for (let q = 0; q < width; q++) panel[4 * k + q] = b[k * cols + j + q];
    }
    for (let i = 0; i < rows; i += 4) {
      if (width === 4 && i + 4 <= rows) tile(c, i, j, cols, a, inner, panel);
      else edge(c, i, Math.min(i + 4, rows), j, width, cols, a, inner, panel);
    }
  }
  return c;
}

/** Sixteen running sums in registers: 4 × 4 entries of the product from four rows of a and a packed panel of b. */
function tile(
  c: Float64Array,
  i: number,
  j: number,
  cols: number,
  a: Float64Array,
  inner: number,
  panel: Float64Array,
): void {
  let [c00, c01, c02, c03, c10, c11, c12, c13] = [0, 0, 0, 0, 0, 0, 0, 0];
  let [c20, c21, c22, c23, c30, c31, c32, c33] = [0, 0, 0, 0, 0, 0, 0, 0];
  const end = (i + 1) * inner;
  for (let p = i * inner, q = 0; p < end; p++, q += 4) {
    const a0 = a[p];
    const a1 = a[p + inner];
    const a2 = a[p + 2 * inner];
    const a3 = a[p + 3 * inner];
    const b0 = panel[q];
    const b1 = panel[q + 1];
    const b2 = panel[q + 2];
    const b3 = panel[q + 3];
    c00 += a0 * b0;
    c01 += a0 * b1;
    c02 += a0 * b2;
    c03 += a0 * b3;
    c10 += a1 * b0;
    c11 += a1 * b1;
    c12 += a1 * b2;
    c13 += a1 * b3;
    c20 += a2 * b0;
    c21 += a2 * b1;
    c22 += a2 * b2;
    c23 += a2 * b3;
    c30 += a3 * b0;
    c31 += a3 * b1;
    c32 += a3 * b2;
    c33 += a3 * b3;
  }
  let r = i * cols + j;
  c[r] = c00;
  c[r + 1] = c01;
  c[r + 2] = c02;
  c[r + 3] = c03;
  r += cols;
  c[r] = c10;
  c[r + 1] = c11;
  c[r + 2] = c12;
  c[r + 3] = c13;
  r += cols;
  c[r] = c20;
  c[r + 1] = c21;
  c[r + 2] = c22;
  c[r + 3] = c23;
  r += cols;
  c[r] = c30;
  c[r + 1] = c31;
  c[r + 2] = c32;
  c[r + 3] = c33;
}

function edge(
  c: Float64Array,
  from: number,
  to: number,
  j: number,
  width: number,
  cols: number,
  a: Float64Array,
  inner: number,
  panel: Float64Array,
): void {
  for (let i = from; i < to; i++) {
    for (let q = 0; q < width; q++) {
      let sum = 0;
      for (let k = 0; k < inner; k++) sum += a[i * inner + k] * panel[4 * k + q];
      c[i * cols + j + q] = sum;
    }
  }
}
