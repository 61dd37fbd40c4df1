import { zeros, type ComplexMatrix } from '../linalg/complex-matrix.js';
import { denseFromSparse, type SparseMatrix } from '../linalg/sparse-matrix.js';
import { type Programme } from './programme.js';

/** S_k = C_k − Σ_i y_i A_{k,i} of every block, dense. */
export function programmeSlack({ blocks }: Programme, y: ArrayLike<number>): ComplexMatrix[] {
  return blocks.map(({ constant, coefficients }) => {
    const s = denseFromSparse(constant);
    for (const { unknown, matrix } of coefficients) addSparse(s, matrix, -y[unknown]);
    return s;
  });
}

/** −Σ_i y_i A_{k,i} of every block, dense. */
export function programmeDirection({ blocks }: Programme, y: ArrayLike<number>): ComplexMatrix[] {
  return blocks.map(({ size, coefficients }) => {
    const s = zeros(size);
    for (const { unknown, matrix } of coefficients) addSparse(s, matrix, -y[unknown]);
    return s;
  });
}

/** Re Tr A* X for sparse A and dense X. */
export function sparseInnerProduct(a: SparseMatrix, x: ComplexMatrix): number {
  let sum = 0;
  for (let i = 0; i < a.rows; i++) {
    for (let e = a.rowStart[i]; e < a.rowStart[i + 1]; e++) {
      const q = i * x.cols + a.colIndex[e];
      sum += a.re[e] * x.re[q] + a.im[e] * x.im[q];
    }
  }
  return sum;
}

function addSparse(target: ComplexMatrix, a: SparseMatrix, factor: number): void {
  for (let i = 0; i < a.rows; i++) {
    for (let e = a.rowStart[i]; e < a.rowStart[i + 1]; e++) {
      const q = i * target.cols + a.colIndex[e];
      target.re[q] += factor * a.re[e];
      target.im[q] += factor * a.im[e];
    }
  }
}
