import { requireList, requireWhole } from '../require.js';
import { partsOf, type Scalar } from './complex.js';
import { pauliEntries } from './pauli-entries.js';

/** [row, column, re, im], 0-based. */
export type Entry = readonly [number, number, number, number];

/** A matrix as a model document holds it: the non-zero entries, row by row. Every function of the kit returns this form. */
export interface Matrix {
  readonly shape: readonly [number, number];
  readonly entries: readonly Entry[];
}

/** A matrix in any form of a model document but a file; rows may hold complex numbers {re, im} as well. */
export type MatrixLike =
  | Matrix
  | readonly (readonly Scalar[])[]
  | { readonly re: readonly (readonly number[])[]; readonly im: readonly (readonly number[])[] }
  | { readonly pauli: string | Readonly<Record<string, number>> };

/** Rows or columns of a matrix at most, the limit of model documents. */
export const SIDE_LIMIT = 4096;

/** The matrix of rows, of {re, im}, of a Pauli string or of entries. Throws for rows of different lengths and for what is no number. */
export function matrix(a: MatrixLike): Matrix {
  if (typeof a !== 'object' || a === null) throw new TypeError(`expected a matrix, got ${String(a)}`);
  if ('shape' in a) return fromTriplets(a.shape[0], a.shape[1], a.entries);
  if ('pauli' in a) return fromPauli(a.pauli);
  if ('re' in a) return fromParts(a.re, a.im);
  requireList(a, 'a matrix');
  return fromRows(a, (z) => partsOf(z as Scalar));
}

/** Sums entries of the same place, drops zeros and sorts row by row. */
export function fromTriplets(rows: number, columns: number, triplets: readonly Entry[]): Matrix {
  requireWhole(rows, 1, SIDE_LIMIT, 'the number of rows');
  requireWhole(columns, 1, SIDE_LIMIT, 'the number of columns');
  const sums = new Map<number, [number, number]>();
  for (const [i, j, re, im] of triplets) {
    requireWhole(i, 0, rows - 1, 'a row');
    requireWhole(j, 0, columns - 1, 'a column');
    if (!Number.isFinite(re) || !Number.isFinite(im)) {
      throw new RangeError(`expected finite entries, got ${re} + ${im}i in row ${i}, column ${j}`);
    }
    const place = i * columns + j;
    const sum = sums.get(place);
    if (sum === undefined) sums.set(place, [re, im]);
    else {
      sum[0] += re;
      sum[1] += im;
    }
  }
  const places = Array.from(sums.keys()).sort((p, q) => p - q);
  const entries: Entry[] = [];
  for (const place of places) {
    const [re, im] = sums.get(place) as [number, number];
    if (Math.abs(re) + Math.abs(im) > 0) entries.push([Math.floor(place / columns), place % columns, re + 0, im + 0]);
  }
  return { shape: [rows, columns], entries };
}

function fromRows<T>(rows: readonly (readonly T[])[], read: (value: T) => { re: number; im: number }): Matrix {
  const columns = rows[0]?.length ?? 0;
  const triplets: Entry[] = [];
  rows.forEach((row, i) => {
    requireList(row, `row ${i}`);
    if (row.length !== columns) throw new RangeError(`expected ${columns} entries in row ${i}, got ${row.length}`);
    row.forEach((value, j) => {
      const { re, im } = read(value as T);
      if (Math.abs(re) + Math.abs(im) > 0) triplets.push([i, j, re, im]);
    });
  });
  return fromTriplets(rows.length, columns, triplets);
}

function fromParts(re: readonly (readonly number[])[], im: readonly (readonly number[])[]): Matrix {
  const parts = re.map((row, i) => row.map((x, j) => ({ re: x, im: im[i]?.[j] ?? NaN })));
  return fromRows(parts, (z) => partsOf(z));
}

function fromPauli(pauli: string | Readonly<Record<string, number>>): Matrix {
  const terms = typeof pauli === 'string' ? { [pauli]: 1 } : pauli;
  const strings = Object.keys(terms);
  const n = 2 ** (strings[0]?.length ?? 0);
  const triplets = strings.flatMap((string) => {
    if (2 ** string.length !== n) throw new RangeError(`expected Pauli strings of one length, got "${string}"`);
    return pauliEntries(string).map(([i, j, re, im]): Entry => [i, j, re * terms[string], im * terms[string]]);
  });
  return fromTriplets(n, n, triplets);
}
