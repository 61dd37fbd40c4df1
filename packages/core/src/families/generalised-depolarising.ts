import { type BlockAlgebra, blockAlgebra, toCoordinates } from '../algebra/block-algebra.js';
import { densityMatrix } from '../generator/declared-state.js';
import type { Generator } from '../generator/generator.js';
import { type MatrixInput, requireRate } from '../generator/matrix-input.js';
import { requireDenseDimension } from '../generator/superoperator-parts.js';
import { identity } from '../linalg/complex-matrix.js';

/**
 * L(A) = rate (Tr(σA) 1 − A) on M_n, or on the given algebra, for a state σ; GNS-symmetric, σ is declared. Its modified
 * log-Sobolev constant is known (Müller-Hermes, Stilck França & Wolf, J. Math. Phys. 57 (2016)).
 * Throws `state-not-positive`, `negative-rate`, `too-large`.
 */
export function generalisedDepolarising(
  state: MatrixInput,
  rate = 1,
  algebra: BlockAlgebra = blockAlgebra([state.rows]),
): Generator {
  requireRate(rate, '/generator/rate', 'the rate');
  requireDenseDimension(algebra, 'a depolarising generator');
  const sigma = densityMatrix(algebra, state);
  const d = algebra.dimension;
  const weights = toCoordinates(algebra, sigma);
  const one = toCoordinates(algebra, identity(algebra.size));
  const superoperator = new Float64Array(d * d);
  for (let k = 0; k < d; k++) {
    for (let l = 0; l < d; l++) superoperator[k * d + l] = rate * (one[k] * weights[l] - (k === l ? 1 : 0));
  }
  return {
    algebra,
    hamiltonian: null,
    jumps: [],
    superoperator,
    declaredState: sigma,
    origin: { kind: 'expectation', rate, tracial: false },
  };
}
