import { partsOf, type Complex, type Scalar } from './complex.js';
import { fromTriplets, matrix, type Entry, type Matrix, type MatrixLike } from './matrix.js';

/** a + b + …; throws for different shapes. */
export function add(...terms: readonly MatrixLike[]): Matrix {
  const matrices = terms.map(matrix);
  if (matrices.length === 0) throw new TypeError('expected at least one matrix, got none');
  const [rows, columns] = matrices[0].shape;
  for (const { shape } of matrices) requireShape(shape, rows, columns);
  return fromTriplets(
    rows,
    columns,
    matrices.flatMap(({ entries }) => entries),
  );
}

/** a − b. */
export function subtract(a: MatrixLike, b: MatrixLike): Matrix {
  return add(a, scale(-1, b));
}

/** z a, z a number or {re, im}. */
export function scale(z: Scalar, a: MatrixLike): Matrix {
  const { re, im } = partsOf(z);
  const { shape, entries } = matrix(a);
  const scaled = entries.map(([i, j, x, y]): Entry => [i, j, re * x - im * y, re * y + im * x]);
  return fromTriplets(shape[0], shape[1], scaled);
}

/** The matrix product a b …, from left to right. */
export function multiply(...factors: readonly MatrixLike[]): Matrix {
  if (factors.length === 0) throw new TypeError('expected at least one matrix, got none');
  return factors.map(matrix).reduce(product);
}

/** Conjugate transpose a*. */
export function adjoint(a: MatrixLike): Matrix {
  const { shape, entries } = matrix(a);
  return fromTriplets(
    shape[1],
    shape[0],
    entries.map(([i, j, re, im]): Entry => [j, i, re, -im]),
  );
}

/** Transpose without conjugation. */
export function transpose(a: MatrixLike): Matrix {
  const { shape, entries } = matrix(a);
  return fromTriplets(
    shape[1],
    shape[0],
    entries.map(([i, j, re, im]): Entry => [j, i, re, im]),
  );
}

/** a b − b a. */
export function commutator(a: MatrixLike, b: MatrixLike): Matrix {
  return subtract(multiply(a, b), multiply(b, a));
}

/** a b + b a. */
export function anticommutator(a: MatrixLike, b: MatrixLike): Matrix {
  return add(multiply(a, b), multiply(b, a));
}

/** Sum of the diagonal entries. */
export function trace(a: MatrixLike): Complex {
  let re = 0;
  let im = 0;
  for (const [i, j, x, y] of matrix(a).entries) {
    if (i !== j) continue;
    re += x;
    im += y;
  }
  return { re, im };
}

function product(a: Matrix, b: Matrix): Matrix {
  if (a.shape[1] !== b.shape[0]) {
    throw new RangeError(`expected a matrix of ${a.shape[1]} rows as the right factor, got ${b.shape.join(' × ')}`);
  }
  const rowsOfB: Entry[][] = Array.from({ length: b.shape[0] }, () => []);
  for (const entry of b.entries) rowsOfB[entry[0]].push(entry);
  const triplets: Entry[] = [];
  for (const [i, k, x, y] of a.entries) {
    for (const [, j, u, v] of rowsOfB[k]) triplets.push([i, j, x * u - y * v, x * v + y * u]);
  }
  return fromTriplets(a.shape[0], b.shape[1], triplets);
}

function requireShape(shape: readonly [number, number], rows: number, columns: number): void {
  if (shape[0] === rows && shape[1] === columns) return;
  throw new RangeError(`expected a matrix of shape ${rows} × ${columns}, got ${shape.join(' × ')}`);
}
