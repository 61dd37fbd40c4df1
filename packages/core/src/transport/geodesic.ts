import { fromCoordinates } from '../algebra/block-algebra.js';
import { relativeEntropy } from '../entropy/relative-entropy.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { MinimisedPath } from './minimise-action.js';
import { stateAt } from './refine-path.js';
import type { TransportDistance } from './transport-distance.js';
import type { TransportModel } from './transport-model.js';

/** One state of a discretised geodesic. */
export interface GeodesicPoint {
  /** From 0 to 1. */
  readonly time: number;
  readonly state: ComplexMatrix;
  /** D(ρ_t‖E†ρ₀), nats. */
  readonly entropy: number;
  /** √(Tr ρ̇𝒟⁻¹ρ̇) in the piece of the path that t lies in, a length; constant along a geodesic. */
  readonly speed: number;
}

/** Smallest and largest speed over the pieces of a path, lengths. */
export interface SpeedRange {
  readonly least: number;
  readonly most: number;
}

/** The path of a distance at `points` ≥ 2 evenly spaced times; empty where there is no path. */
export function geodesicTable(
  { structure: { algebra }, kernel }: TransportModel,
  { path, endpoints }: Pick<TransportDistance, 'path' | 'endpoints'>,
  points: number,
): GeodesicPoint[] {
  if (!path) return [];
  const reference = fromCoordinates(algebra, endpoints.centre);
  return Array.from({ length: points }, (_, k) => {
    const time = k / (points - 1);
    const state = fromCoordinates(algebra, stateAt(kernel, path, time));
    return { time, state, entropy: relativeEntropy(state, reference), speed: speedAt(path, time) };
  });
}

/** How constant the speed of a path is: its range over the pieces. */
export function speedRange({ action }: MinimisedPath): SpeedRange {
  const speeds = action.pieces.map(({ speed }) => Math.sqrt(speed));
  return { least: Math.min(...speeds), most: Math.max(...speeds) };
}

function speedAt({ times, action }: MinimisedPath, time: number): number {
  const piece = action.pieces.findIndex((_, k) => time <= times[k + 1]);
  return Math.sqrt(action.pieces[piece < 0 ? action.pieces.length - 1 : piece].speed);
}
