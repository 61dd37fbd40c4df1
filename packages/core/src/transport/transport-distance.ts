import type { End } from '../sheet/bracket.js';
import { DISTANCE_COARSEST, DISTANCE_FINEST, DISTANCE_PARTS, DUAL_SHARE } from './tolerances.js';
import { dualBound } from './dual-bound.js';
import { type MinimisedPath, minimiseAction } from './minimise-action.js';
import { lengthBound } from './path-length.js';
import { potentialSpline } from './potential-spline.js';
import { refinePath } from './refine-path.js';
import { startPath } from './start-path.js';
import type { TransportModel } from './transport-model.js';
import { type Endpoints, endpointsOf } from './transport-states.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';

export interface DistanceOptions {
  /** (upper − lower)/upper at which refinement ends. */
  readonly relativeWidth: number;
  /** Ends the refinement at the best bracket so far. */
  readonly stop?: () => boolean;
  /** Most pieces of a path. */
  readonly finest?: number;
  /** Hears of the bracket after every refinement. */
  readonly onRefined?: (bracket: { readonly pieces: number; readonly lower: number; readonly upper: number }) => void;
}

/** The transport distance of two states as a bracket, with a path of least action. */
export interface TransportDistance {
  readonly lower: End;
  readonly upper: End;
  /** The discretised geodesic of the last refinement; null where the distance is infinite, zero, or none was finished. */
  readonly path: MinimisedPath | null;
  /** The ends agree to the width asked for. */
  readonly reached: boolean;
  readonly endpoints: Endpoints;
}

/**
 * W(ρ₀,ρ₁), W² = min ∫ Tr ρ̇ 𝒟_ρ⁻¹ ρ̇ dt over curves of states (Carlen & Maas 2017), a length (√time): above by the polygon
 * through a path of least action, below by a path of potentials; both certified in floating point, refined by halving the step
 * until they agree to `relativeWidth`. Errors as `endpointsOf`.
 */
export function transportDistance(
  model: TransportModel,
  rho0: ComplexMatrix,
  rho1: ComplexMatrix,
  { relativeWidth, stop = () => false, finest = DISTANCE_FINEST, onRefined }: DistanceOptions,
): TransportDistance {
  const endpoints = endpointsOf(model, rho0, rho1);
  if (endpoints.relation !== 'apart') return trivialDistance(endpoints);
  const { kernel, space } = model;
  let lower: End = { value: 0, grade: 'exact', by: 'a distance is not negative' };
  let upper: End = { value: Infinity, grade: 'certified', by: 'no path was finished in time' };
  let path: MinimisedPath | null = null;
  const isWide = (): boolean => !(lower.value >= (1 - relativeWidth) * upper.value);
  for (let count = DISTANCE_COARSEST; count <= finest && isWide() && !(path && stop()); count *= 2) {
    const start = path ? refinePath(kernel, path, 2) : startPath(kernel, endpoints, count);
    const found = minimiseAction(kernel, space, start, path ? stop : undefined);
    if (!found) break;
    path = found;
    const length = lengthBound(kernel, space, refinePath(kernel, path, DISTANCE_PARTS));
    const above = length.value + length.margin;
    if (above < upper.value) {
      const by = `length of a path of ${count} pieces by the trapezoidal rule, an upper bound as the action is convex`;
      upper = { value: above, grade: 'certified', by, margin: length.margin };
    }
    const tolerance = DUAL_SHARE * Math.max(relativeWidth * path.action.value, upper.value ** 2 - path.action.value);
    const dual = dualBound(kernel, space, potentialSpline(space, path), path, {
      parts: DISTANCE_PARTS,
      tolerance,
      stop,
    });
    const half = dual ? dual.value - dual.margin : 0;
    if (dual && half > 0 && Math.sqrt(2 * half) > lower.value) {
      const below = Math.sqrt(2 * half);
      const by = `dual path of potentials of ${count} pieces, a subsolution of the Hamilton–Jacobi equation`;
      lower = { value: below, grade: 'certified', by, margin: dual.margin / below };
    }
    onRefined?.({ pieces: count, lower: lower.value, upper: upper.value });
  }
  return { lower, upper, path, reached: !isWide(), endpoints };
}

/** States that are the same, or that no curve of finite length joins. */
function trivialDistance(endpoints: Endpoints): TransportDistance {
  if (endpoints.relation === 'equal') {
    const end: End = { value: 0, grade: 'exact', by: 'the states are equal' };
    return { lower: end, upper: end, path: null, reached: true, endpoints };
  }
  const by = `E†ρ₀ ≠ E†ρ₁ (they differ by ${endpoints.conservedGap.toPrecision(3)}): every curve of finite length conserves E†ρ`;
  const end: End = { value: Infinity, grade: 'certified', by };
  return { lower: end, upper: end, path: null, reached: true, endpoints };
}
