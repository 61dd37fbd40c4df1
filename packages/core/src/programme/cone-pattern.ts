import { type ProgrammeBlock } from './programme.js';
import { coefficientRows, type CoefficientRows } from './coefficient-rows.js';
import { type Component } from './split-blocks.js';
import { type SparseMatrix } from '../linalg/sparse-matrix.js';

/**
 * The coefficients of one matrix cone. Rows of the block are renumbered so that those needed only by the longest
 * coefficients come last: what remains to be computed for the shorter ones is then always a leading part.
 *
 * Coordinates are the real and imaginary parts (p ≤ q) that any coefficient uses, off-diagonal ones scaled by √2, so that
 * <A, B> is the plain inner product of coordinates.
 */
export interface ConePattern {
  readonly block: number;
  readonly size: number;
  readonly complex: boolean;
  /** New row number → row of the block. */
  readonly indices: Int32Array;
  readonly rows: CoefficientRows;
  /** Of each coordinate: p ≤ q in new numbering, and 1 for an imaginary part. */
  readonly row: Int32Array;
  readonly col: Int32Array;
  readonly imaginary: Uint8Array;
  /** leading[t]: rows of the block that coefficients t, t + 1, … touch are below it. */
  readonly leading: Int32Array;
}

/** The coefficient of one unknown: keys 2 (p · size + q) + part of its real entries, p ≤ q, part 1 for imaginary ones. */
interface Row {
  readonly unknown: number;
  readonly keys: Int32Array;
  readonly values: Float64Array;
}

/** `include` tells which unknowns to keep. */
export function conePattern(
  block: ProgrammeBlock,
  { indices, block: number }: Component,
  include: (unknown: number) => boolean,
): ConePattern {
  const size = indices.length;
  const local = new Int32Array(block.size).fill(-1);
  indices.forEach((i, p) => (local[i] = p));
  const rows: Row[] = [];
  for (const { unknown, matrix } of block.coefficients) {
    if (!include(unknown)) continue;
    const row = upperEntries(unknown, matrix, indices, local);
    if (row.keys.length > 0) rows.push(row);
  }
  rows.sort((a, b) => b.keys.length - a.keys.length || a.unknown - b.unknown);
  const { order, leading } = orderIndices(rows, size);
  const place = new Int32Array(size);
  order.forEach((p, k) => (place[p] = k));
  const renumbered = rows.map((row) => renumber(row, place, size));
  const keys = orderKeys(renumbered, size);
  const coordinate = new Int32Array(2 * size * size);
  keys.forEach((key, c) => (coordinate[key] = c));
  const complexConstant = upperEntries(-1, block.constant, indices, local).keys.some((key) => (key & 1) === 1);
  return {
    block: number,
    size,
    complex: complexConstant || keys.some((key) => (key & 1) === 1),
    indices: order.map((p) => indices[p]),
    rows: coefficientRows(
      renumbered.map(({ unknown, keys: used, values }) => ({
        unknown,
        coordinates: used.map((key) => coordinate[key]),
        values,
      })),
      keys.length,
    ),
    row: keys.map((key) => Math.floor((key >> 1) / size)),
    col: keys.map((key) => (key >> 1) % size),
    imaginary: Uint8Array.from(keys, (key) => key & 1),
    leading,
  };
}

/** The upper triangle of A restricted to the component. */
function upperEntries(unknown: number, a: SparseMatrix, indices: Int32Array, local: Int32Array): Row {
  const size = indices.length;
  const keys: number[] = [];
  const values: number[] = [];
  for (let p = 0; p < size; p++) {
    const i = indices[p];
    for (let e = a.rowStart[i]; e < a.rowStart[i + 1]; e++) {
      const q = local[a.colIndex[e]];
      if (q < p) continue;
      const key = 2 * (p * size + q);
      if (Math.abs(a.re[e]) > 0) {
        keys.push(key);
        values.push(a.re[e]);
      }
      if (q > p && Math.abs(a.im[e]) > 0) {
        keys.push(key + 1);
        values.push(a.im[e]);
      }
    }
  }
  return { unknown, keys: Int32Array.from(keys), values: Float64Array.from(values) };
}

/** Rows of the component in order of their last use, latest first. */
function orderIndices(rows: readonly Row[], size: number): { order: Int32Array; leading: Int32Array } {
  const lastUse = new Int32Array(size).fill(-1);
  rows.forEach(({ keys }, t) => {
    for (const key of keys) lastUse[Math.floor((key >> 1) / size)] = lastUse[(key >> 1) % size] = t;
  });
  const order = Int32Array.from({ length: size }, (_, p) => p).sort((a, b) => lastUse[b] - lastUse[a] || a - b);
  const leading = new Int32Array(rows.length);
  for (let t = rows.length - 1, k = 0; t >= 0; t--) {
    while (k < size && lastUse[order[k]] >= t) k++;
    leading[t] = k;
  }
  return { order, leading };
}

/** Keys in the new numbering, off-diagonal values times √2. */
function renumber({ unknown, keys, values }: Row, place: Int32Array, size: number): Row {
  const newKeys = new Int32Array(keys.length);
  const newValues = new Float64Array(keys.length);
  for (let e = 0; e < keys.length; e++) {
    const part = keys[e] & 1;
    const p = place[Math.floor((keys[e] >> 1) / size)];
    const q = place[(keys[e] >> 1) % size];
    newKeys[e] = 2 * (Math.min(p, q) * size + Math.max(p, q)) + part;
    // A transposed position holds the conjugate.
    newValues[e] = (p === q ? 1 : Math.SQRT2) * (part === 1 && p > q ? -values[e] : values[e]);
  }
  return { unknown, keys: newKeys, values: newValues };
}

/** All keys in order of their last use, latest first, then by position. */
function orderKeys(rows: readonly Row[], size: number): Int32Array {
  const lastUse = new Int32Array(2 * size * size).fill(-1);
  rows.forEach(({ keys }, t) => {
    for (const key of keys) lastUse[key] = t;
  });
  const used = Int32Array.from({ length: lastUse.length }, (_, key) => key).filter((key) => lastUse[key] >= 0);
  return used.sort((a, b) => lastUse[b] - lastUse[a] || a - b);
}
