/**
 * One factor of the cone, with its own scratch. `x`, `s`, `d` … are flat arrays over all cones; each cone reads and writes
 * its own section only. <·,·> is the plain inner product of sections.
 */
export interface Cone {
  /** Barrier parameter: the number of eigenvalues. */
  readonly degree: number;
  /** x ← value · 1. */
  setIdentity(x: Float64Array, value: number): void;
  /** out_i += factor <A_i, v> for all unknowns i; v Hermitian. */
  addValues(v: Float64Array, factor: number, out: Float64Array): void;
  /** out += factor Σ_i y_i A_i. */
  addAdjoint(y: Float64Array, factor: number, out: Float64Array): void;
  /** Whether v is positive definite. */
  isPositive(v: Float64Array): boolean;
  /** Prepares step lengths from x; false unless x is positive definite. */
  factorPrimal(x: Float64Array): boolean;
  /** The same for s, and inverse ← s⁻¹. */
  factorDual(s: Float64Array, inverse: Float64Array): boolean;
  /** Adds <A_i, x A_j s⁻¹> to one of the places (i, j), (j, i) of the m × m matrix. */
  addSchur(x: Float64Array, inverse: Float64Array, matrix: Float64Array, order: number): void;
  /** Adds to level_i the size from which on rounding in `addSchur` may hide the entry (i, i), in units of 2⁻⁵². */
  addRounding(x: Float64Array, inverse: Float64Array, level: Float64Array): void;
  /** out ← Hermitian part of (x d + e f) s⁻¹, the second product left out when `e` is null. */
  scaledProduct(
    x: Float64Array,
    d: Float64Array,
    e: Float64Array | null,
    f: Float64Array | null,
    inverse: Float64Array,
    out: Float64Array,
  ): void;
  /** A bound below the smallest eigenvalue of L⁻¹ d L⁻*, L the factor of x (or s): x + t d > 0 for t < 1/−bound. */
  primalBound(d: Float64Array): number;
  dualBound(d: Float64Array): number;
}
