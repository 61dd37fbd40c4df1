import { type BlockAlgebra, offBlockResidual } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, hermitianPart, trace } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import type { Generator } from './generator.js';
import { type MatrixInput, requireHermitian, squareDense } from './matrix-input.js';

/** The same generator with a declared invariant state, which is checked to be a state; invariance is checked where it is used. */
export function withDeclaredState(g: Generator, state: MatrixInput, pointer = '/state'): Generator {
  return { ...g, declaredState: densityMatrix(g.algebra, state, pointer) };
}

/** A density matrix of the algebra; throws `state-not-positive`, `not-hermitian` or `dimension-mismatch` when it is none. */
export function densityMatrix(algebra: BlockAlgebra, state: MatrixInput, pointer = '/state'): ComplexMatrix {
  const dense = squareDense(state, algebra.size, pointer);
  requireHermitian(dense, pointer, 'a state');
  const off = offBlockResidual(algebra, dense);
  if (off > INPUT_TOLERANCE) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected a state inside the blocks [${algebra.blocks.join(', ')}], got an entry of modulus ${off.toPrecision(3)} outside them`,
      { pointer, details: { residual: off } },
    );
  }
  const sigma = hermitianPart(dense);
  const total = trace(sigma).re;
  if (Math.abs(total - 1) > INPUT_TOLERANCE) {
    throw new ThalwegError('state-not-positive', `expected a state of trace 1, got ${total}; divide it by its trace`, {
      pointer,
      details: { trace: total },
    });
  }
  const smallest = hermitianEigenvalues(sigma)[0];
  if (smallest < -INPUT_TOLERANCE) {
    throw new ThalwegError(
      'state-not-positive',
      `expected a positive state, got the eigenvalue ${smallest}; a density matrix has none below 0`,
      {
        pointer,
        details: { smallestEigenvalue: smallest },
      },
    );
  }
  return sigma;
}
