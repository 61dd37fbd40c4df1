import { type BlockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import {
  type ComplexMatrix,
  addScaledInto,
  copy,
  frobeniusNorm,
  fromRows,
  identity,
  innerProduct,
  scale,
  subtract,
  zeros,
} from '../linalg/complex-matrix.js';
import type { ReferenceState } from '../structure/reference-state.js';
import { SLICE_COLLINEAR } from '../tolerances.js';
import { type StateSlice, reachOf } from './state-slice.js';

export const BLOCH_AXES = ['x', 'y', 'z'] as const;

export type BlochAxis = (typeof BLOCH_AXES)[number];

const PAULI: Record<BlochAxis, ComplexMatrix> = {
  x: fromRows([[0, 1], [1, 0]]), // prettier-ignore
  y: fromRows([[0, 0], [0, 0]], [[0, -1], [1, 0]]), // prettier-ignore
  z: fromRows([[1, 0], [0, -1]]), // prettier-ignore
};

/** ρ = ½(1 + xA + yB) for two Bloch axes A, B of a qubit: a disc of radius 1. */
export function blochDisc(algebra: BlockAlgebra, axes: readonly [BlochAxis, BlochAxis]): StateSlice {
  if (algebra.blocks.length !== 1 || algebra.size !== 2) {
    throw new ThalwegError(
      'usage',
      `expected a qubit for Bloch axes, got blocks [${algebra.blocks.join(',')}]; lay a plane through states instead`,
    );
  }
  if (axes[0] === axes[1]) throw new ThalwegError('usage', `expected two different Bloch axes, got ${axes.join(',')}`);
  return {
    kind: 'bloch disc',
    algebra,
    origin: scale(identity(2), 0.5),
    horizontal: scale(PAULI[axes[0]], 0.5),
    vertical: scale(PAULI[axes[1]], 0.5),
    axes: [axes[0], axes[1]],
    centre: [0, 0],
    marks: [],
  };
}

const TOP_CORNERS = [90, 210, 330].map((degrees) => (degrees * Math.PI) / 180);

/**
 * The states of three levels that commute with σ, or all states of three points: a triangle with corners at distance 1 from the
 * maximally mixed state, the first on top. Corner k is the k-th point, or the k-th eigenvector of σ.
 */
export function eigenvalueTriangle(algebra: BlockAlgebra, state: ReferenceState): StateSlice {
  if (algebra.size !== 3) {
    throw new ThalwegError('usage', `expected three levels or three points for a triangle, got ${algebra.size}`);
  }
  const isChain = algebra.blocks.length === 3;
  const corners = TOP_CORNERS.map((_, k) => projection(isChain ? identity(3) : state.vectors, k));
  // Weights are 1/3 + (2/3)(x cos + y sin).
  const along = (f: (angle: number) => number): ComplexMatrix =>
    corners.reduce((sum, p, k) => addScaledInto(sum, p, (2 / 3) * f(TOP_CORNERS[k])), zeros(3));
  return {
    kind: 'triangle',
    algebra,
    origin: scale(identity(3), 1 / 3),
    horizontal: along(Math.cos),
    vertical: along(Math.sin),
    axes: ['', ''],
    centre: [0, 0],
    marks: TOP_CORNERS.map((angle, k) => ({
      name: isChain ? `${k}` : `|${k}⟩`,
      x: Math.cos(angle),
      y: Math.sin(angle),
    })),
  };
}

function projection(vectors: ComplexMatrix, k: number): ComplexMatrix {
  const n = vectors.rows;
  const out = zeros(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const [a, b, c, d] = [vectors.re[i * n + k], vectors.im[i * n + k], vectors.re[j * n + k], vectors.im[j * n + k]];
      out.re[i * n + j] = a * c + b * d;
      out.im[i * n + j] = b * c - a * d;
    }
  }
  return out;
}

export interface NamedState {
  readonly name: string;
  readonly rho: ComplexMatrix;
}

/**
 * The plane through σ and two other states, in orthonormal coordinates of Tr X*Y: the first from σ towards the first state. Throws
 * `usage` when the three lie on a line.
 */
export function planeThrough(
  algebra: BlockAlgebra,
  sigma: ComplexMatrix,
  states: readonly [NamedState, NamedState],
): StateSlice {
  const [first, second] = states.map(({ rho }) => subtract(rho, sigma));
  const length = frobeniusNorm(first);
  if (!(length > SLICE_COLLINEAR)) throw onALine(states, `${states[0].name} is σ itself`);
  const horizontal = scale(first, 1 / length);
  const across = addScaledInto(copy(second), horizontal, -innerProduct(horizontal, second).re);
  const height = frobeniusNorm(across);
  if (!(height > SLICE_COLLINEAR)) throw onALine(states, 'they lie on a line');
  const slice: StateSlice = {
    kind: 'plane',
    algebra,
    origin: sigma,
    horizontal,
    vertical: scale(across, 1 / height),
    axes: ['', ''],
    centre: [0, 0],
    marks: [
      { name: states[0].name, x: length, y: 0 },
      { name: states[1].name, x: innerProduct(horizontal, second).re, y: height },
    ],
  };
  return { ...slice, centre: centroid(slice) };
}

function onALine(states: readonly NamedState[], why: string): ThalwegError {
  const names = states.map(({ name }) => name).join(' and ');
  return new ThalwegError('usage', `expected two states that span a plane with σ, got ${names}: ${why}; give others`);
}

const RAYS = 180;

/** Centre of gravity of the states in a slice: a better place for rays to begin than a σ near the boundary. */
function centroid(slice: StateSlice): readonly [number, number] {
  const reach = reachOf(slice);
  let [area, x, y] = [0, 0, 0];
  for (let k = 0; k < RAYS; k++) {
    const angle = (2 * Math.PI * (k + 0.5)) / RAYS;
    const r = reach(angle);
    area += r ** 2 / 2;
    x += (r ** 3 * Math.cos(angle)) / 3;
    y += (r ** 3 * Math.sin(angle)) / 3;
  }
  return [x / area, y / area];
}
