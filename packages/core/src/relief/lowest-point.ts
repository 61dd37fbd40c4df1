import type { MetricModel } from '../metric/metric-model.js';
import type { MeanName } from '../metric/operator-mean.js';
import { RELIEF_REFINEMENT, RELIEF_ROUNDING } from '../tolerances.js';
import { curvatureOn } from './evaluate-relief.js';
import type { ReliefGrid } from './relief-grid.js';
import type { StateSlice } from './state-slice.js';

/** Where κ was lowest on a slice: an observation, an upper bound on the infimum over all states. */
export interface LowestPoint {
  readonly x: number;
  readonly y: number;
  readonly kappa: number;
  /** On the last ring: κ still falls towards the boundary of state space, where it is not defined. */
  readonly atRim: boolean;
}

/**
 * The lowest value on the grid, followed downhill inside the last ring by a compass search that ends at steps of
 * RELIEF_REFINEMENT of a cell. Null when κ is resolved nowhere.
 */
export function lowestPoint(
  model: MetricModel,
  mean: MeanName,
  slice: StateSlice,
  grid: ReliefGrid,
  values: Float64Array,
): LowestPoint | null {
  const start = lowestIndex(values);
  if (start < 0) return null;
  const { rays, rings } = grid;
  if (start >= (rings - 1) * rays) return { x: grid.x[start], y: grid.y[start], kappa: values[start], atRim: true };
  const kappa = curvatureOn(model, mean, slice);
  const cell = Math.hypot(grid.x[start + rays] - grid.x[start], grid.y[start + rays] - grid.y[start]);
  let best = { x: grid.x[start], y: grid.y[start], kappa: values[start] };
  for (let step = cell; step > RELIEF_REFINEMENT * cell;) {
    let next = best;
    for (const [dx, dy] of COMPASS) {
      const [x, y] = [best.x + step * dx, best.y + step * dy];
      const value = kappa(x, y);
      if (isBelow(value, next.kappa)) next = { x, y, kappa: value };
    }
    if (next === best) step /= 2;
    else best = next;
  }
  return { ...best, atRim: false };
}

const COMPASS = [
  [1, 0],
  [-1, 0],
  [0, 1],
  [0, -1],
  [Math.SQRT1_2, Math.SQRT1_2],
  [-Math.SQRT1_2, Math.SQRT1_2],
  [Math.SQRT1_2, -Math.SQRT1_2],
  [-Math.SQRT1_2, -Math.SQRT1_2],
] as const;

/** Ties within rounding go to the innermost: a constant κ is marked at the centre. */
function lowestIndex(values: Float64Array): number {
  let best = -1;
  for (let k = 0; k < values.length; k++) {
    if (Number.isNaN(values[k])) continue;
    if (best < 0 || isBelow(values[k], values[best])) best = k;
  }
  return best;
}

/** By more than rounding. */
function isBelow(value: number, other: number): boolean {
  return value < other - RELIEF_ROUNDING * Math.abs(other);
}
