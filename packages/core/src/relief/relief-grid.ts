import { ThalwegError } from '../errors.js';
import { RELIEF_FEWEST, RELIEF_MOST } from '../tolerances.js';
import { type StateSlice, reachOf } from './state-slice.js';

/** Where κ is evaluated on a slice: on rays from the centre to the boundary, each with `rings` points up to just before it. */
export interface ReliefGrid {
  readonly rings: number;
  readonly rays: number;
  /** Coordinates of ring i, ray j at index i·rays + j. Ring 0 is the centre, once for every ray. */
  readonly x: Float64Array;
  readonly y: Float64Array;
  /** The boundary of state space, finer than the rays: a closed polygon. */
  readonly rimX: Float64Array;
  readonly rimY: Float64Array;
}

/** Share of the way to the boundary at which the last ring lies: κ is defined on faithful states only. */
export const LAST_RING = 0.9999;

/**
 * A grid of about `points` states, its rays at even distances along the boundary. Rings lie closer towards the rim, 1 − s = (1 − u)² for even steps of u, because κ varies
 * most there. Throws `usage` for too few or too many points.
 */
export function reliefGrid(slice: StateSlice, points: number): ReliefGrid {
  if (!Number.isInteger(points) || points < RELIEF_FEWEST || points > RELIEF_MOST) {
    throw new ThalwegError('usage', `expected ${RELIEF_FEWEST} to ${RELIEF_MOST} points of a relief, got ${points}`);
  }
  // Two and a half times as many rays as rings, in multiples of twelve: the corners of a triangle are met.
  const rays = 12 * Math.max(2, Math.round(Math.sqrt(2.5 * points) / 12));
  const rings = Math.max(4, Math.round(points / rays));
  const rim = boundary(slice);
  const ends = evenlyAlong(rim, rays);
  const [cx, cy] = slice.centre;
  const last = 1 - Math.sqrt(1 - LAST_RING);
  const shares = Array.from({ length: rings }, (_, i) => 1 - (1 - (last * i) / (rings - 1)) ** 2);
  return {
    rings,
    rays,
    x: Float64Array.from(shares.flatMap((s) => ends.map(([x]) => cx + s * (x - cx)))),
    y: Float64Array.from(shares.flatMap((s) => ends.map(([, y]) => cy + s * (y - cy)))),
    rimX: Float64Array.from(rim, ([x]) => x),
    rimY: Float64Array.from(rim, ([, y]) => y),
  };
}

type Point = readonly [number, number];

/** A multiple of the 12 above, so that the boundary of a triangle has its corners. */
const RIM_POINTS = 1440;

/** Counter-clockwise from the top. */
function boundary(slice: StateSlice): Point[] {
  const reach = reachOf(slice);
  const [cx, cy] = slice.centre;
  return Array.from({ length: RIM_POINTS }, (_, k): Point => {
    const angle = Math.PI / 2 + (2 * Math.PI * k) / RIM_POINTS;
    const r = reach(angle);
    return [cx + r * Math.cos(angle), cy + r * Math.sin(angle)];
  });
}

/** Points at even distances along a closed polygon, the first at its first corner: a sharp corner gets its share. */
function evenlyAlong(rim: readonly Point[], count: number): Point[] {
  const lengths = [0];
  rim.forEach(([x, y], k) => {
    const [nextX, nextY] = rim[(k + 1) % rim.length];
    lengths.push(lengths[k] + Math.hypot(nextX - x, nextY - y));
  });
  const total = lengths[rim.length];
  let k = 0;
  return Array.from({ length: count }, (_, j): Point => {
    const wanted = (total * j) / count;
    while (lengths[k + 1] <= wanted + total * CORNER) k++;
    const share = Math.max(0, (wanted - lengths[k]) / (lengths[k + 1] - lengths[k]));
    const [a, b] = [rim[k], rim[(k + 1) % rim.length]];
    return [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])];
  });
}

/** Part of the boundary within which a point is taken to be at a corner. */
const CORNER = 1e-9;
