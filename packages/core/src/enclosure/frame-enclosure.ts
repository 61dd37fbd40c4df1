import type { BlockAlgebra } from '../algebra/block-algebra.js';
import {
  type ComplexIntervalMatrix,
  adjointComplexMatrix,
  complexIntervalZeros,
  complexPointMatrix,
  entryAt,
  setEntry,
} from '../checker/arithmetic/interval-matrix.js';
import { multiplyTightly } from '../checker/arithmetic/interval-product.js';
import { mulComplex, scaleComplex } from '../checker/arithmetic/complex-interval.js';
import { point } from '../checker/arithmetic/interval.js';
import { unitaryFrame } from '../checker/arithmetic/unitary-frame.js';
import { widenCorners } from '../checker/arithmetic/widen-corners.js';
import { type ComplexMatrix, identity } from '../linalg/complex-matrix.js';

/** The unitary nearest to a block-diagonal u, null for the identity. */
export function encloseFrame(u: ComplexMatrix | null, { blocks, size }: BlockAlgebra): ComplexIntervalMatrix {
  if (!u) return complexPointMatrix(identity(size));
  return widenCorners(complexPointMatrix(u), identity(size), blocks, unitaryFrame(u).distance);
}

/** A ⊗ B. */
export function encloseKronecker(a: ComplexIntervalMatrix, b: ComplexIntervalMatrix): ComplexIntervalMatrix {
  const out = complexIntervalZeros(a.rows * b.rows, a.cols * b.cols);
  for (let i = 0; i < out.rows; i++) {
    for (let j = 0; j < out.cols; j++) {
      const left = entryAt(a, Math.floor(i / b.rows), Math.floor(j / b.cols));
      setEntry(out, i, j, mulComplex(left, entryAt(b, i % b.rows, j % b.cols)));
    }
  }
  return out;
}

/** U diag(λ) U*. */
export function encloseStateMatrix(u: ComplexIntervalMatrix, lambda: ArrayLike<number>): ComplexIntervalMatrix {
  const scaled = complexIntervalZeros(u.rows);
  for (let i = 0; i < u.rows; i++) {
    for (let a = 0; a < u.cols; a++) setEntry(scaled, i, a, scaleComplex(entryAt(u, i, a), point(lambda[a])));
  }
  return multiplyTightly(scaled, adjointComplexMatrix(u));
}
