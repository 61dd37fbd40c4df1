import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { densityMatrix } from '../generator/declared-state.js';
import { type ComplexMatrix, trace } from '../linalg/complex-matrix.js';
import { EPSILON, FAITHFUL_TOLERANCE, INPUT_TOLERANCE } from '../tolerances.js';
import { BOUNDARY_EIGENVALUE } from './tolerances.js';
import type { MetricKernel } from './metric-kernel.js';
import type { TransportModel } from './transport-model.js';

/** Two states as a path joins them. */
export interface Endpoints {
  readonly relation: 'apart' | 'equal' | 'unreachable';
  /** D coordinates, of trace one, with the same conserved part unless unreachable. */
  readonly from: Float64Array;
  readonly to: Float64Array;
  /** E†ρ₀, faithful when the states are apart. */
  readonly centre: Float64Array;
  /** ‖ρ₁ − ρ₀‖ along the fixed points. */
  readonly conservedGap: number;
  /** Where ρ₀ or ρ₁ has an eigenvalue that is zero to rounding. */
  readonly onBoundary: readonly [boolean, boolean];
}

/**
 * The two states in coordinates. Throws `dimension-mismatch`, `not-hermitian`, `state-not-positive` for a matrix that is no state
 * of the algebra (pointer-free messages name which), and `not-supported` where E†ρ is not faithful, so that part of the algebra
 * carries no mass at all.
 */
export function endpointsOf(model: TransportModel, rho0: ComplexMatrix, rho1: ComplexMatrix): Endpoints {
  const { structure, space, kernel } = model;
  const [from, to] = [rho0, rho1].map((rho) => stateCoordinates(model, rho));
  const gap = space.fixedPart(to.map((x, i) => x - from[i]));
  const conservedGap = Math.hypot(...gap);
  const onBoundary = [isOnBoundary(kernel, from), isOnBoundary(kernel, to)] as const;
  const centre = expectationOf(model, from);
  if (conservedGap > INPUT_TOLERANCE) return { relation: 'unreachable', from, to, centre, conservedGap, onBoundary };
  // Rounding in what is conserved is left alone: taking it away would move a state that is exactly on the boundary.
  const end = conservedGap > 4 * space.dimension * EPSILON ? to.map((x, i) => x - gap[i]) : to;
  const isEqual = end.every((x, i) => x === from[i]);
  if (isEqual) return { relation: 'equal', from, to: end, centre, conservedGap, onBoundary };
  const { values } = blockEigen(structure.algebra, fromCoordinates(structure.algebra, centre));
  if (!(Math.min(...values) > FAITHFUL_TOLERANCE)) {
    throw new ThalwegError(
      'not-supported',
      'expected states whose projection E†ρ on the fixed points is faithful, got one that leaves part of the algebra without mass for all time; give the model without that part',
    );
  }
  return { relation: 'apart', from, to: end, centre, conservedGap, onBoundary };
}

/** A smallest eigenvalue that doubles cannot tell from zero. */
function isOnBoundary(kernel: MetricKernel, rho: Float64Array): boolean {
  return !((kernel.at(rho)?.smallest ?? 0) > BOUNDARY_EIGENVALUE);
}

/** Coordinates of a state, scaled to trace one. */
function stateCoordinates({ structure: { algebra } }: TransportModel, rho: ComplexMatrix): Float64Array {
  const state = densityMatrix(algebra, rho, '');
  const total = trace(state).re;
  return toCoordinates(algebra, state).map((x) => x / total);
}

/** E†ρ in coordinates. */
function expectationOf({ structure }: TransportModel, rho: Float64Array): Float64Array {
  const e = structure.fixedPoints?.expectation;
  const out = new Float64Array(rho.length);
  if (!e) return out;
  const d = rho.length;
  for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) out[j] += e[i * d + j] * rho[i];
  return out;
}
