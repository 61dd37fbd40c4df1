import { type ComplexMatrix, addScaledInto, innerProduct, multiplyAdjointFirst } from '../linalg/complex-matrix.js';
import { sparseTimesDense } from '../linalg/sparse-matrix.js';
import type { Structure } from '../structure/structure.js';
import { type EntropyModel, entropyModel } from './entropy-model.js';
import { type LogState, logStateOf, logarithmOf, matrixOf } from './log-state.js';
import { productionTerm } from './log-terms.js';

/**
 * I(ρ) = −Tr L†ρ(log ρ − log σ) for a faithful state of M ⊗ M_k (L ⊗ id, σ ⊗ 1), a rate; by the metric form when the
 * generator has GNS symmetry. Throws `not-supported` without a faithful invariant state, `state-not-positive` when ρ is
 * not faithful.
 */
export function entropyProduction(structure: Structure, rho: ComplexMatrix, amplification = 1): number {
  const model = entropyModel(structure, amplification);
  return productionOf(model, logStateOf(model.algebra, rho));
}

/** I(ρ), by the metric form where there is one. */
export function productionOf(model: EntropyModel, rho: LogState): number {
  return model.jumps ? metricProduction(model, rho) : plainProduction(model, rho);
}

/**
 * I(ρ) = Σ_j Σ_ab |<a|V_j|b>|² (x − y)(log x − log y), x = e^{ω_j/2}λ_a, y = e^{−ω_j/2}λ_b: the square
 * ‖log ρ − log σ‖²_ρ written out with [V_j, log σ] = ω_j V_j. All terms are non-negative, so nothing cancels.
 */
export function metricProduction(model: EntropyModel, rho: LogState): number {
  const n = rho.logs.length;
  let sum = 0;
  for (const { matrix, frequency, weight } of model.jumps ?? []) {
    const { re, im } = multiplyAdjointFirst(rho.u, sparseTimesDense(matrix, rho.u));
    let part = 0;
    for (let a = 0; a < n; a++) {
      const p = rho.logs[a] + frequency / 2;
      for (let b = 0; b < n; b++) {
        const v = re[a * n + b] ** 2 + im[a * n + b] ** 2;
        if (v > 0) part += v * productionTerm(p, rho.logs[b] - frequency / 2);
      }
    }
    sum += weight * part;
  }
  return sum;
}

/** I(ρ) = −Tr ρ L(log ρ − log σ), as defined; absolute error about N·‖L‖·2⁻⁵². */
export function plainProduction(model: EntropyModel, rho: LogState): number {
  const potential = addScaledInto(logarithmOf(rho), model.logSigma, -1);
  return -innerProduct(matrixOf(rho), model.apply(potential)).re;
}
