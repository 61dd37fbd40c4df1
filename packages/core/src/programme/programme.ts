import { type SparseMatrix } from '../linalg/sparse-matrix.js';

/** One coefficient A_{k,i} of a block: the matrix that unknown i multiplies. Unknowns that are absent have coefficient 0. */
export interface Coefficient {
  /** Index i into `objective`, 0-based, at most once in a block. */
  readonly unknown: number;
  /** size × size, Hermitian; both triangles stored. */
  readonly matrix: SparseMatrix;
}

/** One constraint S_k = C_k − Σ_i y_i A_{k,i} ⪰ 0. */
export interface ProgrammeBlock {
  /** `hermitian`: complex; `symmetric`: all entries real; `diagonal`: diagonal and real, so that S_k ⪰ 0 are inequalities. */
  readonly kind: 'hermitian' | 'symmetric' | 'diagonal';
  readonly size: number;
  /** C_k, size × size. */
  readonly constant: SparseMatrix;
  readonly coefficients: readonly Coefficient[];
}

/**
 * The pair of semidefinite programmes
 *
 *     dual    maximise b·y      subject to  S_k = C_k − Σ_i y_i A_{k,i} ⪰ 0 for every block k,
 *     primal  minimise Σ_k <C_k, X_k>  subject to  Σ_k <A_{k,i}, X_k> = b_i for every i,  X_k ⪰ 0,
 *
 * with real unknowns y (any sign) and <A, B> = Re Tr A* B. Weak duality: the primal value is never below the dual one.
 */
export interface Programme {
  /** b, of length m. */
  readonly objective: ArrayLike<number>;
  readonly blocks: readonly ProgrammeBlock[];
}
