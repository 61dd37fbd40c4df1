import { entropyForms, pullBackToLogarithm } from '../entropy/entropy-gradient.js';
import { entropyModel } from '../entropy/entropy-model.js';
import type { LogState } from '../entropy/log-state.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { BfgsOptions } from '../search/bfgs.js';
import type { End } from '../sheet/bracket.js';
import type { ReferenceState } from '../structure/reference-state.js';
import type { Structure } from '../structure/structure.js';
import { GAP_CLOSENESS } from '../tolerances.js';
import {
  type EntropyEvaluation,
  type EntropyQuotientProblem,
  type EntropyResult,
  type EntropyStart,
  bestOf,
  runEntropyStart,
} from './entropy-search.js';
import { type EntropySearchOptions, entropyStarts } from './entropy-starts.js';
import { mlsiAt } from './mlsi-quotient.js';

/** Independent starts of the search for `mlsi` = inf I(ρ)/(2D(ρ‖E†ρ)), for `runMlsiStart`. Throws `not-supported` without a faithful invariant state. */
export function mlsiTasks(structure: Structure, options: EntropySearchOptions): EntropyStart[] {
  if (everythingFixed(structure)) return [];
  return entropyStarts(structure, entropyModel(structure), stateOf(structure), 'mlsi', options);
}

/** Run one start of `mlsiTasks` or `clsiTasks`; null when its state is too near its projection. */
export function runMlsiStart(
  structure: Structure,
  start: EntropyStart,
  options: BfgsOptions = {},
): EntropyResult | null {
  return runEntropyStart(mlsiProblem(structure, start.amplification), start, options);
}

/** I/(2D) with its derivative in log ρ, over states of M ⊗ M_k. */
function mlsiProblem(structure: Structure, amplification: number): EntropyQuotientProblem {
  const model = entropyModel(structure, amplification);
  return {
    model,
    evaluate(state: LogState): EntropyEvaluation | null {
      const forms = entropyForms(model, state, true);
      const { production, entropy } = forms;
      if (!(entropy >= model.entropyFloor)) return null;
      const value = production / (2 * entropy);
      const gradient = (): ComplexMatrix => pullBackToLogarithm(state, forms, 1 / (2 * entropy), -value / entropy);
      return { value, entropy, gradient };
    },
    at: (rho) => mlsiAt(structure, rho, amplification),
  };
}

/**
 * Upper end of `mlsi`, `clsi` or `lsi` from the results of a search and the gap (an upper end); null when there is neither.
 * Give the gap only where it bounds the constant: under KMS symmetry its eigenvector makes the quotient tend to at most the
 * gap at σ. A search value not clearly below it is that limit, and the gap is returned.
 */
export function entropyUpper(gap: End | null, results: readonly (EntropyResult | null)[]): End | null {
  const best = bestOf(results);
  if (!best) return gap;
  const value = best.value + best.margin;
  if (gap && !(value < gap.value * (1 - GAP_CLOSENESS))) return gap;
  return {
    value,
    grade: 'observed',
    by: `search over states, start "${best.label}"`,
    margin: best.margin,
    evidence: {
      constant: best.constant,
      value: best.value,
      state: best.state,
      observable: null,
      amplification: best.amplification,
    },
  };
}

/** The reference state; `entropyModel` has already refused structures without one. */
export function stateOf(structure: Structure): ReferenceState {
  return structure.state as ReferenceState;
}

/** L = 0: every state is its own projection, and there is no quotient to search. */
export function everythingFixed({ fixedPoints, algebra }: Structure): boolean {
  return fixedPoints?.dimension === algebra.dimension;
}
