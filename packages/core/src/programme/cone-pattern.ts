import { type ProgrammeBlock } from './programme.js';
import { coefficientRows, type CoefficientRows, type RowEntries } from './coefficient-rows.js';
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

/** One real entry of a coefficient: position p ≤ q of the component, 0 or 1 for real or imaginary part. */
interface Entry {
  readonly p: number;
  readonly q: number;
  readonly part: number;
  readonly value: number;
}

interface Row {
  readonly unknown: number;
  readonly entries: Entry[];
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
    const entries = upperEntries(matrix, indices, local);
    if (entries.length > 0) rows.push({ unknown, entries });
  }
  rows.sort((a, b) => b.entries.length - a.entries.length || a.unknown - b.unknown);
  const { order, leading } = orderIndices(rows, size);
  const place = new Int32Array(size);
  order.forEach((p, k) => (place[p] = k));
  const numbered = numberCoordinates(rows, place, size);
  return {
    block: number,
    size,
    complex: numbered.complex || upperEntries(block.constant, indices, local).some((entry) => entry.part === 1),
    indices: Int32Array.from(order, (p) => indices[p]),
    rows: coefficientRows(numbered.rows, numbered.row.length),
    row: numbered.row,
    col: numbered.col,
    imaginary: numbered.imaginary,
    leading,
  };
}

/** The upper triangle of (A + A*)/2 restricted to the component. */
function upperEntries(a: SparseMatrix, indices: Int32Array, local: Int32Array): Entry[] {
  const entries: Entry[] = [];
  for (let p = 0; p < indices.length; p++) {
    const i = indices[p];
    for (let e = a.rowStart[i]; e < a.rowStart[i + 1]; e++) {
      const q = local[a.colIndex[e]];
      if (q < p) continue;
      if (Math.abs(a.re[e]) > 0) entries.push({ p, q, part: 0, value: a.re[e] });
      if (q > p && Math.abs(a.im[e]) > 0) entries.push({ p, q, part: 1, value: a.im[e] });
    }
  }
  return entries;
}

function orderIndices(rows: readonly Row[], size: number): { order: Int32Array; leading: Int32Array } {
  const lastUse = new Int32Array(size).fill(-1);
  rows.forEach(({ entries }, t) => entries.forEach(({ p, q }) => (lastUse[p] = lastUse[q] = t)));
  const order = Int32Array.from({ length: size }, (_, p) => p).sort((a, b) => lastUse[b] - lastUse[a] || a - b);
  const leading = new Int32Array(rows.length);
  for (let t = rows.length - 1, k = 0; t >= 0; t--) {
    while (k < size && lastUse[order[k]] >= t) k++;
    leading[t] = k;
  }
  return { order, leading };
}

interface Numbered {
  readonly rows: RowEntries[];
  readonly row: Int32Array;
  readonly col: Int32Array;
  readonly imaginary: Uint8Array;
  readonly complex: boolean;
}

/** Coordinates in order of their last use, latest first, then by position. */
function numberCoordinates(rows: readonly Row[], place: Int32Array, size: number): Numbered {
  const key = ({ p, q, part }: Entry): number =>
    2 * (Math.min(place[p], place[q]) * size + Math.max(place[p], place[q])) + part;
  const lastUse = new Map<number, number>();
  rows.forEach(({ entries }, t) => entries.forEach((entry) => lastUse.set(key(entry), t)));
  const keys = [...lastUse.keys()].sort((a, b) => lastUse.get(b)! - lastUse.get(a)! || a - b);
  const number = new Map(keys.map((k, c) => [k, c]));
  const scaled = (entry: Entry): number => {
    const value = entry.p === entry.q ? entry.value : Math.SQRT2 * entry.value;
    // A transposed position holds the conjugate.
    return entry.part === 1 && place[entry.p] > place[entry.q] ? -value : value;
  };
  return {
    rows: rows.map(({ unknown, entries }) => ({
      unknown,
      coordinates: entries.map((entry) => number.get(key(entry))!),
      values: entries.map(scaled),
    })),
    row: Int32Array.from(keys, (k) => Math.floor((k >> 1) / size)),
    col: Int32Array.from(keys, (k) => (k >> 1) % size),
    imaginary: Uint8Array.from(keys, (k) => k & 1),
    complex: keys.some((k) => (k & 1) === 1),
  };
}
