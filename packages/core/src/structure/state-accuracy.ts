import { EPSILON, MAX_STATE_ERROR } from '../tolerances.js';
import type { ReferenceState } from './reference-state.js';

/**
 * Estimated error of the logarithms and eigenvectors of σ, dimensionless: 0 for an exactly diagonal σ, else N·2⁻⁵²/σ_min, because a
 * σ computed, or read in another basis, has absolute errors near 2⁻⁵². At most MAX_STATE_ERROR, whatever σ_min is.
 */
export function stateError(state: ReferenceState): number {
  if (state.exact) return 0;
  return Math.min((state.values.length * EPSILON) / state.smallest, MAX_STATE_ERROR);
}
