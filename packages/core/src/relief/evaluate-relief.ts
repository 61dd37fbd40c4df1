import { blockEigen } from '../algebra/block-eigen.js';
import { curvaturePencil } from '../metric/curvature-pencil.js';
import type { MetricModel } from '../metric/metric-model.js';
import type { MeanName } from '../metric/operator-mean.js';
import { STATE_FLOORS } from '../tolerances.js';
import type { ReliefGrid } from './relief-grid.js';
import { type StateSlice, stateOn } from './state-slice.js';

/** κ(ρ(x,y)) as a function on a slice: NaN where the state is not faithful or doubles cannot resolve the metric. */
export function curvatureOn(model: MetricModel, mean: MeanName, slice: StateSlice): (x: number, y: number) => number {
  const pencil = curvaturePencil(model, mean);
  return (x, y) => {
    const { values, vectors } = blockEigen(model.algebra, stateOn(slice, x, y));
    if (!(Math.min(...values) > STATE_FLOORS[1] / 2)) return NaN;
    const { kappa } = pencil.at({ lambda: values, u: model.commutative ? null : vectors });
    return Number.isFinite(kappa) ? kappa : NaN;
  };
}

/** κ on the rings from `from` to before `to` of a grid, in the order of the grid; the centre is evaluated once. */
export function evaluateRings(
  model: MetricModel,
  mean: MeanName,
  slice: StateSlice,
  grid: ReliefGrid,
  [from, to]: readonly [number, number],
): Float64Array {
  const kappa = curvatureOn(model, mean, slice);
  const out = new Float64Array((to - from) * grid.rays);
  for (let i = from; i < to; i++) {
    const start = (i - from) * grid.rays;
    if (i === 0) {
      out.fill(kappa(grid.x[0], grid.y[0]), 0, grid.rays);
      continue;
    }
    for (let j = 0; j < grid.rays; j++) out[start + j] = kappa(grid.x[i * grid.rays + j], grid.y[i * grid.rays + j]);
  }
  return out;
}
