import { ThalwegError } from '../../errors.js';
import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import type { ComplexInterval } from './complex-interval.js';
import { type Interval } from './interval.js';
import { productHigh, productLow } from './interval.js';
import { addDown, addUp, subDown, subUp } from './rounding.js';

/** A real rows × cols matrix of intervals, row-major: all real matrices with lo ≤ entry ≤ hi. */
export interface IntervalMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly lo: Float64Array;
  readonly hi: Float64Array;
}

/** A complex rows × cols matrix of rectangles. */
export interface ComplexIntervalMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly re: IntervalMatrix;
  readonly im: IntervalMatrix;
}

export function intervalZeros(rows: number, cols: number = rows): IntervalMatrix {
  return { rows, cols, lo: new Float64Array(rows * cols), hi: new Float64Array(rows * cols) };
}

export function complexIntervalZeros(rows: number, cols: number = rows): ComplexIntervalMatrix {
  return { rows, cols, re: intervalZeros(rows, cols), im: intervalZeros(rows, cols) };
}

/** The interval matrix of one real matrix (flat, row-major); throws `not-finite`, and `dimension-mismatch` for its length. */
export function pointMatrix(a: Float64Array, rows: number, cols: number = rows): IntervalMatrix {
  if (a.length !== rows * cols) {
    throw new ThalwegError('dimension-mismatch', `expected ${rows * cols} entries, got ${a.length}`);
  }
  requireFinite(a);
  return { rows, cols, lo: a.slice(), hi: a.slice() };
}

/** The interval matrix of one complex matrix; throws `not-finite`. */
export function complexPointMatrix(a: ComplexMatrix): ComplexIntervalMatrix {
  const { rows, cols } = a;
  return { rows, cols, re: pointMatrix(a.re, rows, cols), im: pointMatrix(a.im, rows, cols) };
}

export function entryAt(a: ComplexIntervalMatrix, i: number, j: number): ComplexInterval {
  const k = i * a.cols + j;
  return { re: { lo: a.re.lo[k], hi: a.re.hi[k] }, im: { lo: a.im.lo[k], hi: a.im.hi[k] } };
}

export function setEntry(a: ComplexIntervalMatrix, i: number, j: number, x: ComplexInterval): void {
  const k = i * a.cols + j;
  a.re.lo[k] = x.re.lo;
  a.re.hi[k] = x.re.hi;
  a.im.lo[k] = x.im.lo;
  a.im.hi[k] = x.im.hi;
}

export function addIntervalMatrix(a: IntervalMatrix, b: IntervalMatrix): IntervalMatrix {
  requireSameShape(a, b);
  const out = intervalZeros(a.rows, a.cols);
  for (let k = 0; k < out.lo.length; k++) {
    out.lo[k] = addDown(a.lo[k], b.lo[k]);
    out.hi[k] = addUp(a.hi[k], b.hi[k]);
  }
  return out;
}

export function subIntervalMatrix(a: IntervalMatrix, b: IntervalMatrix): IntervalMatrix {
  requireSameShape(a, b);
  const out = intervalZeros(a.rows, a.cols);
  for (let k = 0; k < out.lo.length; k++) {
    out.lo[k] = subDown(a.lo[k], b.hi[k]);
    out.hi[k] = subUp(a.hi[k], b.lo[k]);
  }
  return out;
}

/** The product of every entry with one interval. */
export function scaleIntervalMatrix(a: IntervalMatrix, factor: Interval): IntervalMatrix {
  const out = intervalZeros(a.rows, a.cols);
  for (let k = 0; k < out.lo.length; k++) {
    out.lo[k] = productLow(a.lo[k], a.hi[k], factor.lo, factor.hi);
    out.hi[k] = productHigh(a.lo[k], a.hi[k], factor.lo, factor.hi);
  }
  return out;
}

/** Every entry widened by ±radius, radius ≥ 0. */
function widenIntervalMatrix(a: IntervalMatrix, radius: number): IntervalMatrix {
  return { ...a, lo: a.lo.map((x) => subDown(x, radius)), hi: a.hi.map((x) => addUp(x, radius)) };
}

export function transposeIntervalMatrix(a: IntervalMatrix): IntervalMatrix {
  return { rows: a.cols, cols: a.rows, lo: transposed(a.lo, a.rows, a.cols), hi: transposed(a.hi, a.rows, a.cols) };
}

/** −A, entrywise. */
export function negateIntervalMatrix(a: IntervalMatrix): IntervalMatrix {
  return { ...a, lo: a.hi.map((x) => 0 - x), hi: a.lo.map((x) => 0 - x) };
}

/** Apply an operation on real interval matrices to the real and the imaginary parts. */
function byParts(
  f: (a: IntervalMatrix, b: IntervalMatrix) => IntervalMatrix,
  a: ComplexIntervalMatrix,
  b: ComplexIntervalMatrix,
): ComplexIntervalMatrix {
  return { rows: a.rows, cols: a.cols, re: f(a.re, b.re), im: f(a.im, b.im) };
}

export function addComplexMatrix(a: ComplexIntervalMatrix, b: ComplexIntervalMatrix): ComplexIntervalMatrix {
  return byParts(addIntervalMatrix, a, b);
}

export function subComplexMatrix(a: ComplexIntervalMatrix, b: ComplexIntervalMatrix): ComplexIntervalMatrix {
  return byParts(subIntervalMatrix, a, b);
}

/** The product of every entry with one real interval. */
export function scaleComplexMatrix(a: ComplexIntervalMatrix, factor: Interval): ComplexIntervalMatrix {
  return { ...a, re: scaleIntervalMatrix(a.re, factor), im: scaleIntervalMatrix(a.im, factor) };
}

/** Both parts of every entry widened by ±radius, radius ≥ 0. */
export function widenComplexMatrix(a: ComplexIntervalMatrix, radius: number): ComplexIntervalMatrix {
  return { ...a, re: widenIntervalMatrix(a.re, radius), im: widenIntervalMatrix(a.im, radius) };
}

export function adjointComplexMatrix(a: ComplexIntervalMatrix): ComplexIntervalMatrix {
  return {
    rows: a.cols,
    cols: a.rows,
    re: transposeIntervalMatrix(a.re),
    im: negateIntervalMatrix(transposeIntervalMatrix(a.im)),
  };
}

function transposed(a: Float64Array, rows: number, cols: number): Float64Array {
  const out = new Float64Array(a.length);
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++) out[j * rows + i] = a[i * cols + j];
  }
  return out;
}

function requireFinite(a: Float64Array): void {
  const bad = a.findIndex((x) => !Number.isFinite(x));
  if (bad >= 0) throw new ThalwegError('not-finite', `expected finite entries, got ${a[bad]} at position ${bad}`);
}

function requireSameShape(a: IntervalMatrix, b: IntervalMatrix): void {
  if (a.rows !== b.rows || a.cols !== b.cols) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected matrices of one shape, got ${a.rows} × ${a.cols} and ${b.rows} × ${b.cols}`,
    );
  }
}
