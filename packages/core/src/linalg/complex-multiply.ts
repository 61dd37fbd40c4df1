import type { ComplexMatrix } from './complex-matrix.js';
import { PACKED_PRODUCT_DENSITY, PACKED_PRODUCT_SIZE } from '../tolerances.js';

/**
 * target += A B for shapes that fit (not checked). Large dense factors take a blocked path, others one that skips the zeros
 * of A, which are common in matrix units and Pauli strings; into a zero target both give the same doubles.
 */
export function multiplyInto(target: ComplexMatrix, a: ComplexMatrix, b: ComplexMatrix): void {
  if (a.cols * a.rows * b.cols >= PACKED_PRODUCT_SIZE && density(a) > PACKED_PRODUCT_DENSITY)
    multiplyPacked(target, a, b);
  else multiplyRows(target, a, b);
}

function density({ re, im }: ComplexMatrix): number {
  let count = 0;
  for (let k = 0; k < re.length; k++) if (re[k] !== 0 || im[k] !== 0) count++;
  return count / re.length;
}

/** Row after row; exactly zero entries of A are skipped. */
export function multiplyRows(target: ComplexMatrix, a: ComplexMatrix, b: ComplexMatrix): void {
  const { rows, cols: inner, re: ar, im: ai } = a;
  const { cols, re: br, im: bi } = b;
  const { re: cr, im: ci } = target;
  for (let i = 0; i < rows; i++) {
    const row = i * cols;
    for (let k = 0; k < inner; k++) {
      const x = ar[i * inner + k];
      const y = ai[i * inner + k];
      if (x === 0 && y === 0) continue;
      for (let j = 0, q = k * cols, p = row; j < cols; j++, q++, p++) {
        cr[p] += x * br[q] - y * bi[q];
        ci[p] += x * bi[q] + y * br[q];
      }
    }
  }
}

/** Two columns of B at a time are packed; 2 × 2 blocks of the product are summed in registers. */
export function multiplyPacked(target: ComplexMatrix, a: ComplexMatrix, b: ComplexMatrix): void {
  const { rows, cols: inner } = a;
  const { cols } = b;
  const panel = new Float64Array(4 * inner);
  for (let j = 0; j < cols; j += 2) {
    // An odd last column is paired with itself.
    const right = Math.min(j + 1, cols - 1);
    for (let k = 0; k < inner; k++) {
      panel[4 * k] = b.re[k * cols + j];
      panel[4 * k + 1] = b.im[k * cols + j];
      panel[4 * k + 2] = b.re[k * cols + right];
      panel[4 * k + 3] = b.im[k * cols + right];
    }
    for (let i = 0; i < rows; i += 2) addBlock(target, a, panel, i, Math.min(i + 1, rows - 1), j, right);
  }
}

function addBlock(
  target: ComplexMatrix,
  { cols: inner, re: ar, im: ai }: ComplexMatrix,
  panel: Float64Array,
  top: number,
  bottom: number,
  left: number,
  right: number,
): void {
  let r00 = 0;
  let i00 = 0;
  let r01 = 0;
  let i01 = 0;
  let r10 = 0;
  let i10 = 0;
  let r11 = 0;
  let i11 = 0;
  for (let k = 0, p = top * inner, s = bottom * inner, q = 0; k < inner; k++, p++, s++, q += 4) {
    const xr = ar[p];
    const xi = ai[p];
    const yr = ar[s];
    const yi = ai[s];
    const ur = panel[q];
    const ui = panel[q + 1];
    const vr = panel[q + 2];
    const vi = panel[q + 3];
    r00 += xr * ur - xi * ui;
    i00 += xr * ui + xi * ur;
    r01 += xr * vr - xi * vi;
    i01 += xr * vi + xi * vr;
    r10 += yr * ur - yi * ui;
    i10 += yr * ui + yi * ur;
    r11 += yr * vr - yi * vi;
    i11 += yr * vi + yi * vr;
  }
  const { cols, re, im } = target;
  re[top * cols + left] += r00;
  im[top * cols + left] += i00;
  if (right > left) {
    re[top * cols + right] += r01;
    im[top * cols + right] += i01;
  }
  if (bottom === top) return;
  re[bottom * cols + left] += r10;
  im[bottom * cols + left] += i10;
  if (right > left) {
    re[bottom * cols + right] += r11;
    im[bottom * cols + right] += i11;
  }
}
