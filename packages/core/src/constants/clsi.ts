import { entropyModel } from '../entropy/entropy-model.js';
import type { Structure } from '../structure/structure.js';
import { ENTROPY_SEARCH_LIMIT } from '../tolerances.js';
import type { EntropyStart } from './entropy-search.js';
import { type EntropySearchOptions, entropyStarts } from './entropy-starts.js';
import { everythingFixed, stateOf } from './mlsi.js';

export interface ClsiSearchOptions extends EntropySearchOptions {
  /** k of M ⊗ M_k; default the side of the largest block, at least 2. A smaller ancilla is contained in a larger one. */
  readonly amplification?: number;
}

/**
 * Starts of the search for `clsi` on M ⊗ M_k, for `runMlsiStart`; none when the amplified algebra is too large to search.
 * Results of the search for `mlsi` bound `clsi` as well. Throws `not-supported` without a faithful invariant state.
 */
export function clsiTasks(structure: Structure, options: ClsiSearchOptions): EntropyStart[] {
  const k = options.amplification ?? Math.max(2, ...structure.algebra.blocks);
  if (everythingFixed(structure) || structure.algebra.dimension * k * k > ENTROPY_SEARCH_LIMIT) return [];
  return entropyStarts(structure, entropyModel(structure, k), stateOf(structure), 'clsi', options);
}
