import { exp } from '../functions/exponential.js';
import { type Matrix } from '../matrix/matrix.js';
import { diagonal } from '../matrix/special.js';
import { requireFinite, requireList } from '../require.js';

/** Weights e^{−βE_k}/Z of energies E_k. */
export function gibbsWeights(energies: readonly number[], beta: number): number[] {
  requireList(energies, 'the energies');
  requireFinite(beta, 'beta');
  const exponents = energies.map((energy) => -beta * energy);
  const top = exponents.reduce((a, b) => Math.max(a, b), -Infinity);
  const weights = exponents.map((x) => exp(x - top));
  const total = weights.reduce((a, b) => a + b, 0);
  return weights.map((w) => w / total);
}

/** Gibbs state of a diagonal Hamiltonian with these energies. */
export function gibbsState(energies: readonly number[], beta: number): Matrix {
  return diagonal(gibbsWeights(energies, beta));
}
