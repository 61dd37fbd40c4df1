import { blockAlgebra } from '../algebra/block-algebra.js';
import { type ComplexMatrix, multiplyAdjointFirst } from '../linalg/complex-matrix.js';
import { SUPPORT_TOLERANCE } from '../tolerances.js';
import { type LogState, densityEigen } from './log-state.js';
import { entropyTerm } from './log-terms.js';

/**
 * D(ρ‖σ) = Tr ρ(log ρ − log σ) of two N×N density matrices, in nats, as a sum of non-negative terms
 * Σ |<a|b>|² (λ log(λ/μ) − λ + μ): its relative error stays near 2⁻⁵²/√D when ρ approaches σ. Eigenvalues within N·2⁻⁵²
 * of zero count as zero, and the result is +∞ when ρ has weight outside the support of σ. Throws `not-hermitian`,
 * `state-not-positive`, `dimension-mismatch`.
 */
export function relativeEntropy(rho: ComplexMatrix, sigma: ComplexMatrix): number {
  const algebra = blockAlgebra([rho.rows]);
  const [first, second] = [rho, sigma].map((state) => {
    const { values, vectors } = densityEigen(algebra, state);
    const floor = SUPPORT_TOLERANCE * algebra.size;
    return { logs: values.map((x) => (x > floor ? Math.log(x) : -Infinity)), u: vectors };
  });
  return entropyOfLogs(first, second);
}

/** von Neumann entropy −Tr ρ log ρ of a density matrix, in nats; 0 log 0 = 0. Throws as `relativeEntropy`. */
export function vonNeumannEntropy(rho: ComplexMatrix): number {
  const { values } = densityEigen(blockAlgebra([rho.rows]), rho);
  let sum = 0;
  for (const x of values) if (x > 0) sum -= x * Math.log(x);
  return sum;
}

/** D(ρ‖τ) of two states of one algebra in log form. */
export function relativeEntropyOfStates(rho: LogState, tau: LogState): number {
  return entropyOfLogs(rho, tau);
}

interface Logs {
  readonly logs: Float64Array;
  readonly u: ComplexMatrix;
}

function entropyOfLogs(rho: Logs, tau: Logs): number {
  const n = rho.logs.length;
  const { re, im } = multiplyAdjointFirst(rho.u, tau.u);
  let sum = 0;
  for (let b = 0; b < n; b++) {
    let outside = 0;
    for (let a = 0; a < n; a++) {
      const weight = re[a * n + b] ** 2 + im[a * n + b] ** 2;
      const p = rho.logs[a];
      const q = tau.logs[b];
      if (q === -Infinity) outside += weight * Math.exp(p);
      else if (p === -Infinity) sum += weight * Math.exp(q);
      else sum += weight * entropyTerm(p, q);
    }
    if (outside > SUPPORT_TOLERANCE * n) return Infinity;
  }
  return sum;
}
