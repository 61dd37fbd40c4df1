import type { BlockAlgebra } from '../../src/algebra/block-algebra.js';
import { balancedGenerator } from '../../src/generator/balanced-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import {
  type ComplexMatrix,
  adjoint,
  diagonal,
  directSum,
  hermitianPart,
  identity,
  multiply,
  multiplyAdjointSecond,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import type { Random } from '../../src/random.js';
import { randomUnitary } from '../linalg/support/inputs.js';

export interface BalancedModel {
  readonly generator: Generator;
  readonly sigma: ComplexMatrix;
  readonly terms: readonly { readonly matrix: ComplexMatrix; readonly frequency: number }[];
}

/**
 * A GNS-symmetric generator on the algebra: σ with log-eigenvalues from a small set, so that equal eigenvalues and resonant
 * frequencies occur, in a random block-diagonal basis (or the standard one); jumps are random elements of frequency spaces, inside
 * blocks and between them, together with their adjoints.
 */
export function randomBalancedGenerator(algebra: BlockAlgebra, random: Random, rotate = true): BalancedModel {
  const n = algebra.size;
  const step = 0.3 + random.uniform();
  const levels = Array.from({ length: n }, () =>
    random.integer(4) === 0 ? random.normal() : step * random.integer(3),
  );
  const weights = levels.map((x) => Math.exp(-x));
  const total = weights.reduce((sum, w) => sum + w, 0);
  const u = rotate ? directSum(algebra.blocks.map((size) => randomUnitary(random, size))) : identity(n);
  const rotated = (a: ComplexMatrix): ComplexMatrix => multiplyAdjointSecond(multiply(u, a), u);
  const terms: { matrix: ComplexMatrix; frequency: number }[] = [];
  const count = 2 + random.integer(4);
  for (let t = 0; t < count; t++) {
    const k = random.integer(n);
    const l = random.integer(n);
    if (k === l && algebra.blocks[algebra.blockOf[k]] === 1) continue;
    const frequency = levels[k] - levels[l];
    const selfAdjoint = Math.abs(frequency) < 1e-12 && algebra.blockOf[k] === algebra.blockOf[l];
    const v = rotated(inFrequencySpace(algebra, levels, k, l, random));
    if (selfAdjoint) {
      terms.push({ matrix: hermitianPart(v), frequency: 0 });
    } else {
      terms.push({ matrix: v, frequency }, { matrix: adjoint(v), frequency: -frequency });
    }
  }
  const sigma = hermitianPart(rotated(diagonal(weights.map((w) => w / total))));
  return { generator: balancedGenerator({ algebra, state: sigma, terms }), sigma, terms };
}

/** A random combination of the matrix units with the corner and the frequency of e_kl. */
function inFrequencySpace(
  algebra: BlockAlgebra,
  levels: readonly number[],
  k: number,
  l: number,
  random: Random,
): ComplexMatrix {
  const n = algebra.size;
  const v = zeros(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const sameCorner = algebra.blockOf[i] === algebra.blockOf[k] && algebra.blockOf[j] === algebra.blockOf[l];
      if (!sameCorner || Math.abs(levels[i] - levels[j] - levels[k] + levels[l]) > 1e-12) continue;
      v.re[i * n + j] = random.normal() / 2;
      v.im[i * n + j] = random.normal() / 2;
    }
  }
  return v;
}
