import { ThalwegError } from '../../errors.js';
import {
  type ComplexIntervalMatrix,
  type IntervalMatrix,
  complexIntervalZeros,
  negateIntervalMatrix,
} from './interval-matrix.js';
import { productHigh, productLow } from './interval.js';
import { type MidpointRadius, midpointProduct, midpointRadius } from './midpoint-radius.js';
import { addDown, addUp, subDown, subUp } from './rounding.js';

/** AB for large matrices, by midpoints and radii: two or three plain products. Throws `dimension-mismatch`. */
export function multiplyIntervalMatrix(a: IntervalMatrix, b: IntervalMatrix): IntervalMatrix {
  requireInner(a.cols, b.rows);
  return midpointProduct(midpointRadius(a), midpointRadius(b));
}

/** AB for large complex matrices: each part is one real product of twice the inner side. Throws `dimension-mismatch`. */
export function multiplyComplexMatrix(a: ComplexIntervalMatrix, b: ComplexIntervalMatrix): ComplexIntervalMatrix {
  requireInner(a.cols, b.rows);
  const ar = midpointRadius(a.re);
  const ai = midpointRadius(a.im);
  const br = midpointRadius(b.re);
  const bi = midpointRadius(b.im);
  return {
    rows: a.rows,
    cols: b.cols,
    re: midpointProduct(sideBySide(ar, midpointRadius(negateIntervalMatrix(a.im))), stacked(br, bi)),
    im: midpointProduct(sideBySide(ar, ai), stacked(bi, br)),
  };
}

/**
 * AB for small complex matrices, entry by entry with directed rounding: sums and products of doubles that are doubles come
 * out as points, and zeros stay zeros. Throws `dimension-mismatch`.
 */
export function multiplyTightly(a: ComplexIntervalMatrix, b: ComplexIntervalMatrix): ComplexIntervalMatrix {
  requireInner(a.cols, b.rows);
  const out = complexIntervalZeros(a.rows, b.cols);
  addProductInto(out.re, a.re, b.re);
  subtractProductInto(out.re, a.im, b.im);
  addProductInto(out.im, a.re, b.im);
  addProductInto(out.im, a.im, b.re);
  return out;
}

/** target += AB, entry by entry. */
function addProductInto(target: IntervalMatrix, a: IntervalMatrix, b: IntervalMatrix): void {
  for (let i = 0; i < a.rows; i++) {
    for (let k = 0; k < a.cols; k++) {
      const xl = a.lo[i * a.cols + k];
      const xh = a.hi[i * a.cols + k];
      if (xl === 0 && xh === 0) continue;
      for (let j = 0, p = i * b.cols, q = k * b.cols; j < b.cols; j++, p++, q++) {
        if (b.lo[q] === 0 && b.hi[q] === 0) continue;
        target.lo[p] = addDown(target.lo[p], productLow(xl, xh, b.lo[q], b.hi[q]));
        target.hi[p] = addUp(target.hi[p], productHigh(xl, xh, b.lo[q], b.hi[q]));
      }
    }
  }
}

/** target −= AB, entry by entry. */
function subtractProductInto(target: IntervalMatrix, a: IntervalMatrix, b: IntervalMatrix): void {
  for (let i = 0; i < a.rows; i++) {
    for (let k = 0; k < a.cols; k++) {
      const xl = a.lo[i * a.cols + k];
      const xh = a.hi[i * a.cols + k];
      if (xl === 0 && xh === 0) continue;
      for (let j = 0, p = i * b.cols, q = k * b.cols; j < b.cols; j++, p++, q++) {
        if (b.lo[q] === 0 && b.hi[q] === 0) continue;
        target.lo[p] = subDown(target.lo[p], productHigh(xl, xh, b.lo[q], b.hi[q]));
        target.hi[p] = subUp(target.hi[p], productLow(xl, xh, b.lo[q], b.hi[q]));
      }
    }
  }
}

/** [A B] */
function sideBySide(a: MidpointRadius, b: MidpointRadius): MidpointRadius {
  const join = (x: Float64Array, y: Float64Array): Float64Array => {
    const out = new Float64Array(x.length + y.length);
    for (let i = 0; i < a.rows; i++) {
      out.set(x.subarray(i * a.cols, (i + 1) * a.cols), 2 * i * a.cols);
      out.set(y.subarray(i * a.cols, (i + 1) * a.cols), (2 * i + 1) * a.cols);
    }
    return out;
  };
  return { rows: a.rows, cols: 2 * a.cols, mid: join(a.mid, b.mid), rad: joinRadii(a, b, join) };
}

/** A above B. */
function stacked(a: MidpointRadius, b: MidpointRadius): MidpointRadius {
  const join = (x: Float64Array, y: Float64Array): Float64Array => {
    const out = new Float64Array(x.length + y.length);
    out.set(x);
    out.set(y, x.length);
    return out;
  };
  return { rows: 2 * a.rows, cols: a.cols, mid: join(a.mid, b.mid), rad: joinRadii(a, b, join) };
}

function joinRadii(
  a: MidpointRadius,
  b: MidpointRadius,
  join: (x: Float64Array, y: Float64Array) => Float64Array,
): Float64Array | null {
  if (!a.rad && !b.rad) return null;
  return join(a.rad ?? new Float64Array(a.mid.length), b.rad ?? new Float64Array(b.mid.length));
}

function requireInner(a: number, b: number): void {
  if (a !== b) throw new ThalwegError('dimension-mismatch', `expected equal inner sides, got ${a} and ${b}`);
}
