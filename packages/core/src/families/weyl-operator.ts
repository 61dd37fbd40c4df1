import { type SparseMatrix, sparseFromTriplets } from '../linalg/sparse-matrix.js';

/** X^aZ^b on C^n with X e_j = e_{j+1}, Z e_j = e^{2πij/n} e_j. */
export function weylOperator(n: number, a: number, b: number): SparseMatrix {
  return sparseFromTriplets(
    n,
    n,
    Array.from({ length: n }, (_, j) => {
      const [re, im] = rootOfUnity(j * b, n);
      return [(((j + a) % n) + n) % n, j, re, im] as const;
    }),
  );
}

/** e^{2πik/n}, exact where the result is 0 or ±1. */
function rootOfUnity(k: number, n: number): [number, number] {
  const quarter = (4 * (((k % n) + n) % n)) / n;
  if (Number.isInteger(quarter)) return [[1, 0, -1, 0][quarter], [0, 1, 0, -1][quarter]];
  return [Math.cos((quarter * Math.PI) / 2), Math.sin((quarter * Math.PI) / 2)];
}
