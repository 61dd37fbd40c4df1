import { type ComplexMatrix } from '../linalg/complex-matrix.js';

/**
 * - `optimal`: gap and infeasibilities within the tolerance (or the accepted one: see `reduced`);
 * - `primal-infeasible`: no X exists; `certificate` holds a y along which b·y grows without leaving S ⪰ 0;
 * - `dual-infeasible`: no y satisfies S ⪰ 0; `certificate` holds the X that shows it;
 * - `stalled`: rounding or a missing interior stopped the progress short of the accepted tolerance;
 * - `stopped`: `stop` asked for it;  `iterations`: the limit was reached.
 */
export type ProgrammeStatus =
  'optimal' | 'primal-infeasible' | 'dual-infeasible' | 'stalled' | 'stopped' | 'iterations';

/** −Σ_i y_i A_{k,i} ⪰ 0 with b·y = 1: then no X with <A_i, X> = b_i is positive. */
export interface PrimalInfeasibility {
  readonly kind: 'primal';
  readonly y: Float64Array;
  /** Smallest eigenvalue over the blocks of −Σ y_i A_{k,i}, divided by the norm of that matrix; −rounding counts as 0. */
  readonly margin: number;
}

/** X_k ⪰ 0 with <A_i, X> = 0 and Σ <C_k, X_k> = −1: then no C − Σ y_i A_i is positive. */
export interface DualInfeasibility {
  readonly kind: 'dual';
  readonly x: readonly ComplexMatrix[];
  /** Largest |<A_i, X>| / ‖A_i‖, relative to ‖X‖. */
  readonly residual: number;
}

export interface ProgrammeSolution {
  readonly status: ProgrammeStatus;
  /** True when `optimal` means the accepted tolerance and not the one aimed at. */
  readonly reduced: boolean;
  readonly y: Float64Array;
  /** Positive semidefinite, one n × n matrix per block (diagonal blocks as diagonal matrices). */
  readonly x: readonly ComplexMatrix[];
  readonly s: readonly ComplexMatrix[];
  /** Σ <C_k, X_k>. */
  readonly primalObjective: number;
  /** b·y. */
  readonly dualObjective: number;
  /**
   * max(|primal − dual|, <X, S>) / (|primal| + |dual| + ‖b̂‖‖C‖), where b̂_i = b_i/‖A_i‖; norms of zero vectors count as 1.
   */
  readonly gap: number;
  /** ‖(<A_i, X> − b_i)/‖A_i‖‖ / ‖b̂‖ (1 + the larger of 1 and…): see `conic-form.ts`. */
  readonly primalInfeasibility: number;
  /** ‖C − S − Σ y_i A_i‖ / ‖C‖. */
  readonly dualInfeasibility: number;
  readonly iterations: number;
  /** Unknowns whose coefficients depend linearly on those of earlier unknowns; they were kept at y_i = 0. */
  readonly dependent: readonly number[];
  readonly certificate: PrimalInfeasibility | DualInfeasibility | null;
}
