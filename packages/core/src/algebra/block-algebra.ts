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

/** `factor` times the coordinates of a Hermitian element, from its entries on and above the diagonal, which are read row by row. */
export function upperToCoordinates(
  { blocks, offsets, size: n }: BlockAlgebra,
  { re, im }: ComplexMatrix,
  out: Float64Array,
  factor = 1,
): Float64Array {
  const pair = Math.SQRT2 * factor;
  for (let b = 0, k = 0; b < blocks.length; b++) {
    const end = offsets[b] + blocks[b];
    for (let i = offsets[b]; i < end; i++) {
      out[k++] = factor * re[i * n + i];
      for (let at = i * n + i + 1, last = i * n + end; at < last; at++, k += 2) {
        out[k] = pair * re[at];
        out[k + 1] = pair * im[at];
      }
    }
  }
  return out;
}

/** The Hermitian element with the given real coordinates. */
export function fromCoordinates(
  algebra: BlockAlgebra,
  x: ArrayLike<number>,
  out: ComplexMatrix = zeros(algebra.size),
): ComplexMatrix {
  const { blocks, offsets, size: n } = algebra;
  const { re, im } = out;
  if (blocks.length > 1) {
    re.fill(0);
    im.fill(0);
  }
  for (let b = 0, k = 0; b < blocks.length; b++) {
    const end = offsets[b] + blocks[b];
    for (let i = offsets[b]; i < end; i++) {
      re[i * n + i] = x[k++];
      im[i * n + i] = 0;
      for (let at = i * n + i + 1, last = i * n + end; at < last; at++, k += 2) {
        re[at] = x[k] * Math.SQRT1_2;
        im[at] = x[k + 1] * Math.SQRT1_2;
      }
    }
    mirrorBlock(out, offsets[b], end);
  }
  return out;
}

/** Fill one block's lower triangle from its upper one, a few rows at a time, so that what is written lies together. */
function mirrorBlock({ re, im, cols: n }: ComplexMatrix, start: number, end: number): void {
  for (let from = start; from < end; from += MIRROR_ROWS) {
    for (let j = from + 1; j < end; j++) {
      const to = Math.min(from + MIRROR_ROWS, j);
      for (let i = from, at = j * n + from; i < to; i++, at++) {
        re[at] = re[i * n + j];
        im[at] = -im[i * n + j];
      }
    }
  }
}

/** Eight doubles are a cache line. */
const MIRROR_ROWS = 16;

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
