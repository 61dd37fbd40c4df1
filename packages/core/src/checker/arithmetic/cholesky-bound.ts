import { CHOLESKY_INFLATION, CHOLESKY_SAFE_RANGE } from './limits.js';
import { addUp, divUp, mulUp, subDown } from './rounding.js';

/** A floating-point Cholesky factorisation that ran to its end, and what it proves. */
export interface CholeskyProof {
  /** Lower triangular factor, row-major n×n: L Lᵀ ≈ A − shift. */
  readonly factor: Float64Array;
  /** Lower bound of the smallest eigenvalue of A, rigorous. */
  readonly bound: number;
}

/**
 * Factorise A − shift (A real symmetric n×n, row-major, lower triangle read) in plain doubles. If no pivot fails, then
 * λ_min(A) ≥ shift − γ/(1−γ)·tr(A − shift), γ = γ_{n+1}: the backward error ΔA of a factorisation that ends obeys
 * |ΔA_ij| ≤ γ/(1−γ)·√(a_ii a_jj) (Demmel 1989; Higham 2002, Theorem 10.3; Rump, Acta Numerica 19 (2010), §10.8.1).
 * Null when a pivot is not positive, which proves nothing. Scale A so that its diagonal is within CHOLESKY_SAFE_RANGE.
 */
export function choleskyProof(a: Float64Array, n: number, shift: number): CholeskyProof | null {
  const factor = new Float64Array(n * n);
  let trace = 0;
  let largest = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      let sum = i === j ? subDown(a[i * n + i], shift) : a[i * n + j];
      if (i === j) {
        trace = addUp(trace, Math.abs(sum));
        largest = Math.max(largest, Math.abs(sum));
      }
      for (let k = 0, p = i * n, q = j * n; k < j; k++) sum -= factor[p++] * factor[q++];
      if (i !== j) factor[i * n + j] = sum / factor[j * n + j];
      else if (sum > 0 && sum < Infinity) factor[i * n + i] = Math.sqrt(sum);
      else return null;
    }
  }
  if (n > 0 && !(largest < CHOLESKY_SAFE_RANGE && largest > 1 / CHOLESKY_SAFE_RANGE)) return null;
  return { factor, bound: subDown(shift, mulUp(choleskyErrorFactor(n), trace)) };
}

/** γ/(1−γ), γ = γ_{n+1}, with an allowance for underflow. */
export function choleskyErrorFactor(n: number): number {
  const nu = (n + 1) * (Number.EPSILON / 2);
  // γ = nu/(1−nu), so that γ/(1−γ) = nu/(1−2nu).
  return mulUp(CHOLESKY_INFLATION, divUp(nu, 1 - 2 * nu));
}
