import { EPSILON } from '../tolerances.js';
import type { MinimisedPath } from './minimise-action.js';
import type { ObservedConstant } from './observed-constant.js';

/**
 * Least K that a discretised geodesic on an even mesh shows for the K-convexity of entropy along it: second differences at its inner
 * nodes over the squared length. `entropies` belong to the nodes.
 */
export function convexityAlong(
  { times, states, action }: MinimisedPath,
  entropies: readonly number[],
): ObservedConstant {
  const scale = (states.length - 1) ** 2 / action.value;
  let best: ObservedConstant = { value: Infinity, error: 0, time: 0, state: states[0] };
  for (let k = 1; k + 1 < states.length; k++) {
    const value = (entropies[k + 1] - 2 * entropies[k] + entropies[k - 1]) * scale;
    if (value >= best.value) continue;
    best = { value, error: 8 * EPSILON * (1 + entropies[k]) * scale, time: times[k], state: states[k] };
  }
  return best;
}
