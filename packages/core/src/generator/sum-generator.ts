import { sameAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, frobeniusNorm } from '../linalg/complex-matrix.js';
import { type SparseMatrix, sparseAdd } from '../linalg/sparse-matrix.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import { applyGeneratorAdjoint } from './apply-generator.js';
import { generatorNormBound } from './generator-norm.js';
import type { Generator, Jump } from './generator.js';
import { scaleSparse } from './lindblad-generator.js';
import { requireRate } from './matrix-input.js';

export interface SumTerm {
  /** Dimensionless factor, at least 0. */
  readonly weight: number;
  readonly generator: Generator;
}

/**
 * Σ weight_i L_i on one algebra. A state that some term declares stays declared when it is invariant under the sum.
 * Throws `negative-rate`, `dimension-mismatch`, `usage` for an empty list.
 */
export function sumGenerator(terms: readonly SumTerm[]): Generator {
  if (terms.length === 0) {
    throw new ThalwegError('usage', 'expected at least one term in a sum, got none', { pointer: '/generator/terms' });
  }
  const { algebra } = terms[0].generator;
  let hamiltonian: SparseMatrix | null = null;
  let superoperator: Float64Array | null = null;
  const jumps: Jump[] = [];
  terms.forEach(({ weight, generator: g }, i) => {
    requireRate(weight, `/generator/terms/${i}/weight`, 'a weight');
    if (!sameAlgebra(algebra, g.algebra)) {
      throw new ThalwegError(
        'dimension-mismatch',
        `expected all terms on the algebra [${algebra.blocks.join(', ')}], got [${g.algebra.blocks.join(', ')}] in term ${i}`,
        { pointer: `/generator/terms/${i}` },
      );
    }
    if (!(weight > 0)) return;
    const part = g.hamiltonian && scaleSparse(g.hamiltonian, weight);
    if (part) hamiltonian = hamiltonian ? sparseAdd(hamiltonian, part) : part;
    for (const jump of g.jumps) jumps.push({ ...jump, matrix: scaleSparse(jump.matrix, Math.sqrt(weight)) });
    superoperator = addScaled(superoperator, g.superoperator, weight);
  });
  const sum: Generator = {
    algebra,
    hamiltonian,
    jumps,
    superoperator,
    declaredState: null,
    origin: { kind: 'sum', terms },
  };
  return { ...sum, declaredState: commonState(sum, terms) };
}

function addScaled(target: Float64Array | null, s: Float64Array | null, weight: number): Float64Array | null {
  if (!s) return target;
  const out = target ?? new Float64Array(s.length);
  for (let k = 0; k < s.length; k++) out[k] += weight * s[k];
  return out;
}

function commonState(sum: Generator, terms: readonly SumTerm[]): ComplexMatrix | null {
  const tolerance = INPUT_TOLERANCE * generatorNormBound(sum);
  for (const { generator } of terms) {
    const state = generator.declaredState;
    if (state && frobeniusNorm(applyGeneratorAdjoint(sum, state)) <= tolerance) return state;
  }
  return null;
}
