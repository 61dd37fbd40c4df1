import { DENSE_COEFFICIENT } from '../tolerances.js';
import { multiplyAdjoint } from './kernels/multiply-adjoint.js';

/** Rows of `products` that `addProducts` takes at a time. */
export const BATCH = 32;

/**
 * The coefficients of one cone as a sparse real matrix: one row per unknown that occurs, in order of decreasing length;
 * one column per coordinate of the pattern. Rows from the front that are mostly full are stored densely as well.
 */
export interface CoefficientRows {
  readonly count: number;
  readonly width: number;
  readonly unknown: Int32Array;
  readonly start: Int32Array;
  readonly coordinate: Int32Array;
  readonly value: Float64Array;
  /** prefix[t]: every coordinate used by rows t … count − 1 is below it. */
  readonly prefix: Int32Array;
  readonly denseCount: number;
  /** denseCount × width, row-major. */
  readonly dense: Float64Array;
}

/** Entries of one unknown; coordinates distinct. */
export interface RowEntries {
  readonly unknown: number;
  readonly coordinates: ArrayLike<number>;
  readonly values: ArrayLike<number>;
}

/** `rows` must come in order of decreasing length. */
export function coefficientRows(rows: readonly RowEntries[], width: number): CoefficientRows {
  const count = rows.length;
  const start = new Int32Array(count + 1);
  rows.forEach((row, t) => (start[t + 1] = start[t] + row.values.length));
  const coordinate = new Int32Array(start[count]);
  const value = new Float64Array(start[count]);
  const prefix = new Int32Array(count);
  rows.forEach((row, t) => {
    coordinate.set(row.coordinates, start[t]);
    value.set(row.values, start[t]);
  });
  for (let t = count - 1, top = 0; t >= 0; t--) {
    for (let e = start[t]; e < start[t + 1]; e++) top = Math.max(top, coordinate[e] + 1);
    prefix[t] = top;
  }
  let denseCount = 0;
  while (denseCount < count && start[denseCount + 1] - start[denseCount] >= DENSE_COEFFICIENT * width) denseCount++;
  const dense = new Float64Array(denseCount * width);
  for (let t = 0; t < denseCount; t++) {
    for (let e = start[t]; e < start[t + 1]; e++) dense[t * width + coordinate[e]] = value[e];
  }
  const unknown = Int32Array.from(rows, (row) => row.unknown);
  return { count, width, unknown, start, coordinate, value, prefix, denseCount, dense };
}

/** out[unknown] += factor · Σ_c A_{unknown,c} v_c. */
export function addRowsTimes(rows: CoefficientRows, v: Float64Array, factor: number, out: Float64Array): void {
  const { count, unknown, start, coordinate, value } = rows;
  for (let t = 0; t < count; t++) {
    let sum = 0;
    for (let e = start[t]; e < start[t + 1]; e++) sum += value[e] * v[coordinate[e]];
    out[unknown[t]] += factor * sum;
  }
}

/** out_c ← Σ_unknown y_unknown A_{unknown,c}. */
export function combineRows(rows: CoefficientRows, y: Float64Array, out: Float64Array): void {
  const { count, unknown, start, coordinate, value } = rows;
  out.fill(0);
  for (let t = 0; t < count; t++) {
    const factor = y[unknown[t]];
    for (let e = start[t]; e < start[t + 1]; e++) out[coordinate[e]] += factor * value[e];
  }
}

/**
 * For the rows first … first + BATCH − 1 (those that exist), of which `products` holds one vector each (stride `width`):
 * adds its inner product with every row t not before it to matrix[unknown of the vector][unknown of t].
 */
export function addProducts(
  rows: CoefficientRows,
  first: number,
  products: Float64Array,
  matrix: Float64Array,
  order: number,
): void {
  if (first < rows.denseCount) addDenseProducts(rows, first, products, matrix, order);
  for (let t = first; t < Math.min(first + BATCH, rows.count); t += 4) {
    addSparseProducts(rows, t, products, (t - first) * rows.width, matrix, order);
  }
}

/** The sparse part for the four vectors from row `first` on, which start at `at`. */
function addSparseProducts(
  rows: CoefficientRows,
  first: number,
  products: Float64Array,
  at: number,
  matrix: Float64Array,
  order: number,
): void {
  const { count, width, unknown, start, coordinate, value } = rows;
  const last = Math.min(first + 4, count) - 1;
  const m0 = unknown[first] * order;
  const m1 = unknown[Math.min(first + 1, last)] * order;
  const m2 = unknown[Math.min(first + 2, last)] * order;
  const m3 = unknown[last] * order;
  for (let t = Math.max(first, rows.denseCount); t < count; t++) {
    let s0 = 0;
    let s1 = 0;
    let s2 = 0;
    let s3 = 0;
    for (let e = start[t]; e < start[t + 1]; e++) {
      const x = value[e];
      const c = at + coordinate[e];
      s0 += x * products[c];
      s1 += x * products[c + width];
      s2 += x * products[c + 2 * width];
      s3 += x * products[c + 3 * width];
    }
    const column = unknown[t];
    matrix[m0 + column] += s0;
    if (t > first && first + 1 <= last) matrix[m1 + column] += s1;
    if (t > first + 1 && first + 2 <= last) matrix[m2 + column] += s2;
    if (t > first + 2 && first + 3 <= last) matrix[m3 + column] += s3;
  }
}

const block = { data: new Float64Array(0) };

/** The densely stored rows, as one matrix product. */
function addDenseProducts(
  rows: CoefficientRows,
  first: number,
  products: Float64Array,
  matrix: Float64Array,
  order: number,
): void {
  const { count, width, unknown, denseCount, dense, prefix } = rows;
  const vectors = Math.min(BATCH, count - first);
  const height = denseCount - first;
  if (block.data.length < BATCH * height) block.data = new Float64Array(BATCH * height);
  const out = { data: block.data, start: 0, stride: height, imaginary: 0 };
  const left = { data: products, start: 0, stride: width, imaginary: 0 };
  const right = { data: dense, start: first * width, stride: width, imaginary: 0 };
  multiplyAdjoint(out, left, right, [vectors, height, prefix[first]], { complex: false });
  for (let s = 0; s < vectors; s++) {
    const row = unknown[first + s] * order;
    for (let t = s; t < height; t++) matrix[row + unknown[first + t]] += out.data[s * height + t];
  }
}
