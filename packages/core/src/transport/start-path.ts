import { BENT_PATH, GRADED_BELOW } from './tolerances.js';
import type { DiscretePath } from './discrete-path.js';
import type { MetricKernel } from './metric-kernel.js';
import { between } from './refine-path.js';
import type { Endpoints } from './transport-states.js';

/**
 * A first path with `count` pieces: the straight one between faithful states; bent towards the faithful state `centre` otherwise,
 * with nodes
 * closer together at an end near the boundary, where a geodesic is not smooth in time, unless the mesh is to be even.
 */
export function startPath(
  kernel: MetricKernel,
  { from, to, centre, onBoundary }: Endpoints,
  count: number,
  isEven = false,
): DiscretePath {
  const isGraded = [from, to].map((x) => !isEven && !((kernel.at(x)?.smallest ?? 0) > GRADED_BELOW));
  const times = Float64Array.from({ length: count + 1 }, (_, k) => gradedTime(k / count, isGraded[0], isGraded[1]));
  const bend = onBoundary[0] || onBoundary[1] ? BENT_PATH : 0;
  const states = Array.from(times, (t, k) => {
    if (k === 0) return from;
    if (k === count) return to;
    return between(between(from, to, t), centre, 4 * bend * t * (1 - t));
  });
  return { times, states };
}

/** s, s², 1 − (1 − s)² or s²(3 − 2s). */
function gradedTime(s: number, atStart: boolean, atEnd: boolean): number {
  if (atStart && atEnd) return s * s * (3 - 2 * s);
  if (atStart) return s * s;
  return atEnd ? s * (2 - s) : s;
}
