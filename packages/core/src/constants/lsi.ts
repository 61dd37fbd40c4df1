import { entropyModel } from '../entropy/entropy-model.js';
import type { BfgsOptions } from '../search/bfgs.js';
import type { Structure } from '../structure/structure.js';
import { type EntropyResult, type EntropyStart, runEntropyStart } from './entropy-search.js';
import { type EntropySearchOptions, entropyStarts } from './entropy-starts.js';
import { lsiProblem, requirePrimitive } from './lsi-quotient.js';
import { everythingFixed, stateOf } from './mlsi.js';

/**
 * Independent starts of the search for `lsi`, the largest α with 2 E₂(X) ≥ α D(ρ‖σ), X = σ^{-1/4} ρ^{1/2} σ^{-1/4},
 * E₂(X) = −Tr σ^{1/2} X σ^{1/2} L(X) (Olkiewicz & Zegarlinski 1999, normalised so that lsi ≤ gap). Throws
 * `not-supported` unless the generator is primitive with a faithful state: otherwise the constant is zero.
 */
export function lsiTasks(structure: Structure, options: EntropySearchOptions): EntropyStart[] {
  requirePrimitive(structure);
  if (everythingFixed(structure)) return [];
  return entropyStarts(structure, entropyModel(structure), stateOf(structure), 'lsi', options);
}

/** Run one start of `lsiTasks`; null when its state is too near σ. */
export function runLsiStart(
  structure: Structure,
  start: EntropyStart,
  options: BfgsOptions = {},
): EntropyResult | null {
  return runEntropyStart(lsiProblem(structure), start, options);
}
