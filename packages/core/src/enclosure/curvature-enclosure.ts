import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { MatrixUnits } from '../algebra/matrix-units.js';
import { type ComplexInterval, conjugateComplex, subComplex } from '../checker/arithmetic/complex-interval.js';
import {
  type ComplexIntervalMatrix,
  type IntervalMatrix,
  adjointComplexMatrix,
  complexIntervalZeros,
  entryAt,
  scaleComplexMatrix,
  setEntry,
  subComplexMatrix,
  transposeIntervalMatrix,
} from '../checker/arithmetic/interval-matrix.js';
import { multiplyComplexMatrix } from '../checker/arithmetic/interval-product.js';
import { point } from '../checker/arithmetic/interval.js';

/**
 * Γ and Γ₂ (see `carreDuChamp`) as tensors of intervals, from L on matrix units: entry (p·D+q, r) is the coefficient of e_r
 * at (e_p, e_q). Cost D⁴.
 */
export interface CurvatureTensors {
  readonly units: MatrixUnits;
  readonly gamma: ComplexIntervalMatrix;
  readonly gamma2: ComplexIntervalMatrix;
}

export function encloseCurvature(units: MatrixUnits, l: ComplexIntervalMatrix): CurvatureTensors {
  const gamma = scaleComplexMatrix(gammaTwice(units, l), HALF);
  const d = units.count;
  const lt = transposed(l);
  const ofGamma = multiplyComplexMatrix(gamma, lt);
  const onRight = complexIntervalZeros(d * d, d);
  for (let p = 0; p < d; p++) paste(onRight, p * d, multiplyComplexMatrix(lt, rowsOf(gamma, p * d, d)));
  const onLeft = reshaped(multiplyComplexMatrix(adjointComplexMatrix(l), reshaped(gamma, d, d * d)), d * d, d);
  const gamma2 = scaleComplexMatrix(subComplexMatrix(subComplexMatrix(ofGamma, onRight), onLeft), HALF);
  return { units, gamma, gamma2 };
}

const HALF = point(0.5);
const ZERO_ENTRY: ComplexInterval = { re: point(0), im: point(0) };

/** L(e_p*e_q) − L(e_p)*e_q − e_p*L(e_q). */
function gammaTwice(
  { count: d, size: n, row, col, index }: MatrixUnits,
  l: ComplexIntervalMatrix,
): ComplexIntervalMatrix {
  const out = complexIntervalZeros(d * d, d);
  const column = new Array<ComplexInterval>(d);
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      column.fill(ZERO_ENTRY);
      const [a, b, c, e] = [row[p], col[p], row[q], col[q]];
      if (a === c) for (let r = 0; r < d; r++) column[r] = entryAt(l, r, index[b * n + e]);
      for (let k = 0; k < n; k++) {
        const ck = index[c * n + k];
        const ke = index[k * n + e];
        if (ck >= 0 && ke >= 0) column[ke] = subComplex(column[ke], conjugateComplex(entryAt(l, ck, p)));
        const ak = index[a * n + k];
        const bk = index[b * n + k];
        if (ak >= 0 && bk >= 0) column[bk] = subComplex(column[bk], entryAt(l, ak, q));
      }
      column.forEach((x, r) => setEntry(out, p * d + q, r, x));
    }
  }
  return out;
}

/** One of the two forms on a block, over the chosen units: entry ((p,k),(q,l)) = F(e_p,e_q)_kl. */
export function formOnBlock(
  tensor: ComplexIntervalMatrix,
  { count: d, size: n, index }: MatrixUnits,
  { blocks, offsets }: BlockAlgebra,
  block: number,
  kept: readonly number[],
): ComplexIntervalMatrix {
  const size = blocks[block];
  const start = offsets[block];
  const out = complexIntervalZeros(kept.length * size);
  kept.forEach((p, i) => {
    kept.forEach((q, j) => {
      for (let k = 0; k < size; k++) {
        for (let m = 0; m < size; m++) {
          setEntry(out, i * size + k, j * size + m, entryAt(tensor, p * d + q, index[(start + k) * n + start + m]));
        }
      }
    });
  });
  return out;
}

/** <ψ|F(e_p,e_q)ψ> at the first vector of the block: where all vectors are alike. */
export function formAtFirstVector(form: ComplexIntervalMatrix, size: number): ComplexIntervalMatrix {
  const m = form.rows / size;
  const out = complexIntervalZeros(m);
  for (let i = 0; i < m; i++) for (let j = 0; j < m; j++) setEntry(out, i, j, entryAt(form, i * size, j * size));
  return out;
}

function transposed(a: ComplexIntervalMatrix): ComplexIntervalMatrix {
  return { rows: a.cols, cols: a.rows, re: transposeIntervalMatrix(a.re), im: transposeIntervalMatrix(a.im) };
}

function byParts(
  a: ComplexIntervalMatrix,
  rows: number,
  cols: number,
  f: (x: IntervalMatrix) => IntervalMatrix,
): ComplexIntervalMatrix {
  return { rows, cols, re: f(a.re), im: f(a.im) };
}

function reshaped(a: ComplexIntervalMatrix, rows: number, cols: number): ComplexIntervalMatrix {
  return byParts(a, rows, cols, (x) => ({ ...x, rows, cols }));
}

function rowsOf(a: ComplexIntervalMatrix, from: number, count: number): ComplexIntervalMatrix {
  const { cols } = a;
  const cut = (x: Float64Array) => x.slice(from * cols, (from + count) * cols);
  return byParts(a, count, cols, (x) => ({ rows: count, cols, lo: cut(x.lo), hi: cut(x.hi) }));
}

function paste(target: ComplexIntervalMatrix, row: number, a: ComplexIntervalMatrix): void {
  for (const [to, from] of [
    [target.re, a.re],
    [target.im, a.im],
  ]) {
    to.lo.set(from.lo, row * target.cols);
    to.hi.set(from.hi, row * target.cols);
  }
}
