import { fromTriplets, matrix, type Entry, type Matrix, type MatrixLike } from './matrix.js';

/** Kronecker product a ⊗ b ⊗ …, first factor outermost. */
export function kron(...factors: readonly MatrixLike[]): Matrix {
  if (factors.length === 0) throw new TypeError('expected at least one matrix, got none');
  return factors.map(matrix).reduce((a, b) => {
    const [rows, columns] = b.shape;
    const triplets = a.entries.flatMap(([i, j, x, y]) =>
      b.entries.map(([k, l, u, v]): Entry => [i * rows + k, j * columns + l, x * u - y * v, x * v + y * u]),
    );
    return fromTriplets(a.shape[0] * rows, a.shape[1] * columns, triplets);
  });
}

/** Block-diagonal matrix a ⊕ b ⊕ …; the sizes of square summands are the `algebra` of a model on the direct sum. */
export function directSum(...summands: readonly MatrixLike[]): Matrix {
  let rows = 0;
  let columns = 0;
  const triplets: Entry[] = [];
  for (const summand of summands) {
    const { shape, entries } = matrix(summand);
    for (const [i, j, re, im] of entries) triplets.push([rows + i, columns + j, re, im]);
    rows += shape[0];
    columns += shape[1];
  }
  return fromTriplets(rows, columns, triplets);
}
