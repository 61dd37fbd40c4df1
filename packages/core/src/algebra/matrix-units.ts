import type { BlockAlgebra } from './block-algebra.js';

/** The matrix units e_ab of an algebra, listed; D of them. */
export interface MatrixUnits {
  readonly size: number;
  readonly count: number;
  readonly row: Int32Array;
  readonly col: Int32Array;
  /** N×N table of list indices, −1 outside the blocks. */
  readonly index: Int32Array;
  /** Index of the adjoint unit. */
  readonly adjoint: Int32Array;
  readonly blockOf: Int32Array;
}

export function matrixUnits(algebra: BlockAlgebra): MatrixUnits {
  const { size: n, dimension: count, blockOf } = algebra;
  const row = new Int32Array(count);
  const col = new Int32Array(count);
  const index = new Int32Array(n * n).fill(-1);
  let p = 0;
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      if (blockOf[a] !== blockOf[b]) continue;
      row[p] = a;
      col[p] = b;
      index[a * n + b] = p++;
    }
  }
  const adjoint = new Int32Array(count);
  for (let k = 0; k < count; k++) adjoint[k] = index[col[k] * n + row[k]];
  return { size: n, count, row, col, index, adjoint, blockOf };
}
