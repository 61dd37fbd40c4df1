import { densityMatrix } from '../generator/declared-state.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, addScaledInto, copy, frobeniusNorm, subtract } from '../linalg/complex-matrix.js';
import { isMarkov } from '../structure/positivity.js';
import type { Structure } from '../structure/structure.js';
import { EPSILON, FLOW_BOUND_ROUNDING, FLOW_POINTS_LIMIT } from '../tolerances.js';
import { type DescentBound, type DescentEnds, boundAt, descentBounds } from './descent-bounds.js';
import { flowLimit } from './flow-limit.js';
import { type FlowQuantities, flowQuantities } from './flow-quantities.js';
import type { FlowTimes } from './flow-times.js';
import { type PropagationMethod, propagate } from './propagation.js';

/** One time of a descent. */
export interface DescentPoint extends FlowQuantities {
  readonly time: number;
  /** ρ_t, N×N. */
  readonly state: ComplexMatrix;
  /** Error of ρ_t in trace norm, see `FlowStep`. */
  readonly stateError: number;
}

/** Relative entropy along the flow of one state, against what proved constants promise. */
export interface Descent {
  /** E†ρ, N×N. */
  readonly limit: ComplexMatrix;
  readonly primitive: boolean;
  readonly method: PropagationMethod;
  readonly points: readonly DescentPoint[];
  readonly bounds: readonly DescentBound[];
}

/**
 * The flow of ρ at evenly spaced times from 0 to `until`, with the bounds that the lower ends of proved constants give. Throws
 * `usage` for bad times, `state-not-positive` and others of `densityMatrix`, `not-supported` and `too-large` as `flowLimit` and
 * `propagate`, and `internal` when the flow crosses a bound, which would mean that a constant or the flow is wrong.
 */
export function descend(structure: Structure, rho: ComplexMatrix, times: FlowTimes, ends: DescentEnds = {}): Descent {
  requireTimes(times);
  requireMarkov(structure);
  const start = densityMatrix(structure.algebra, rho, '');
  const limit = flowLimit(structure);
  const tau = limit.of(start);
  const deviation = withoutRounding(subtract(start, tau));
  const { method, steps } = propagate(structure, limit, deviation, times);
  const points = steps.map((step): DescentPoint => {
    const state = addScaledInto(copy(tau), step.deviation, 1);
    const { time, error } = step;
    return { time, state, stateError: error, ...flowQuantities(structure.algebra, tau, step) };
  });
  const starts = points.map((point) => ({ time: point.time, quantities: point }));
  const bounds = descentBounds(ends, limit, deviation, starts);
  for (const bound of bounds) requireBelow(bound, points);
  return { limit: tau, primitive: limit.primitive, method, points, bounds };
}

/** A crossing beyond the errors of the flow and of the constant is a bug somewhere: it is reported, not drawn. */
function requireBelow(bound: DescentBound, points: readonly DescentPoint[]): void {
  const [first] = points;
  for (const point of points) {
    if (point.time < bound.from) continue;
    const value = point[bound.quantity];
    const highest = boundAt(bound, point.time, bound.margin);
    const slack = FLOW_BOUND_ROUNDING * highest + point.errors[bound.quantity] + first.errors[bound.quantity];
    if (value <= highest + slack) continue;
    throw new ThalwegError(
      'internal',
      `internal error: the flow crosses a bound that is said to be proved: ${bound.formula} by ${bound.constant} (${bound.by}) ` +
        `allows ${highest} at t = ${point.time}, got ${value}. One of them is wrong: please report the model and the state`,
      { details: { constant: bound.constant, time: point.time, bound: highest, value, slack } },
    );
  }
}

/** A deviation that is rounding of a state which does not move is none. */
function withoutRounding(deviation: ComplexMatrix): ComplexMatrix {
  const rounding = 8 * deviation.rows * EPSILON;
  return frobeniusNorm(deviation) > rounding ? deviation : subtract(deviation, deviation);
}

function requireTimes({ until, points }: FlowTimes): void {
  if (!(until > 0) || !Number.isFinite(until)) {
    throw new ThalwegError('usage', `expected a time above 0 to flow until, got ${until}`);
  }
  if (Number.isInteger(points) && points >= 2 && points <= FLOW_POINTS_LIMIT) return;
  throw new ThalwegError('usage', `expected 2 to ${FLOW_POINTS_LIMIT} points of a flow, got ${points}`);
}

function requireMarkov({ markov }: Structure): void {
  if (isMarkov(markov)) return;
  throw new ThalwegError(
    'not-completely-positive',
    'expected a generator of a Markov semigroup, got one that is not; look at its report',
  );
}
