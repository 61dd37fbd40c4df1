import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';

/** A direct sum of full matrix blocks, held block-diagonally in N×N matrices. */
export interface BlockAlgebra {
  /** Sizes n_1, …, n_r of the blocks. */
  readonly blocks: readonly number[];
  /** N = Σ n_b, the side of the matrices that hold an element. */
  readonly size: number;
  /** D = Σ n_b², the dimension of the algebra. */
  readonly dimension: number;
  /** First index of each block. */
  readonly offsets: readonly number[];
  /** Block of each index, length N. */
  readonly blockOf: Int32Array;
  /**
   * The orthonormal Hermitian basis (for Tr A*B), one entry a coordinate, with i=row[k], j=col[k]:
   * e_ii when i=j, (e_ij+e_ji)/√2 when i<j, and √−1·(e_ji−e_ij)/√2 when i>j.
   */
  readonly row: Int32Array;
  readonly col: Int32Array;
}

/** Make the algebra with blocks of the given sizes; refuses an empty list and sizes that are not positive integers. */
export function blockAlgebra(blocks: readonly number[]): BlockAlgebra {
  if (blocks.length === 0 || blocks.some((n) => !Number.isInteger(n) || n < 1)) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected block sizes that are positive whole numbers, got [${blocks.join(', ')}]; write for example [2] for a qubit or [1,1,1] for three points`,
      { pointer: '/algebra' },
    );
  }
  const offsets: number[] = [];
  let size = 0;
  let dimension = 0;
  for (const n of blocks) {
    offsets.push(size);
    size += n;
    dimension += n * n;
  }
  const blockOf = new Int32Array(size);
  const row = new Int32Array(dimension);
  const col = new Int32Array(dimension);
  let k = 0;
  blocks.forEach((n, b) => {
    const start = offsets[b];
    for (let i = start; i < start + n; i++) {
      blockOf[i] = b;
      row[k] = i;
      col[k++] = i;
      for (let j = i + 1; j < start + n; j++) {
        row[k] = i;
        col[k++] = j;
        row[k] = j;
        col[k++] = i;
      }
    }
  });
  return { blocks: [...blocks], size, dimension, offsets, blockOf, row, col };
}

/** True when every block has size one, so that the algebra is functions on N points. */
export function isCommutative(algebra: BlockAlgebra): boolean {
  return algebra.blocks.every((n) => n === 1);
}

/** True when two algebras have the same blocks in the same order. */
export function sameAlgebra(a: BlockAlgebra, b: BlockAlgebra): boolean {
  return a.blocks.length === b.blocks.length && a.blocks.every((n, k) => n === b.blocks[k]);
}

/** Real coordinates (length D) of the Hermitian part of A's blocks in the orthonormal Hermitian basis. */
export function toCoordinates(
  algebra: BlockAlgebra,
  a: ComplexMatrix,
  out: Float64Array = new Float64Array(algebra.dimension),
): Float64Array {
  const { row, col, size: n } = algebra;
  const { re, im } = a;
  for (let k = 0; k < out.length; k++) {
    const i = row[k];
    const j = col[k];
    if (i === j) out[k] = re[i * n + i];
    else if (i < j) out[k] = (re[i * n + j] + re[j * n + i]) * Math.SQRT1_2;
    else out[k] = (im[j * n + i] - im[i * n + j]) * Math.SQRT1_2;
  }
  return out;
}

/** The Hermitian element with the given real coordinates. */
export function fromCoordinates(
  algebra: BlockAlgebra,
  x: ArrayLike<number>,
  out: ComplexMatrix = zeros(algebra.size),
): ComplexMatrix {
  const { row, col, size: n, dimension } = algebra;
  const { re, im } = out;
  re.fill(0);
  im.fill(0);
  for (let k = 0; k < dimension; k++) {
    const i = row[k];
    const j = col[k];
    if (i === j) re[i * n + i] = x[k];
    else if (i < j) {
      re[i * n + j] = x[k] * Math.SQRT1_2;
      re[j * n + i] = x[k] * Math.SQRT1_2;
    } else {
      im[j * n + i] = x[k] * Math.SQRT1_2;
      im[i * n + j] = -x[k] * Math.SQRT1_2;
    }
  }
  return out;
}

/** The k-th element of the orthonormal Hermitian basis. */
export function basisElement(algebra: BlockAlgebra, k: number): ComplexMatrix {
  const x = new Float64Array(algebra.dimension);
  x[k] = 1;
  return fromCoordinates(algebra, x);
}

/** Drop the entries of A outside the blocks. */
export function projectToAlgebra(algebra: BlockAlgebra, a: ComplexMatrix): ComplexMatrix {
  const out = zeros(algebra.size);
  const { blockOf, size: n } = algebra;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      if (blockOf[i] !== blockOf[j]) continue;
      out.re[i * n + j] = a.re[i * n + j];
      out.im[i * n + j] = a.im[i * n + j];
    }
  }
  return out;
}

/** Largest absolute entry of A outside the blocks; zero when A belongs to the algebra. */
export function offBlockResidual(algebra: BlockAlgebra, a: ComplexMatrix): number {
  const { blockOf, size: n } = algebra;
  let worst = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      if (blockOf[i] !== blockOf[j]) worst = Math.max(worst, Math.hypot(a.re[i * n + j], a.im[i * n + j]));
    }
  }
  return worst;
}
