import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, hermiticityResidual, maxAbs, trace } from '../linalg/complex-matrix.js';
import { type StateFrame, fromFrame } from '../metric/state-frame.js';
import { INPUT_TOLERANCE } from '../tolerances.js';

/** A faithful state with the logarithms of its eigenvalues: exact where an eigenvalue itself would be lost in the matrix. */
export interface LogState extends StateFrame {
  readonly algebra: BlockAlgebra;
  /** log λ_a, length N; Σ e^logs = 1. May lie below the logarithm of the smallest double. */
  readonly logs: Float64Array;
  readonly lambda: Float64Array;
  /** Block-diagonal unitary; column a belongs to logs[a]. */
  readonly u: ComplexMatrix;
}

/** exp(H)/Tr exp(H) for Hermitian H in the algebra. */
export function exponentialState(algebra: BlockAlgebra, h: ComplexMatrix): LogState {
  const { values, vectors } = blockEigen(algebra, h);
  return stateOfLogs(algebra, values, vectors);
}

/** The state with eigenvectors u and eigenvalues proportional to e^logs. */
export function stateOfLogs(algebra: BlockAlgebra, logs: Float64Array, u: ComplexMatrix): LogState {
  let top = -Infinity;
  for (const p of logs) top = Math.max(top, p);
  let sum = 0;
  for (const p of logs) sum += Math.exp(p - top);
  const logSum = Math.log(sum);
  const normalised = logs.map((p) => p - top - logSum);
  return { algebra, logs: normalised, lambda: normalised.map(Math.exp), u };
}

/**
 * The log form of a density matrix in the algebra. Throws `not-hermitian`, and `state-not-positive` when the trace is not
 * one or an eigenvalue is not positive.
 */
export function logStateOf(algebra: BlockAlgebra, rho: ComplexMatrix): LogState {
  const { values, vectors } = densityEigen(algebra, rho);
  const smallest = Math.min(...values);
  if (!(smallest > 0)) {
    throw new ThalwegError(
      'state-not-positive',
      `expected a state whose eigenvalues are all positive, got smallest eigenvalue ${smallest}; mix in a little of the reference state`,
    );
  }
  return { algebra, logs: values.map(Math.log), lambda: values, u: vectors };
}

/** Eigenvalues and eigenvectors of a density matrix; eigenvalues may come out negative by rounding, never more. */
export function densityEigen(
  algebra: BlockAlgebra,
  rho: ComplexMatrix,
): { values: Float64Array; vectors: ComplexMatrix } {
  if (rho.rows !== algebra.size || rho.cols !== algebra.size) {
    const n = algebra.size;
    throw new ThalwegError('dimension-mismatch', `expected a ${n}×${n} state, got ${rho.rows}×${rho.cols}`);
  }
  const residual = hermiticityResidual(rho);
  if (!(residual <= INPUT_TOLERANCE * maxAbs(rho))) {
    throw new ThalwegError('not-hermitian', `expected a Hermitian state, got ‖ρ − ρ*‖ = ${residual}`);
  }
  const { re } = trace(rho);
  if (!(Math.abs(re - 1) <= INPUT_TOLERANCE)) {
    throw new ThalwegError('state-not-positive', `expected a state of trace one, got trace ${re}; divide by the trace`);
  }
  const eigen = blockEigen(algebra, rho);
  const smallest = Math.min(...eigen.values);
  if (smallest < -INPUT_TOLERANCE) {
    throw new ThalwegError('state-not-positive', `expected a positive state, got smallest eigenvalue ${smallest}`);
  }
  return eigen;
}

/** The density matrix of a log form. */
export function matrixOf(state: LogState): ComplexMatrix {
  return fromFrame(state);
}

/** U diag(logs) U*, the logarithm of the state. */
export function logarithmOf({ logs, u }: LogState): ComplexMatrix {
  return fromFrame({ lambda: logs, u });
}
