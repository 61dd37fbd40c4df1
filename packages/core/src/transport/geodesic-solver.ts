import { DISTANCE_COARSEST } from './tolerances.js';
import { type MinimisedPath, minimiseAction } from './minimise-action.js';
import { refinePath } from './refine-path.js';
import { startPath } from './start-path.js';
import type { TransportModel } from './transport-model.js';
import type { Endpoints } from './transport-states.js';

/** A value with its estimated error. */
interface Estimate {
  readonly value: number;
  readonly error: number;
}

/**
 * What `evaluate` finds on discretised geodesics on even meshes, each twice as fine as the one before, until the estimated error is
 * below `tolerance` or the mesh has `finest` pieces; the change at the last step is added to the error. Null without a geodesic.
 */
export function onGeodesics<Found extends Estimate>(
  { kernel, space }: TransportModel,
  endpoints: Endpoints,
  { tolerance, finest, stop }: { readonly tolerance: number; readonly finest: number; readonly stop: () => boolean },
  evaluate: (path: MinimisedPath) => Found,
): Found | null {
  let path = minimiseAction(kernel, space, startPath(kernel, endpoints, DISTANCE_COARSEST, true));
  let last = path && evaluate(path);
  let best: Found | null = null;
  while (path && last && !(best && stop())) {
    path = minimiseAction(kernel, space, refinePath(kernel, path, 2));
    if (!path) break;
    const next: Found = evaluate(path);
    best = { ...next, error: next.error + Math.abs(next.value - last.value) };
    if (best.error <= tolerance || path.states.length > finest) break;
    last = next;
  }
  return best;
}
