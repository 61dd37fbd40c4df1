import { SIMD_CHUNK, SIMD_FLOOR } from '../../tolerances.js';
import { dotTile } from './dot-tile.js';
import { SimdKernel } from './simd-kernel.js';

/**
 * Rows of equal length inside a flat array: row r starts at start + r · stride, and its imaginary part, if the product is
 * complex, `imaginary` entries later.
 */
export interface Panel {
  readonly data: Float64Array;
  readonly start: number;
  readonly stride: number;
  readonly imaginary: number;
}

/** [rows of A and C, rows of B and columns of C, length of the rows of A and B]. */
export type ProductShape = readonly [number, number, number];

export interface ProductOptions {
  readonly complex: boolean;
  /** Real factor of the product, 1 by default. */
  readonly factor?: number;
  /** Add to C instead of overwriting it. */
  readonly accumulate?: boolean;
}

/** C ← factor · A B*, or C + factor · A B*. C must not overlap A or B. */
export function multiplyAdjoint(c: Panel, a: Panel, b: Panel, shape: ProductShape, options: ProductOptions): void {
  const [rows, cols, inner] = shape;
  if (rows === 0 || cols === 0) return;
  const kernel = rows * cols * inner >= SIMD_FLOOR ? sharedKernel() : null;
  if (kernel) multiplyBySimd(kernel, c, a, b, shape, options);
  else multiplyPlainly(c, a, b, shape, options);
}

/** n × n matrix held as n² real parts followed, if complex, by n² imaginary ones. */
export function squarePanel(data: Float64Array, n: number): Panel {
  return { data, start: 0, stride: n, imaginary: n * n };
}

let shared: SimdKernel | null | undefined;

/** One kernel per process: its memory is scratch only. */
function sharedKernel(): SimdKernel | null {
  shared ??= SimdKernel.create();
  return shared;
}

/**
 * The product in the kernel's memory. Of complex operands, the real rows are followed by the imaginary ones; the four
 * products of parts come out at once, and Re(A B*) = Re A Re Bᵀ + Im A Im Bᵀ, Im(A B*) = Im A Re Bᵀ − Re A Im Bᵀ.
 */
export function multiplyBySimd(
  kernel: SimdKernel,
  c: Panel,
  a: Panel,
  b: Panel,
  [rows, cols, inner]: ProductShape,
  { complex, factor = 1, accumulate = false }: ProductOptions,
): void {
  for (let from = 0; from === 0 || from < inner; from += SIMD_CHUNK) {
    const length = Math.min(SIMD_CHUNK, inner - from);
    const parts = complex ? 2 : 1;
    const areas = kernel.reserve(parts * rows, parts * cols, length);
    const { data, inner: width } = areas;
    for (let part = 0; part < parts; part++) {
      packRows(data, areas.a + part * rows * width, width, a, part * a.imaginary + from, length, rows);
      packRows(data, areas.b + part * cols * width, width, b, part * b.imaginary + from, length, cols);
    }
    kernel.multiply(areas, parts * rows);
    const add = accumulate || from > 0;
    if (complex) unpackComplex(data, areas.c, areas.cols, c, rows, cols, factor, add);
    else unpackReal(data, areas.c, areas.cols, c, rows, cols, factor, add);
  }
}

function packRows(
  target: Float64Array,
  at: number,
  width: number,
  { data, start, stride }: Panel,
  shift: number,
  length: number,
  rows: number,
): void {
  const first = start + shift;
  if (stride === width && length === width) {
    target.set(data.subarray(first, first + rows * stride), at);
    return;
  }
  for (let r = 0; r < rows; r++) {
    const out = at + r * width;
    const source = first + r * stride;
    // A native copy of a row costs about as much as this many entries.
    if (length > 16) target.set(data.subarray(source, source + length), out);
    else for (let k = 0; k < length; k++) target[out + k] = data[source + k];
    if (length < width) target[out + length] = 0;
  }
}

function unpackReal(
  source: Float64Array,
  from: number,
  width: number,
  { data, start, stride }: Panel,
  rows: number,
  cols: number,
  factor: number,
  accumulate: boolean,
): void {
  if (!accumulate && factor === 1 && stride === width && cols === width) {
    data.set(source.subarray(from, from + rows * width), start);
    return;
  }
  for (let r = 0; r < rows; r++) {
    const row = from + r * width;
    const out = start + r * stride;
    if (accumulate) for (let s = 0; s < cols; s++) data[out + s] += factor * source[row + s];
    else for (let s = 0; s < cols; s++) data[out + s] = factor * source[row + s];
  }
}

function unpackComplex(
  source: Float64Array,
  from: number,
  width: number,
  { data, start, stride, imaginary }: Panel,
  rows: number,
  cols: number,
  factor: number,
  accumulate: boolean,
): void {
  for (let r = 0; r < rows; r++) {
    const upper = from + r * width;
    const lower = upper + rows * width;
    const out = start + r * stride;
    if (!accumulate) {
      data.fill(0, out, out + cols);
      data.fill(0, out + imaginary, out + imaginary + cols);
    }
    for (let s = 0; s < cols; s++) {
      data[out + s] += factor * (source[upper + s] + source[lower + cols + s]);
      data[out + imaginary + s] += factor * (source[lower + s] - source[upper + cols + s]);
    }
  }
}

/** The same without WebAssembly: small products, and engines that lack it. */
export function multiplyPlainly(
  c: Panel,
  a: Panel,
  b: Panel,
  shape: ProductShape,
  { complex, factor = 1, accumulate = false }: ProductOptions,
): void {
  addTiles(c, 0, a, 0, b, 0, shape, factor, accumulate);
  if (!complex) return;
  addTiles(c, 0, a, a.imaginary, b, b.imaginary, shape, factor, true);
  addTiles(c, c.imaginary, a, a.imaginary, b, 0, shape, factor, accumulate);
  addTiles(c, c.imaginary, a, 0, b, b.imaginary, shape, -factor, true);
}

const tile = new Float64Array(16);

function addTiles(
  c: Panel,
  shiftC: number,
  a: Panel,
  shiftA: number,
  b: Panel,
  shiftB: number,
  [rows, cols, inner]: ProductShape,
  factor: number,
  accumulate: boolean,
): void {
  for (let i = 0; i < rows; i += 4) {
    const height = Math.min(4, rows - i);
    const a0 = a.start + shiftA + i * a.stride;
    const a1 = height > 1 ? a0 + a.stride : a0;
    const a2 = height > 2 ? a1 + a.stride : a0;
    const a3 = height > 3 ? a2 + a.stride : a0;
    for (let j = 0; j < cols; j += 4) {
      const width = Math.min(4, cols - j);
      const b0 = b.start + shiftB + j * b.stride;
      const b1 = width > 1 ? b0 + b.stride : b0;
      const b2 = width > 2 ? b1 + b.stride : b0;
      const b3 = width > 3 ? b2 + b.stride : b0;
      dotTile(a.data, a0, a1, a2, a3, b.data, b0, b1, b2, b3, inner, tile);
      for (let r = 0; r < height; r++) {
        const q = c.start + shiftC + (i + r) * c.stride + j;
        if (accumulate) for (let s = 0; s < width; s++) c.data[q + s] += factor * tile[4 * r + s];
        else for (let s = 0; s < width; s++) c.data[q + s] = factor * tile[4 * r + s];
      }
    }
  }
}
