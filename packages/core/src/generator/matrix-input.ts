import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, frobeniusNorm, hermiticityResidual, isFiniteMatrix } from '../linalg/complex-matrix.js';
import { type SparseMatrix, denseFromSparse, sparseFromDense } from '../linalg/sparse-matrix.js';
import { INPUT_TOLERANCE } from '../tolerances.js';

/** A matrix as a constructor takes it. */
export type MatrixInput = ComplexMatrix | SparseMatrix;

/** The matrix in compressed rows, after checking that it is N×N and finite; `pointer` names its place in the document. */
export function squareSparse(a: MatrixInput, n: number, pointer: string): SparseMatrix {
  const sparse = isSparse(a) ? a : sparseFromDense(a);
  requireShape(a, n, pointer);
  if (![sparse.re, sparse.im].every((part) => part.every(Number.isFinite))) throw notFinite(pointer);
  return sparse;
}

/** The matrix stored densely, after checking that it is N×N and finite. */
export function squareDense(a: MatrixInput, n: number, pointer: string): ComplexMatrix {
  requireShape(a, n, pointer);
  const dense = isSparse(a) ? denseFromSparse(a) : a;
  if (!isFiniteMatrix(dense)) throw notFinite(pointer);
  return dense;
}

/** Throws `not-hermitian` unless ‖A−A*‖ is within tolerance of ‖A‖. */
export function requireHermitian(a: ComplexMatrix, pointer: string, what: string): void {
  const residual = hermiticityResidual(a);
  if (residual <= INPUT_TOLERANCE * frobeniusNorm(a)) return;
  throw new ThalwegError(
    'not-hermitian',
    `expected ${what} to be Hermitian, got ‖A−A*‖ = ${residual.toPrecision(3)}; check the signs of the imaginary parts`,
    { pointer, details: { residual } },
  );
}

/** Throws `not-finite` for NaN or ±∞. */
export function requireFiniteNumber(x: number, pointer: string, what: string): void {
  if (Number.isFinite(x)) return;
  throw new ThalwegError('not-finite', `expected ${what} to be a finite number, got ${x}`, { pointer });
}

/** Throws `negative-rate` for a negative number, `not-finite` for NaN or ±∞. */
export function requireRate(x: number, pointer: string, what: string): void {
  requireFiniteNumber(x, pointer, what);
  if (x >= 0) return;
  throw new ThalwegError('negative-rate', `expected ${what} to be at least 0, got ${x}; change its sign or remove it`, {
    pointer,
    details: { value: x },
  });
}

/** Throws `dimension-mismatch` unless the algebra holds N×N matrices. */
export function requireSize(algebra: BlockAlgebra, n: number, what: string): void {
  if (algebra.size === n) return;
  throw new ThalwegError(
    'dimension-mismatch',
    `expected an algebra of ${n}×${n} matrices for ${what}, got blocks [${algebra.blocks.join(', ')}]; correct "algebra"`,
    { pointer: '/algebra' },
  );
}

function isSparse(a: MatrixInput): a is SparseMatrix {
  return 'rowStart' in a;
}

function requireShape(a: MatrixInput, n: number, pointer: string): void {
  if (a.rows === n && a.cols === n) return;
  throw new ThalwegError(
    'dimension-mismatch',
    `expected a ${n}×${n} matrix, got ${a.rows}×${a.cols}; correct it or "algebra"`,
    {
      pointer,
      details: { expected: [n, n], got: [a.rows, a.cols] },
    },
  );
}

function notFinite(pointer: string): ThalwegError {
  return new ThalwegError('not-finite', 'expected finite matrix entries, got NaN or an infinity; correct them', {
    pointer,
  });
}
