import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { densityMatrix } from '../generator/declared-state.js';
import { type ComplexMatrix, trace } from '../linalg/complex-matrix.js';
import { EPSILON, FAITHFUL_TOLERANCE, INPUT_TOLERANCE } from '../tolerances.js';
import { BOUNDARY_EIGENVALUE } from './tolerances.js';
import { fromFrame } from '../metric/state-frame.js';
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
  /** How far the matrices given were moved to be two states with one conserved part, beyond rounding; Hilbert–Schmidt norm. */
  readonly moved: number;
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
  const [start, target] = [rho0, rho1].map((rho) => stateCoordinates(model, rho));
  const from = start.state;
  const gap = space.fixedPart(target.state.map((x, i) => x - from[i]));
  const conservedGap = Math.hypot(...gap);
  const onBoundary = [isOnBoundary(kernel, from), isOnBoundary(kernel, target.state)] as const;
  const centre = expectationOf(model, from);
  // Rounding in what is conserved is left alone: taking it away would move a state that is exactly on the boundary.
  const isShifted = conservedGap > 4 * space.dimension * EPSILON && conservedGap <= INPUT_TOLERANCE;
  const to = isShifted ? target.state.map((x, i) => x - gap[i]) : target.state;
  const moved = start.moved + target.moved + (isShifted ? conservedGap : 0);
  const known = { from, to, centre, conservedGap, moved, onBoundary };
  if (conservedGap > INPUT_TOLERANCE) return { relation: 'unreachable', ...known };
  if (to.every((x, i) => x === from[i])) return { relation: 'equal', ...known };
  const { values } = blockEigen(structure.algebra, fromCoordinates(structure.algebra, centre));
  if (!(Math.min(...values) > FAITHFUL_TOLERANCE)) {
    throw new ThalwegError(
      'not-supported',
      'expected states whose projection E†ρ on the fixed points is faithful, got one that leaves part of the algebra without mass for all time; give the model without that part',
    );
  }
  return { relation: 'apart', ...known };
}

/** A smallest eigenvalue that doubles cannot tell from zero. */
function isOnBoundary(kernel: MetricKernel, rho: Float64Array): boolean {
  return !((kernel.at(rho)?.smallest ?? 0) > BOUNDARY_EIGENVALUE);
}

/** Coordinates of a state, scaled to trace one, eigenvalues below zero by rounding raised to it. */
function stateCoordinates(
  { structure: { algebra } }: TransportModel,
  rho: ComplexMatrix,
): { readonly state: Float64Array; readonly moved: number } {
  const given = densityMatrix(algebra, rho, '');
  const coordinates = toCoordinates(algebra, given);
  const { values, vectors } = blockEigen(algebra, given);
  const isPositive = values.every((x) => x >= 0);
  const raised = fromFrame({ lambda: values.map((x) => Math.max(0, x)), u: vectors });
  const state = isPositive ? coordinates : toCoordinates(algebra, raised);
  const total = trace(isPositive ? given : raised).re;
  const scaled = state.map((x) => x / total);
  const moved = Math.hypot(...scaled.map((x, i) => x - coordinates[i]));
  return { state: scaled, moved: moved > 4 * algebra.dimension * EPSILON ? moved : 0 };
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
