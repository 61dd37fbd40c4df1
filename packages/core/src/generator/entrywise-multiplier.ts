import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { SparseMatrix } from '../linalg/sparse-matrix.js';
import type { Monomial } from './monomial.js';

/** What multiplies A entry by entry: x_i conj(x_j) of diagonal X, and conj(y_i) + y_j of a diagonal Y. Null while it is zero. */
export interface Multiplier {
  re: Float64Array | null;
  im: Float64Array | null;
}

/** Add A ↦ XAX* for a diagonal X. */
export function addDiagonal(m: Multiplier, n: number, { targets, re, im, real }: Monomial): void {
  const count = targets.length;
  m.re ??= new Float64Array(n * n);
  if (!real) m.im ??= new Float64Array(n * n);
  const { re: mr, im: mi } = m;
  for (let s = 0; s < count; s++) {
    for (let t = 0; t < count; t++) {
      const at = targets[s] * n + targets[t];
      mr[at] += re[s] * re[t] + im[s] * im[t];
      if (mi) mi[at] += im[s] * re[t] - re[s] * im[t];
    }
  }
}

/** Add A ↦ AY + Y*A; false, and nothing done, when Y is not diagonal. */
export function addDiagonalDrift(m: Multiplier, n: number, y: SparseMatrix): boolean {
  for (let i = 0; i < n; i++) {
    for (let p = y.rowStart[i]; p < y.rowStart[i + 1]; p++) if (y.colIndex[p] !== i) return false;
  }
  m.re ??= new Float64Array(n * n);
  if (y.im.some((value) => value !== 0)) m.im ??= new Float64Array(n * n);
  const { re: mr, im: mi } = m;
  y.colIndex.forEach((i, p) => {
    for (let j = 0; j < n; j++) {
      mr[i * n + j] += y.re[p];
      mr[j * n + i] += y.re[p];
      if (!mi) continue;
      mi[i * n + j] -= y.im[p];
      mi[j * n + i] += y.im[p];
    }
  });
  return true;
}

/** out = multiplier·A, entry by entry, in one row. */
export function multiplyRow(
  { re, im }: Multiplier,
  i: number,
  { re: ar, im: ai, cols: n }: ComplexMatrix,
  out: ComplexMatrix,
): void {
  const { re: or, im: oi } = out;
  const from = i * n;
  const to = from + n;
  if (!re) {
    or.fill(0, from, to);
    oi.fill(0, from, to);
  } else if (!im) {
    for (let k = from; k < to; k++) {
      or[k] = re[k] * ar[k];
      oi[k] = re[k] * ai[k];
    }
  } else {
    for (let k = from; k < to; k++) {
      or[k] = re[k] * ar[k] - im[k] * ai[k];
      oi[k] = re[k] * ai[k] + im[k] * ar[k];
    }
  }
}
