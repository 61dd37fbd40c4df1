import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { SparseMatrix } from '../linalg/sparse-matrix.js';

/** One jump operator R_m, N×N, its rate folded in (units 1/√time). */
export interface Jump {
  readonly label?: string;
  readonly matrix: SparseMatrix;
}

/** The form a generator was given in, with what the rules for constants may use. */
export type Origin =
  | { readonly kind: 'lindblad' | 'balanced' | 'rates' | 'length' | 'schur' | 'davies' | 'superoperator' }
  /** L = rate (E − id) for a conditional expectation E, GNS-symmetric for the reference state; `tracial` when Tr E(A) = Tr A. */
  | { readonly kind: 'expectation'; readonly rate: number; readonly tracial: boolean }
  | { readonly kind: 'sum'; readonly terms: readonly { readonly weight: number; readonly generator: Generator }[] }
  | { readonly kind: 'tensor'; readonly factors: readonly Generator[] };

/**
 * A generator on observables (Heisenberg picture):
 * L(A) = i[H,A] + Σ_m (R_m* A R_m − ½{R_m*R_m, A}) + S(A), restricted to the algebra.
 */
export interface Generator {
  readonly algebra: BlockAlgebra;
  /** H, N×N Hermitian, or null for none. */
  readonly hamiltonian: SparseMatrix | null;
  readonly jumps: readonly Jump[];
  /** S as a real D×D row-major matrix in the orthonormal Hermitian basis, or null for none. */
  readonly superoperator: Float64Array | null;
  /** A state the document declares to be invariant; checked before use. */
  readonly declaredState: ComplexMatrix | null;
  readonly origin: Origin;
}
