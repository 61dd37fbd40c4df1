import { type BlockAlgebra, fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { decomposeAlgebra } from '../algebra/decompose-algebra.js';
import { ThalwegError } from '../errors.js';
import { generatorMatrix } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { MAX_DENSE_DIMENSION, QUICK_DENSE_DIMENSION, requireDenseDimension } from '../generator/superoperator-parts.js';
import { tensorAlgebra, tensorElement } from '../generator/tensor-algebra.js';
import { type ComplexMatrix, identity } from '../linalg/complex-matrix.js';
import { dot, norm } from '../linalg/real-vector.js';
import { kernelPair, projectionFactor } from './kernel.js';
import { primitiveByCholesky, primitiveBySearch } from './primitive.js';
import type { ReferenceState } from './reference-state.js';
import type { Symmetry } from './symmetry.js';

/** F = {A : L(A) = 0}. */
export interface FixedPoints {
  readonly dimension: number;
  /** Orthonormal Hermitian matrices that span F, the first 1/√N. */
  readonly basis: ComplexMatrix[];
  /** Block sizes of F as an algebra, ascending; empty when the state is not faithful and F is no algebra. */
  readonly blocks: number[];
  /** F = C·1 under a faithful state. */
  readonly primitive: boolean;
  /**
   * E = lim e^{tL} on observables, real D×D in the Hermitian basis; orthogonal in the KMS product when L is symmetric in it.
   * Reading it throws `too-large` when D exceeds what is stored densely.
   */
  readonly expectation: Float64Array;
}

/**
 * Fixed points and the projection onto them along the range of L. Null when the algebra is too large for linear algebra on it
 * and they are not found otherwise: a tensor product takes those of its factors, and a symmetric L is searched for a second one.
 */
export function fixedPoints(g: Generator, state: ReferenceState, symmetry: Symmetry): FixedPoints | null {
  const kernel = kernelOf(g, state, symmetry);
  if (!kernel) return null;
  const basis = startWithIdentity(g.algebra, kernel.right);
  const elements = basis.map((x) => fromCoordinates(g.algebra, x));
  let expectation: Float64Array | null = null;
  return {
    dimension: basis.length,
    basis: elements,
    blocks: blocksOf(elements, state),
    primitive: basis.length === 1 && state.faithful,
    get expectation() {
      expectation ??= projection(g.algebra, basis, kernel.left);
      return expectation;
    },
  };
}

interface Kernel {
  /** ker L, coordinates. */
  readonly right: readonly Float64Array[];
  /** ker L†. */
  readonly left: readonly Float64Array[];
}

function kernelOf(g: Generator, state: ReferenceState, symmetry: Symmetry): Kernel | null {
  const { algebra, origin } = g;
  if (origin.kind === 'tensor') {
    const kernels = origin.factors.map(ownKernel);
    return kernels.every((k) => k !== null) ? tensorKernel(origin.factors, kernels as Kernel[]) : null;
  }
  const d = algebra.dimension;
  if (d <= QUICK_DENSE_DIMENSION) return kernelPair(generatorMatrix(g), d);
  const alone = {
    right: [toCoordinates(algebra, identity(algebra.size))],
    left: [toCoordinates(algebra, state.sigma)],
  };
  if (d <= MAX_DENSE_DIMENSION) return primitiveByCholesky(g, state) ? alone : kernelPair(generatorMatrix(g), d);
  return symmetry.kind !== 'none' && primitiveBySearch(g, state) ? alone : null;
}

/** The kernel of a factor, which is small enough for linear algebra or is not known. */
function ownKernel(g: Generator): Kernel | null {
  if (g.algebra.dimension > MAX_DENSE_DIMENSION) return null;
  return kernelPair(generatorMatrix(g), g.algebra.dimension);
}

/** ker of a sum of commuting generators of Markov semigroups on different factors: the products of null vectors. */
function tensorKernel(factors: readonly Generator[], kernels: readonly Kernel[]): Kernel {
  const tensor = tensorAlgebra(factors.map((f) => f.algebra));
  const side = (name: 'right' | 'left'): Float64Array[] => {
    const lists = kernels.map((k, f) => k[name].map((x) => fromCoordinates(factors[f].algebra, x)));
    const combinations = lists.reduce<ComplexMatrix[][]>(
      (all, list) => all.flatMap((head) => list.map((a) => [...head, a])),
      [[]],
    );
    return combinations.map((elements) => toCoordinates(tensor.algebra, tensorElement(tensor, elements)));
  };
  return { right: side('right'), left: side('left') };
}

/** An orthonormal basis of the same span whose first vector is 1/√N. */
function startWithIdentity(algebra: BlockAlgebra, span: readonly Float64Array[]): Float64Array[] {
  const one = toCoordinates(algebra, identity(algebra.size));
  const length = norm(one);
  const basis = [one.map((x) => x / length)];
  const rest = span.map((x) => x.slice());
  while (basis.length < span.length) {
    // The vector with the most left outside what is chosen so far; one is dropped in all.
    rest.forEach((x) => {
      for (let pass = 0; pass < 2; pass++) for (const b of basis) subtractComponent(x, b);
    });
    const best = rest.reduce((a, b) => (norm(a) >= norm(b) ? a : b));
    const size = norm(best);
    basis.push(best.map((x) => x / size));
  }
  return basis;
}

function subtractComponent(x: Float64Array, b: Float64Array): void {
  const c = dot(b, x);
  for (let k = 0; k < x.length; k++) x[k] -= c * b[k];
}

function blocksOf(elements: readonly ComplexMatrix[], state: ReferenceState): number[] {
  if (elements.length === 1) return [1];
  try {
    return [...decomposeAlgebra(elements).blocks];
  } catch (error) {
    // Without a faithful invariant state the fixed points need not be an algebra.
    if (!state.faithful && error instanceof ThalwegError && error.code === 'not-an-algebra') return [];
    throw error;
  }
}

function projection(
  algebra: BlockAlgebra,
  right: readonly Float64Array[],
  left: readonly Float64Array[],
): Float64Array {
  requireDenseDimension(algebra, 'a projection stored as a matrix');
  const d = algebra.dimension;
  const factor = projectionFactor(right, left);
  const out = new Float64Array(d * d);
  right.forEach((x, i) => {
    for (let k = 0; k < d; k++) {
      if (x[k] === 0) continue;
      for (let l = 0; l < d; l++) out[k * d + l] += x[k] * factor[i * d + l];
    }
  });
  return out;
}
