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

/**
 * −Σ_i y_i A_{k,i} ⪰ 0 with b·y = 1: then no X with <A_i, X> = b_i is positive. A direction that misses the cone by a
 * defect up to 1e-8 (norms as in `gap`) is accepted; it excludes every X below the inverse of the defect in size.
 */
export interface PrimalInfeasibility {
  readonly kind: 'primal';
  readonly y: Float64Array;
  /** Smallest eigenvalue over the blocks of −Σ y_i A_{k,i}, divided by the norm of that matrix; −rounding counts as 0. */
  readonly margin: number;
}

/**
 * X_k ⪰ 0 with <A_i, X> = 0 and Σ <C_k, X_k> = −1: then no C − Σ y_i A_i is positive. Defects of the equations up to 1e-8
 * are accepted likewise, and exclude every y below the inverse of the defect in size.
 */
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
  /** Σ <C_k, X_k>; like b·y meaningless where a programme is infeasible. */
  readonly primalObjective: number;
  /** b·y. */
  readonly dualObjective: number;
  /**
   * max(|primal − dual|, <X, S>) / (|primal| + |dual| + ‖b̂‖‖C‖), where b̂_i = b_i/‖A_i‖, and a norm that vanishes counts
   * as 1: unchanged when b, C or an A_i with its b_i are multiplied by numbers.
   */
  readonly gap: number;
  /** ‖b̂ − (<A_i, X>/‖A_i‖)_i‖ / ‖b̂‖. */
  readonly primalInfeasibility: number;
  /** ‖C − S − Σ y_i A_i‖ / ‖C‖, Frobenius norms over all blocks; 0 once S has been computed from y. */
  readonly dualInfeasibility: number;
  readonly iterations: number;
  /** Unknowns whose coefficients depend linearly on those of earlier unknowns; they were kept at y_i = 0. */
  readonly dependent: readonly number[];
  readonly certificate: PrimalInfeasibility | DualInfeasibility | null;
}
