import { choleskyComplex, solveLowerAdjoint, solveLowerComplex } from './cholesky-complex.js';
import { adjoint, hermitianPart, type ComplexMatrix } from './complex-matrix.js';
import { hermitianEigen, type HermitianEigen } from './hermitian-eigen.js';
import { requireSameShape } from './shape-checks.js';

/**
 * All solutions of A x = λ B x, A Hermitian (its Hermitian part is taken) and B Hermitian positive definite: values
 * ascending, columns of `vectors` with x* B x = 1. Throws `not-positive-definite`, `dimension-mismatch`, `not-finite`.
 */
export function hermitianPencil(a: ComplexMatrix, b: ComplexMatrix): HermitianEigen {
  requireSameShape(b, a);
  const l = choleskyComplex(b);
  const half = solveLowerComplex(l, hermitianPart(a));
  const { values, vectors } = hermitianEigen(solveLowerComplex(l, adjoint(half)));
  return { values, vectors: solveLowerAdjoint(l, vectors) };
}
