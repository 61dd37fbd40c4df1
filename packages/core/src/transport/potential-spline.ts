import type { MinimisedPath } from './minimise-action.js';
import type { DiscretePath } from './discrete-path.js';
import type { MetricKernel } from './metric-kernel.js';
import { between, refinePath } from './refine-path.js';
import type { TangentSpace } from './tangent-space.js';

/** A C¹ quadratic spline of potentials: K + 2 control points on the mesh t_0 < … < t_K. */
export interface PotentialSpline {
  readonly times: Float64Array;
  /** D coordinates each; the k-th belongs to the middle of the k-th piece, with one more before and behind. */
  readonly controls: readonly Float64Array[];
}

/** One control point of a piece, with what the dual bound needs there. */
export interface Control {
  /** P. */
  readonly point: Float64Array;
  /** Q, the control point of Ȧ. */
  readonly slope: Float64Array;
  /** Its share of the integral. */
  readonly weight: number;
  /** A faithful state near the best supporting one. */
  readonly guess: Float64Array;
}

/**
 * The spline through the potentials of a path of least action: they sit at the midpoints of its pieces, where the control points of
 * a quadratic spline belong. At both ends it goes on with the slope −½∂_ρ‖A‖²_ρ of the geodesic equation.
 */
export function potentialSpline(space: TangentSpace, { times, action }: MinimisedPath): PotentialSpline {
  const inner = action.pieces.map(({ potential }) => space.expand(potential));
  const beyond = (k: number, sign: number): Float64Array => {
    const { step, at } = action.pieces[k];
    const slope = at.gradient(inner[k]);
    return inner[k].map((x, i) => x + (sign * step * slope[i]) / 2);
  };
  return { times, controls: [beyond(0, 1), ...inner, beyond(inner.length - 1, -1)] };
}

/** The control points of the spline cut into `parts` pieces each; neighbours share theirs, slopes too, since the spline is C¹. */
export function controlsOf(
  kernel: MetricKernel,
  { times, controls }: PotentialSpline,
  path: DiscretePath,
  parts: number,
): Control[] {
  const fine = refinePath(kernel, path, 2 * parts).states;
  // Next to a state near the boundary the metric is too steep for Newton's method to start from.
  const last = fine.length - 1;
  const faithful = fine.map((x, i) => (i === 0 ? fine[1] : i === last ? fine[last - 1] : x));
  const out: Control[] = [];
  let before = 0;
  for (let k = 0; k + 1 < times.length; k++) {
    const width = (times[k + 1] - times[k]) / parts;
    const [p0, p1, p2] = bernstein(times, controls, k);
    for (let j = 0; j < parts; j++) {
      const [s, t] = [j / parts, (j + 1) / parts];
      const [q0, q1, q2] = [blossom(p0, p1, p2, s, s), blossom(p0, p1, p2, s, t), blossom(p0, p1, p2, t, t)];
      const at = 2 * (k * parts + j);
      const weight = (before + width) / 3;
      out.push({ point: q0, slope: slope(q0, q1, width / 2), weight, guess: faithful[at] });
      out.push({ point: q1, slope: slope(q0, q2, width), weight: width / 3, guess: faithful[at + 1] });
      if (k + 2 === times.length && j + 1 === parts) {
        out.push({ point: q2, slope: slope(q1, q2, width / 2), weight: width / 3, guess: faithful[at + 2] });
      }
      before = width;
    }
  }
  return out;
}

/** Control points of piece k: the ends lie between neighbouring controls, in proportion to the lengths of the pieces. */
function bernstein(times: Float64Array, controls: readonly Float64Array[], k: number): Float64Array[] {
  const width = (i: number): number => {
    const inside = Math.max(0, Math.min(times.length - 2, i));
    return times[inside + 1] - times[inside];
  };
  const knot = (i: number): Float64Array =>
    between(controls[i], controls[i + 1], width(i - 1) / (width(i - 1) + width(i)));
  return [knot(k), controls[k + 1], knot(k + 1)];
}

function blossom(p0: Float64Array, p1: Float64Array, p2: Float64Array, s: number, t: number): Float64Array {
  const [a, b, c] = [(1 - s) * (1 - t), s + t - 2 * s * t, s * t];
  return p0.map((x, i) => a * x + b * p1[i] + c * p2[i]);
}

function slope(from: Float64Array, to: Float64Array, time: number): Float64Array {
  return from.map((x, i) => (to[i] - x) / time);
}
