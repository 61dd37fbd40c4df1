import { type CholeskyProof, choleskyErrorFactor, choleskyProof } from './cholesky-bound.js';
import type { ComplexIntervalMatrix } from './interval-matrix.js';
import { INVERSE_ITERATIONS, SHIFT_ATTEMPTS, SHIFT_SLACK } from './limits.js';
import { addUp, mulUp, subDown } from './rounding.js';
import { symmetricCentre, unscaledDown } from './symmetric-centre.js';
import { type SymmetricEmbedding, symmetricEmbedding } from './symmetric-embedding.js';

/**
 * A rigorous lower bound of the smallest eigenvalue of every Hermitian matrix in A, close to the best one: a shift just below
 * it is found by inverse iteration and bisection, then proved (cholesky-bound.ts). ∞ for an empty matrix, −∞ when A is
 * unbounded. Throws `not-hermitian`, `dimension-mismatch`.
 */
export function smallestEigenvalueBound(a: ComplexIntervalMatrix): number {
  return embeddedEigenvalueBound(symmetricEmbedding(a));
}

/** True only if every Hermitian matrix in A is proved positive definite, by a single factorisation. */
export function isPositiveDefinite(a: ComplexIntervalMatrix): boolean {
  const centre = symmetricCentre(symmetricEmbedding(a));
  if (!centre) return false;
  const { mid, n, radius } = centre;
  let trace = 0;
  for (let i = 0; i < n; i++) trace = addUp(trace, Math.abs(mid[i * n + i]));
  const shift = mulUp(1 + 2 ** -20, addUp(radius, mulUp(choleskyErrorFactor(n), trace)));
  const proof = n === 0 ? { bound: Infinity } : choleskyProof(mid, n, shift);
  return proof !== null && subDown(proof.bound, radius) > 0;
}

/** The same bound for a matrix that is embedded already. */
export function embeddedEigenvalueBound(a: SymmetricEmbedding): number {
  if (a.matrix.rows === 0) return Infinity;
  const centre = symmetricCentre(a);
  if (!centre) return -Infinity;
  const { mid, n, radius, scale } = centre;
  return unscaledDown(subDown(searchShift(mid, n), radius), scale);
}

/** Lower bound of λ_min(mid): bisection between a proved shift and an upper estimate, helped by Rayleigh quotients. */
function searchShift(mid: Float64Array, n: number): number {
  let best = gershgorinBound(mid, n);
  let high = Infinity;
  let trace = 0;
  for (let i = 0; i < n; i++) {
    high = Math.min(high, mid[i * n + i]);
    trace += Math.abs(mid[i * n + i]) + Math.abs(best);
  }
  const slack = SHIFT_SLACK * choleskyErrorFactor(n) * trace;
  let low = best;
  let shift = best - slack;
  const vector = startVector(n);
  for (let attempt = 0; attempt < SHIFT_ATTEMPTS && high - low > slack; attempt++) {
    const proof = choleskyProof(mid, n, shift);
    let estimate = Infinity;
    if (proof) {
      best = Math.max(best, proof.bound);
      low = Math.max(low, shift);
      estimate = rayleighEstimate(proof, mid, n, vector);
      high = Math.min(high, estimate);
    } else {
      high = Math.min(high, shift);
    }
    // Just below a fresh estimate, else half way.
    shift = estimate === high && high - slack / 2 > low ? high - slack / 2 : (low + high) / 2;
  }
  return best;
}

/** min_i (a_ii − Σ_j |a_ij|), rounded down. */
function gershgorinBound(a: Float64Array, n: number): number {
  let bound = Infinity;
  for (let i = 0; i < n; i++) {
    let row = 0;
    for (let j = 0; j < n; j++) if (j !== i) row = addUp(row, Math.abs(a[i * n + j]));
    bound = Math.min(bound, subDown(a[i * n + i], row));
  }
  return bound;
}

/** Rayleigh quotient of A after inverse iterations with the factor of A − shift; the vector is improved in place. */
function rayleighEstimate({ factor }: CholeskyProof, a: Float64Array, n: number, x: Float64Array): number {
  for (let step = 0; step < INVERSE_ITERATIONS; step++) {
    for (let i = 0; i < n; i++) {
      let sum = x[i];
      for (let k = 0; k < i; k++) sum -= factor[i * n + k] * x[k];
      x[i] = sum / factor[i * n + i];
    }
    for (let i = n - 1; i >= 0; i--) {
      x[i] /= factor[i * n + i];
      for (let k = 0; k < i; k++) x[k] -= factor[i * n + k] * x[i];
    }
    const size = Math.sqrt(x.reduce((sum, y) => sum + y * y, 0));
    if (!(size > 0 && size < Infinity)) {
      x.set(startVector(n));
      return Infinity;
    }
    for (let i = 0; i < n; i++) x[i] /= size;
  }
  let quotient = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += a[i * n + j] * x[j];
    quotient += sum * x[i];
  }
  return quotient;
}

/** A fixed vector without structure: fractional parts of multiples of the golden ratio. */
function startVector(n: number): Float64Array {
  return Float64Array.from({ length: n }, (_, i) => (((i + 1) * 0.6180339887498949) % 1) - 0.4);
}
