import { ThalwegError } from '../errors.js';
import { zeros, type ComplexMatrix } from './complex-matrix.js';
import { requireInner, requireSameShape } from './shape-checks.js';

/**
 * A complex matrix in compressed rows: entries of row i sit at rowStart[i] … rowStart[i + 1] − 1, with columns ascending
 * and no stored zeros.
 */
export interface SparseMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly rowStart: Int32Array;
  readonly colIndex: Int32Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** [row, column, re, im]. */
export type Triplet = readonly [number, number, number, number];

export function sparseFromDense(a: ComplexMatrix): SparseMatrix {
  return compress(a.rows, a.cols, (append, i) => {
    for (let j = 0, k = i * a.cols; j < a.cols; j++, k++) append(j, a.re[k], a.im[k]);
  });
}

/** Sums duplicates and drops exact zeros; throws `dimension-mismatch` on an index outside the shape. */
export function sparseFromTriplets(rows: number, cols: number, triplets: Iterable<Triplet>): SparseMatrix {
  const list = [...triplets];
  for (const [i, j] of list) {
    if (Number.isInteger(i) && Number.isInteger(j) && i >= 0 && j >= 0 && i < rows && j < cols) continue;
    throw new ThalwegError(
      'dimension-mismatch',
      `expected an entry inside ${rows}×${cols} (0-based), got (${i}, ${j})`,
    );
  }
  list.sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  let next = 0;
  return compress(rows, cols, (append, i) => {
    while (next < list.length && list[next][0] === i) {
      const j = list[next][1];
      let re = 0;
      let im = 0;
      for (; next < list.length && list[next][0] === i && list[next][1] === j; next++) {
        re += list[next][2];
        im += list[next][3];
      }
      append(j, re, im);
    }
  });
}

export function denseFromSparse(s: SparseMatrix): ComplexMatrix {
  const a = zeros(s.rows, s.cols);
  for (let i = 0; i < s.rows; i++) {
    for (let p = s.rowStart[i]; p < s.rowStart[i + 1]; p++) {
      a.re[i * s.cols + s.colIndex[p]] = s.re[p];
      a.im[i * s.cols + s.colIndex[p]] = s.im[p];
    }
  }
  return a;
}

export function sparseAdjoint(s: SparseMatrix): SparseMatrix {
  const count = s.re.length;
  const rowStart = new Int32Array(s.cols + 1);
  for (let p = 0; p < count; p++) rowStart[s.colIndex[p] + 1]++;
  for (let j = 0; j < s.cols; j++) rowStart[j + 1] += rowStart[j];
  const colIndex = new Int32Array(count);
  const re = new Float64Array(count);
  const im = new Float64Array(count);
  const next = rowStart.slice();
  for (let i = 0; i < s.rows; i++) {
    for (let p = s.rowStart[i]; p < s.rowStart[i + 1]; p++) {
      const q = next[s.colIndex[p]]++;
      colIndex[q] = i;
      re[q] = s.re[p];
      im[q] = -s.im[p];
    }
  }
  return { rows: s.cols, cols: s.rows, rowStart, colIndex, re, im };
}

/** S ⊗ T, with the index order of the dense `kronecker`. */
export function sparseKronecker(s: SparseMatrix, t: SparseMatrix): SparseMatrix {
  return compress(s.rows * t.rows, s.cols * t.cols, (append, i) => {
    const is = Math.floor(i / t.rows);
    const it = i % t.rows;
    for (let p = s.rowStart[is]; p < s.rowStart[is + 1]; p++) {
      for (let q = t.rowStart[it]; q < t.rowStart[it + 1]; q++) {
        const re = s.re[p] * t.re[q] - s.im[p] * t.im[q];
        const im = s.re[p] * t.im[q] + s.im[p] * t.re[q];
        append(s.colIndex[p] * t.cols + t.colIndex[q], re, im);
      }
    }
  });
}

/** S T. */
export function sparseMultiply(s: SparseMatrix, t: SparseMatrix): SparseMatrix {
  requireInner(s.cols, t.rows);
  const row = zeros(1, t.cols);
  const seen = new Uint8Array(t.cols);
  return compress(s.rows, t.cols, (append, i) => {
    const touched: number[] = [];
    for (let p = s.rowStart[i]; p < s.rowStart[i + 1]; p++) {
      const k = s.colIndex[p];
      for (let q = t.rowStart[k]; q < t.rowStart[k + 1]; q++) {
        const j = t.colIndex[q];
        if (!seen[j]) {
          seen[j] = 1;
          touched.push(j);
        }
        row.re[j] += s.re[p] * t.re[q] - s.im[p] * t.im[q];
        row.im[j] += s.re[p] * t.im[q] + s.im[p] * t.re[q];
      }
    }
    touched.sort((a, b) => a - b);
    for (const j of touched) {
      append(j, row.re[j], row.im[j]);
      seen[j] = row.re[j] = row.im[j] = 0;
    }
  });
}

/** S A, dense. */
export function sparseTimesDense(s: SparseMatrix, a: ComplexMatrix): ComplexMatrix {
  requireInner(s.cols, a.rows);
  const n = a.cols;
  const c = zeros(s.rows, n);
  for (let i = 0; i < s.rows; i++) {
    for (let p = s.rowStart[i]; p < s.rowStart[i + 1]; p++) {
      const x = s.re[p];
      const y = s.im[p];
      for (let j = 0, r = i * n, q = s.colIndex[p] * n; j < n; j++, r++, q++) {
        c.re[r] += x * a.re[q] - y * a.im[q];
        c.im[r] += x * a.im[q] + y * a.re[q];
      }
    }
  }
  return c;
}

/** A S, dense. */
export function denseTimesSparse(a: ComplexMatrix, s: SparseMatrix): ComplexMatrix {
  requireInner(a.cols, s.rows);
  const c = zeros(a.rows, s.cols);
  for (let i = 0; i < a.rows; i++) {
    const row = i * s.cols;
    for (let k = 0; k < s.rows; k++) {
      const x = a.re[i * a.cols + k];
      const y = a.im[i * a.cols + k];
      for (let p = s.rowStart[k]; p < s.rowStart[k + 1]; p++) {
        const r = row + s.colIndex[p];
        c.re[r] += x * s.re[p] - y * s.im[p];
        c.im[r] += x * s.im[p] + y * s.re[p];
      }
    }
  }
  return c;
}

/** S + (re + i im) T. */
export function sparseAdd(s: SparseMatrix, t: SparseMatrix, re: number = 1, im: number = 0): SparseMatrix {
  requireSameShape(s, t);
  return compress(s.rows, s.cols, (append, i) => {
    let p = s.rowStart[i];
    let q = t.rowStart[i];
    while (p < s.rowStart[i + 1] || q < t.rowStart[i + 1]) {
      const js = p < s.rowStart[i + 1] ? s.colIndex[p] : s.cols;
      const jt = q < t.rowStart[i + 1] ? t.colIndex[q] : s.cols;
      let x = 0;
      let y = 0;
      if (js <= jt) {
        x = s.re[p];
        y = s.im[p++];
      }
      if (jt <= js) {
        x += re * t.re[q] - im * t.im[q];
        y += re * t.im[q] + im * t.re[q++];
      }
      append(Math.min(js, jt), x, y);
    }
  });
}

/** Builds row after row; `fill` appends the entries of one row in ascending column order, zeros are dropped. */
function compress(
  rows: number,
  cols: number,
  fill: (append: (j: number, re: number, im: number) => void, row: number) => void,
): SparseMatrix {
  const rowStart = new Int32Array(rows + 1);
  const colIndex: number[] = [];
  const re: number[] = [];
  const im: number[] = [];
  const append = (j: number, x: number, y: number): void => {
    // Only exact zeros carry no information; anything else, however small, is kept.
    if (x === 0 && y === 0) return;
    colIndex.push(j);
    re.push(x);
    im.push(y);
  };
  for (let i = 0; i < rows; i++) {
    fill(append, i);
    rowStart[i + 1] = colIndex.length;
  }
  return {
    rows,
    cols,
    rowStart,
    colIndex: Int32Array.from(colIndex),
    re: Float64Array.from(re),
    im: Float64Array.from(im),
  };
}
