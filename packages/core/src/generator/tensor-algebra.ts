import { type BlockAlgebra, blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, kronecker, zeros } from '../linalg/complex-matrix.js';
import { type SparseMatrix, type Triplet, sparseFromTriplets } from '../linalg/sparse-matrix.js';

/** Largest side N of the matrices of a tensor product; states are stored densely, 16 MiB at this side. */
export const MAX_TENSOR_SIZE = 1024;

/** M_1 ⊗ … ⊗ M_F with its blocks contiguous: block (b_1,…,b_F) in lexicographic order, and so inside each block. */
export interface TensorAlgebra {
  readonly algebra: BlockAlgebra;
  readonly factors: readonly BlockAlgebra[];
  /** position[κ] is the index here of the index κ = (i_1,…,i_F) of the plain Kronecker product. */
  readonly position: Int32Array;
}

/** The product of the algebras; throws `too-large` above MAX_TENSOR_SIZE. */
export function tensorAlgebra(factors: readonly BlockAlgebra[]): TensorAlgebra {
  const size = factors.reduce((n, f) => n * f.size, 1);
  if (size > MAX_TENSOR_SIZE) {
    throw new ThalwegError(
      'too-large',
      `expected a tensor product of size at most ${MAX_TENSOR_SIZE}, got ${size}; leave factors out`,
      {
        pointer: '/generator/factors',
        details: { limit: MAX_TENSOR_SIZE, size },
      },
    );
  }
  const blocks = factors.reduce<number[]>((list, f) => list.flatMap((n) => f.blocks.map((m) => n * m)), [1]);
  const order = Array.from({ length: size }, (_, k) => k);
  const key = Int32Array.from(order, (k) => blockIndex(factors, k));
  order.sort((a, b) => key[a] - key[b] || a - b);
  const position = new Int32Array(size);
  order.forEach((kappa, at) => (position[kappa] = at));
  return { algebra: blockAlgebra(blocks), factors, position };
}

/** 1 ⊗ … ⊗ A ⊗ … ⊗ 1 with A in factor f. */
export function embedSparse(tensor: TensorAlgebra, f: number, a: SparseMatrix): SparseMatrix {
  const { factors, position, algebra } = tensor;
  const after = factors.slice(f + 1).reduce((n, x) => n * x.size, 1);
  const before = factors.slice(0, f).reduce((n, x) => n * x.size, 1);
  const triplets: Triplet[] = [];
  for (let left = 0; left < before; left++) {
    for (let i = 0; i < a.rows; i++) {
      for (let s = a.rowStart[i]; s < a.rowStart[i + 1]; s++) {
        const row = (left * a.rows + i) * after;
        const col = (left * a.rows + a.colIndex[s]) * after;
        for (let right = 0; right < after; right++) {
          triplets.push([position[row + right], position[col + right], a.re[s], a.im[s]]);
        }
      }
    }
  }
  return sparseFromTriplets(algebra.size, algebra.size, triplets);
}

/** A_1 ⊗ … ⊗ A_F for elements of the factors. */
export function tensorElement(tensor: TensorAlgebra, elements: readonly ComplexMatrix[]): ComplexMatrix {
  const { position } = tensor;
  const plain = elements.reduce((a, b) => kronecker(a, b));
  const n = plain.rows;
  const out = zeros(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const to = position[i] * n + position[j];
      out.re[to] = plain.re[i * n + j];
      out.im[to] = plain.im[i * n + j];
    }
  }
  return out;
}

/** Number of the block (b_1,…,b_F) that holds a Kronecker index. */
function blockIndex(factors: readonly BlockAlgebra[], kappa: number): number {
  let rest = kappa;
  let weight = 1;
  let index = 0;
  for (let f = factors.length - 1; f >= 0; f--) {
    index += weight * factors[f].blockOf[rest % factors[f].size];
    weight *= factors[f].blocks.length;
    rest = Math.floor(rest / factors[f].size);
  }
  return index;
}
