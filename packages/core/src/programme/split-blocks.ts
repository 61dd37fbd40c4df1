import { type SparseMatrix } from '../linalg/sparse-matrix.js';
import { type ProgrammeBlock } from './programme.js';

/** A set of rows of one block that no stored entry couples to the other rows. */
export interface Component {
  readonly block: number;
  /** Row indices of the block, ascending. */
  readonly indices: Int32Array;
}

/**
 * Splits a block by the joint sparsity pattern of its constant and coefficients: X and S are block-diagonal up to a
 * permutation. Rows without any entry are left out, their X and S being zero.
 */
export function splitBlock(block: ProgrammeBlock, index: number): Component[] {
  const { size } = block;
  const parent = Int32Array.from({ length: size }, (_, i) => i);
  const touched = new Uint8Array(size);
  join(block.constant, parent, touched);
  for (const { matrix } of block.coefficients) join(matrix, parent, touched);
  const members = new Map<number, number[]>();
  for (let i = 0; i < size; i++) {
    if (!touched[i]) continue;
    const root = find(parent, i);
    const list = members.get(root);
    if (list) list.push(i);
    else members.set(root, [i]);
  }
  return [...members.values()].map((indices) => ({ block: index, indices: Int32Array.from(indices) }));
}

function join(a: SparseMatrix, parent: Int32Array, touched: Uint8Array): void {
  for (let i = 0; i < a.rows; i++) {
    for (let p = a.rowStart[i]; p < a.rowStart[i + 1]; p++) {
      touched[i] = touched[a.colIndex[p]] = 1;
      const x = find(parent, i);
      const y = find(parent, a.colIndex[p]);
      if (x < y) parent[y] = x;
      else parent[x] = y;
    }
  }
}

function find(parent: Int32Array, i: number): number {
  while (parent[i] !== i) {
    parent[i] = parent[parent[i]];
    i = parent[i];
  }
  return i;
}
