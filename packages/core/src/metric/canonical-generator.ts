import { projectToAlgebra } from '../algebra/block-algebra.js';
import {
  type ComplexMatrix,
  addScaledInto,
  anticommutator,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  zeros,
} from '../linalg/complex-matrix.js';
import type { MetricModel } from './metric-model.js';

/** L(A) = Σ_j e^{−ω_j/2}(2V_j*AV_j − {V_j*V_j,A}), the canonical form of Carlen & Maas (2017), Theorem 3.1. */
export function canonicalGenerator(model: MetricModel, a: ComplexMatrix): ComplexMatrix {
  const out = zeros(a.rows);
  for (const { matrix: v, frequency } of model.jumps) {
    const w = Math.exp(-frequency / 2);
    addScaledInto(out, multiplyAdjointFirst(v, multiply(a, v)), 2 * w);
    addScaledInto(out, anticommutator(multiplyAdjointFirst(v, v), a), -w);
  }
  return projectToAlgebra(model.algebra, out);
}

/** L†(ρ) = Σ_j e^{−ω_j/2}(2V_jρV_j* − {V_j*V_j,ρ}). */
export function canonicalGeneratorAdjoint(model: MetricModel, rho: ComplexMatrix): ComplexMatrix {
  const out = zeros(rho.rows);
  for (const { matrix: v, frequency } of model.jumps) {
    const w = Math.exp(-frequency / 2);
    addScaledInto(out, multiply(v, multiplyAdjointSecond(rho, v)), 2 * w);
    addScaledInto(out, anticommutator(multiplyAdjointFirst(v, v), rho), -w);
  }
  return projectToAlgebra(model.algebra, out);
}
