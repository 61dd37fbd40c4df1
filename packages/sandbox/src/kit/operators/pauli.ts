import { matrix, type Matrix } from '../matrix/matrix.js';

/** Tensor product of the Pauli matrices named by a string of I, X, Y, Z, first letter = first factor; `pauli('X')` is a 2 × 2 matrix. */
export function pauli(string: string): Matrix {
  return matrix({ pauli: string });
}
