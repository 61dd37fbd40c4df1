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

/** The canonical form of Carlen & Maas (2017), Theorem 3.1, on N×N matrices of the algebra. */
export interface CanonicalGenerator {
  /** L(A) = Σ_j e^{−ω_j/2}(2V_j*AV_j − {V_j*V_j,A}). */
  readonly onObservables: (a: ComplexMatrix) => ComplexMatrix;
  /** L†(ρ) = Σ_j e^{−ω_j/2}(2V_jρV_j* − {V_j*V_j,ρ}). */
  readonly onStates: (rho: ComplexMatrix) => ComplexMatrix;
}

/** L and L† plainly from the jumps of a model, Σ_j e^{−ω_j/2}V_j*V_j summed once. */
export function canonicalGenerator({ jumps, algebra }: MetricModel): CanonicalGenerator {
  const weights = jumps.map(({ frequency }) => Math.exp(-frequency / 2));
  const squares = zeros(algebra.size);
  jumps.forEach(({ matrix: v }, j) => addScaledInto(squares, multiplyAdjointFirst(v, v), weights[j]));
  const sum = (a: ComplexMatrix, sandwich: (v: ComplexMatrix) => ComplexMatrix): ComplexMatrix => {
    const out = zeros(algebra.size);
    jumps.forEach(({ matrix }, j) => addScaledInto(out, sandwich(matrix), 2 * weights[j]));
    return projectToAlgebra(algebra, addScaledInto(out, anticommutator(squares, a), -1));
  };
  return {
    onObservables: (a) => sum(a, (v) => multiplyAdjointFirst(v, multiply(a, v))),
    onStates: (rho) => sum(rho, (v) => multiply(v, multiplyAdjointSecond(rho, v))),
  };
}
