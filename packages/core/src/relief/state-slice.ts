import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, addScaledInto, copy, innerProduct, multiply } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { matrixFunction } from '../linalg/matrix-function.js';

export type SliceKind = 'bloch disc' | 'triangle' | 'plane';

/** A point that is named on a slice. */
export interface SliceMark {
  readonly name: string;
  readonly x: number;
  readonly y: number;
}

/**
 * A two-dimensional slice of state space: ρ(x,y) = origin + x·horizontal + y·vertical, with traceless directions. The states in
 * it are a convex set; rays from the centre, which is in its interior, meet its boundary once.
 */
export interface StateSlice {
  readonly kind: SliceKind;
  readonly algebra: BlockAlgebra;
  /** N×N, trace 1. */
  readonly origin: ComplexMatrix;
  /** N×N Hermitian, trace 0, orthogonal to each other and of one length. */
  readonly horizontal: ComplexMatrix;
  readonly vertical: ComplexMatrix;
  /** Names of the two coordinates. */
  readonly axes: readonly [string, string];
  readonly centre: readonly [number, number];
  /** Corners of a triangle, states that a plane was laid through. */
  readonly marks: readonly SliceMark[];
}

/** ρ(x,y). */
export function stateOn({ origin, horizontal, vertical }: StateSlice, x: number, y: number): ComplexMatrix {
  return addScaledInto(addScaledInto(copy(origin), horizontal, x), vertical, y);
}

/** Distance from the centre at which a ray leaves the states, as a function of its angle in radians. */
export function reachOf(slice: StateSlice): (angle: number) => number {
  const { algebra, horizontal, vertical, centre } = slice;
  const eigen = blockEigen(algebra, stateOn(slice, ...centre));
  if (!(Math.min(...eigen.values) > 0)) {
    throw new ThalwegError(
      'internal',
      'expected a slice whose centre is a faithful state, got another; report the model',
    );
  }
  // origin + s·d ≥ 0 up to s = −1/min spec(c^{-1/2} d c^{-1/2}), which is negative for a traceless d ≠ 0.
  const root = matrixFunction(eigen, (value) => 1 / Math.sqrt(value));
  const scaled = [horizontal, vertical].map((d) => multiply(root, multiply(d, root)));
  return (angle) => {
    const direction = addScaledInto(
      addScaledInto(copy(scaled[0]), scaled[0], Math.cos(angle) - 1),
      scaled[1],
      Math.sin(angle),
    );
    return -1 / hermitianEigenvalues(direction)[0];
  };
}

/** Coordinates of the state of a slice that is nearest to a given one, and its distance ‖ρ − ρ(x,y)‖₂. */
export function placeOn(slice: StateSlice, rho: ComplexMatrix): { x: number; y: number; distance: number } {
  const { origin, horizontal, vertical } = slice;
  const rest = addScaledInto(copy(rho), origin, -1);
  const [x, y] = [horizontal, vertical].map((d) => innerProduct(d, rest).re / innerProduct(d, d).re);
  addScaledInto(addScaledInto(rest, horizontal, -x), vertical, -y);
  return { x, y, distance: Math.sqrt(Math.max(0, innerProduct(rest, rest).re)) };
}
