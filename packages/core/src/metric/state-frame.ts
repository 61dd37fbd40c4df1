import { type ComplexMatrix, copy, zeros } from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import type { BlockAlgebra } from '../algebra/block-algebra.js';

/** A positive matrix through its eigenvalues and a block-diagonal unitary: ρ = U diag(λ) U*; U null stands for the identity. */
export interface StateFrame {
  readonly lambda: Float64Array;
  readonly u: ComplexMatrix | null;
}

/** Eigenvalues and block-diagonal eigenvectors of a Hermitian element; column k lies in the block of index k. */
export function blockEigen(algebra: BlockAlgebra, a: ComplexMatrix): { values: Float64Array; vectors: ComplexMatrix } {
  const n = algebra.size;
  if (algebra.blocks.length === 1) {
    const { values, vectors } = hermitianEigen(a);
    return { values: Float64Array.from(values), vectors: copy(vectors) };
  }
  const values = new Float64Array(n);
  const vectors = zeros(n);
  algebra.blocks.forEach((size, b) => {
    const start = algebra.offsets[b];
    const block = zeros(size);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        block.re[i * size + j] = a.re[(start + i) * n + start + j];
        block.im[i * size + j] = a.im[(start + i) * n + start + j];
      }
    }
    const eigen = hermitianEigen(block);
    values.set(eigen.values, start);
    for (let i = 0; i < size; i++) {
      for (let j = 0; j < size; j++) {
        vectors.re[(start + i) * n + start + j] = eigen.vectors.re[i * size + j];
        vectors.im[(start + i) * n + start + j] = eigen.vectors.im[i * size + j];
      }
    }
  });
  return { values, vectors };
}

/** The matrix U diag(values) U*. */
export function fromFrame({ lambda, u }: StateFrame): ComplexMatrix {
  const n = lambda.length;
  const out = zeros(n);
  if (!u) {
    for (let i = 0; i < n; i++) out.re[i * n + i] = lambda[i];
    return out;
  }
  for (let i = 0; i < n; i++) {
    for (let j = i; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const ar = u.re[i * n + k];
        const ai = u.im[i * n + k];
        const br = u.re[j * n + k];
        const bi = u.im[j * n + k];
        re += lambda[k] * (ar * br + ai * bi);
        im += lambda[k] * (ai * br - ar * bi);
      }
      out.re[i * n + j] = re;
      out.re[j * n + i] = re;
      out.im[i * n + j] = i === j ? 0 : im;
      out.im[j * n + i] = i === j ? 0 : -im;
    }
  }
  return out;
}
