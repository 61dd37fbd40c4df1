import { requireWhole } from '../require.js';
import { partsOf, type Complex, type Scalar } from './complex.js';
import { fromTriplets, matrix, SIDE_LIMIT, type Entry, type Matrix, type MatrixLike } from './matrix.js';

/** Identity of n × n matrices. */
export function identity(n: number): Matrix {
  requireWhole(n, 1, SIDE_LIMIT, 'the size');
  return diagonal(new Array<number>(n).fill(1));
}

/** The zero matrix, square when only one number is given. */
export function zero(rows: number, columns = rows): Matrix {
  return fromTriplets(rows, columns, []);
}

/** Diagonal matrix of these values. */
export function diagonal(values: readonly Scalar[]): Matrix {
  const triplets = values.map((value, i): Entry => {
    const { re, im } = partsOf(value);
    return [i, i, re, im];
  });
  return fromTriplets(values.length, values.length, triplets);
}

/** E_ij = |i><j| in n × n matrices, i and j from 0. */
export function matrixUnit(n: number, i: number, j: number): Matrix {
  return fromTriplets(n, n, [[i, j, 1, 0]]);
}

/** The entry in row i, column j. */
export function entry(a: MatrixLike, i: number, j: number): Complex {
  const found = matrix(a).entries.find(([row, column]) => row === i && column === j);
  return { re: found?.[2] ?? 0, im: found?.[3] ?? 0 };
}

/** The dense form {re, im} of a model document. */
export function parts(a: MatrixLike): { re: number[][]; im: number[][] } {
  const { shape, entries } = matrix(a);
  const empty = (): number[][] => Array.from({ length: shape[0] }, () => new Array<number>(shape[1]).fill(0));
  const [re, im] = [empty(), empty()];
  for (const [i, j, x, y] of entries) {
    re[i][j] = x;
    im[i][j] = y;
  }
  return { re, im };
}

/** The dense rows of a real matrix. Throws when an entry is not real. */
export function rows(a: MatrixLike): number[][] {
  const bad = matrix(a).entries.find(([, , , im]) => Math.abs(im) > 0);
  if (bad)
    throw new RangeError(`expected a real matrix, got the imaginary part ${bad[3]} in row ${bad[0]}, column ${bad[1]}`);
  return parts(a).re;
}
