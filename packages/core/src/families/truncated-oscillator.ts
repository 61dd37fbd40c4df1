import { blockAlgebra } from '../algebra/block-algebra.js';
import { withDeclaredState } from '../generator/declared-state.js';
import type { Generator } from '../generator/generator.js';
import { lindbladGenerator } from '../generator/lindblad-generator.js';
import { diagonal } from '../linalg/complex-matrix.js';
import { type Triplet, sparseFromTriplets } from '../linalg/sparse-matrix.js';
import { requireNonNegative, requireWhole } from './check-parameter.js';

/**
 * Thermal oscillator e^{β/2}D[a] + e^{−β/2}D[a*] on its first `levels` levels, D[R](A) = R*AR − ½{R*R,A}. The truncated Gibbs state is
 * declared. Without truncation gap = ge = sinh(β/2) (Carlen & Maas, J. Funct. Anal. 273 (2017)); report against the cutoff.
 */
export function truncatedOscillator({ levels, beta }: { readonly levels: number; readonly beta: number }): Generator {
  requireWhole(levels, 2, 32, 'the number of levels');
  requireNonNegative(beta, 'beta');
  const lowering = Array.from({ length: levels - 1 }, (_, k): Triplet => [k, k + 1, Math.sqrt(k + 1), 0]);
  const raising = lowering.map(([i, j, x]): Triplet => [j, i, x, 0]);
  const weights = Array.from({ length: levels }, (_, k) => Math.exp(-beta * k));
  const total = weights.reduce((sum, w) => sum + w, 0);
  const generator = lindbladGenerator({
    algebra: blockAlgebra([levels]),
    jumps: [
      { label: 'a', rate: Math.exp(beta / 2), matrix: sparseFromTriplets(levels, levels, lowering) },
      { label: 'a*', rate: Math.exp(-beta / 2), matrix: sparseFromTriplets(levels, levels, raising) },
    ],
  });
  return withDeclaredState(generator, diagonal(weights.map((w) => w / total)));
}
