import { ThalwegError } from '../errors.js';
import { EPSILON, SEMIDEFINITE_ROUNDING } from '../tolerances.js';
import { fromEntries, hermitianPart, multiplyAdjointSecond, type ComplexMatrix } from './complex-matrix.js';
import { hermitianEigen, type HermitianEigen } from './hermitian-eigen.js';

/** V f(λ) V* for a real function f on the spectrum. */
export function matrixFunction(eigen: HermitianEigen, f: (value: number) => number): ComplexMatrix {
  const { values, vectors } = eigen;
  const n = values.length;
  const image = values.map(f);
  const scaled = fromEntries(n, n, (i, j) => [vectors.re[i * n + j] * image[j], vectors.im[i * n + j] * image[j]]);
  return hermitianPart(multiplyAdjointSecond(scaled, vectors));
}

/** exp A of a Hermitian matrix. */
export function hermitianExp(a: ComplexMatrix): ComplexMatrix {
  return matrixFunction(hermitianEigen(a), Math.exp);
}

/** log A of a positive definite matrix; throws `not-positive-definite` if an eigenvalue is not positive. */
export function hermitianLog(a: ComplexMatrix): ComplexMatrix {
  return matrixFunction(positiveEigen(a), Math.log);
}

/** A^p of a positive definite matrix, p real; throws `not-positive-definite`. */
export function hermitianPower(a: ComplexMatrix, p: number): ComplexMatrix {
  return matrixFunction(positiveEigen(a), (x) => x ** p);
}

/**
 * The positive semidefinite square root. An eigenvalue that is negative by no more than the rounding of the
 * eigensolver counts as zero; below that it throws `not-positive-definite`.
 */
export function hermitianSqrt(a: ComplexMatrix): ComplexMatrix {
  const eigen = hermitianEigen(a);
  const { values } = eigen;
  const top = Math.max(0, ...values.map(Math.abs));
  requireAbove(values, -SEMIDEFINITE_ROUNDING * values.length * EPSILON * top);
  return matrixFunction(eigen, (x) => Math.sqrt(Math.max(0, x)));
}

function positiveEigen(a: ComplexMatrix): HermitianEigen {
  const eigen = hermitianEigen(a);
  requireAbove(eigen.values, Number.MIN_VALUE);
  return eigen;
}

function requireAbove(values: Float64Array, least: number): void {
  if (values.length === 0 || values[0] >= least) return;
  const details = { smallestEigenvalue: values[0] };
  throw new ThalwegError('not-positive-definite', `expected a positive matrix, got the eigenvalue ${values[0]}`, {
    details,
  });
}
