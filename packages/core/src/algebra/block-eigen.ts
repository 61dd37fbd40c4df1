import { type ComplexMatrix, identity, zeros } from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import type { BlockAlgebra } from './block-algebra.js';

export interface BlockEigen {
  /** values[k] belongs to column k; ascending inside each block, unless A is exactly diagonal. */
  readonly values: Float64Array;
  /** Unitary, block-diagonal; the exact identity when A is exactly diagonal. */
  readonly vectors: ComplexMatrix;
  /** True when A is exactly diagonal, so that the values carry no error at all. */
  readonly exact: boolean;
}

/** Eigenvalues and eigenvectors of a Hermitian element, block by block, so that column k lies in block blockOf[k]. */
export function blockEigen(algebra: BlockAlgebra, a: ComplexMatrix): BlockEigen {
  const n = algebra.size;
  const values = Float64Array.from({ length: n }, (_, i) => a.re[i * n + i]);
  if (isDiagonal(a)) return { values, vectors: identity(n), exact: true };
  if (algebra.blocks.length === 1) return { ...hermitianEigen(a), exact: false };
  const vectors = zeros(n);
  algebra.blocks.forEach((size, b) => {
    const start = algebra.offsets[b];
    const block = submatrix(a, start, size);
    const eigen = isDiagonal(block)
      ? { values: values.slice(start, start + size), vectors: identity(size) }
      : hermitianEigen(block);
    values.set(eigen.values, start);
    for (let i = 0; i < size; i++) {
      const from = i * size;
      const to = (start + i) * n + start;
      vectors.re.set(eigen.vectors.re.subarray(from, from + size), to);
      vectors.im.set(eigen.vectors.im.subarray(from, from + size), to);
    }
  });
  return { values, vectors, exact: false };
}

function isDiagonal(a: ComplexMatrix): boolean {
  const { rows: n, re, im } = a;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) if (i !== j && (re[i * n + j] !== 0 || im[i * n + j] !== 0)) return false;
  }
  return true;
}

function submatrix(a: ComplexMatrix, start: number, size: number): ComplexMatrix {
  const out = zeros(size);
  for (let i = 0; i < size; i++) {
    const from = (start + i) * a.cols + start;
    out.re.set(a.re.subarray(from, from + size), i * size);
    out.im.set(a.im.subarray(from, from + size), i * size);
  }
  return out;
}
