import { blockAlgebra } from '../algebra/block-algebra.js';
import { balancedGenerator } from '../generator/balanced-generator.js';
import type { Generator } from '../generator/generator.js';
import { diagonal } from '../linalg/complex-matrix.js';
import { sparseFromTriplets } from '../linalg/sparse-matrix.js';
import { requireNonNegative } from './check-parameter.js';

/**
 * A qubit in a bath of inverse temperature β (level spacing 1, ground state first): V = √γ|0><1| and √γ|1><0| of frequencies ∓β.
 * Gap = ge = cge = 2γ cosh(β/2) in the canonical normalisation (Carlen & Maas, J. Funct. Anal. 273 (2017), §2).
 */
export function thermalQubit({ beta, gamma = 1 }: { readonly beta: number; readonly gamma?: number }): Generator {
  requireNonNegative(beta, 'beta');
  requireNonNegative(gamma, 'gamma');
  const excited = Math.exp(-beta) / (1 + Math.exp(-beta));
  const root = Math.sqrt(gamma);
  return balancedGenerator({
    algebra: blockAlgebra([2]),
    state: diagonal([1 - excited, excited]),
    terms: [
      { label: 'σ−', matrix: sparseFromTriplets(2, 2, [[0, 1, root, 0]]), frequency: -beta },
      { label: 'σ+', matrix: sparseFromTriplets(2, 2, [[1, 0, root, 0]]), frequency: beta },
    ],
  });
}
