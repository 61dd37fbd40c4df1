import { ThalwegError } from '../errors.js';
import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  copy,
  frobeniusNorm,
  hermitianPart,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
  scale,
  zeros,
} from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import { type Random, seededRandom } from '../random.js';
import { ALGEBRA_TOLERANCE, CLUSTER_TOLERANCE } from '../tolerances.js';
import { blockAlgebra, projectToAlgebra } from './block-algebra.js';

/** A *-algebra 𝒜 ∋ 1 of N×N matrices as ⊕_b M_{n_b} ⊗ 1_{m_b}, blocks ascending by n_b, then by m_b. */
export interface AlgebraDecomposition {
  /** n_1 ≤ n_2 ≤ … */
  readonly blocks: readonly number[];
  /** m_b, so that Σ n_b m_b = N. */
  readonly multiplicities: readonly number[];
  /** Minimal central projections, N×N. */
  readonly centralProjections: readonly ComplexMatrix[];
  /**
   * W, N × Σ n_b with W*W = 1: A ↦ W*AW is the *-isomorphism of 𝒜 onto block-diagonal matrices with blocks n_b. Column
   * (b,i) spans one copy of the i-th basis vector of block b.
   */
  readonly isometry: ComplexMatrix;
}

const ATTEMPTS = 6;

/**
 * Block structure of the *-algebra that the given N×N matrices span (not only generate). The spectral projections of a
 * generic Hermitian element are minimal; two of them lie in one block exactly when a generic element joins them, and
 * its corner there is a multiple of a partial isometry. Generic elements come from a fixed seed, so the result is
 * reproducible. `dimension` is that of the span, where it is known. Throws `not-an-algebra` when the span is no
 * *-algebra with 1 (to ALGEBRA_TOLERANCE).
 */
export function decomposeAlgebra(
  spanning: readonly ComplexMatrix[],
  dimension = spanDimension(spanning),
): AlgebraDecomposition {
  const random = seededRandom('generic element of an algebra');
  for (let attempt = 0; attempt < ATTEMPTS; attempt++) {
    const found = attemptDecomposition(spanning, random);
    if (!found || found.blocks.reduce((sum, n) => sum + n * n, 0) !== dimension) continue;
    if (spanning.every((a) => isRepresented(found, a))) return found;
  }
  throw new ThalwegError(
    'not-an-algebra',
    `expected matrices that span a *-algebra with identity, got a span of dimension ${dimension} without such a structure`,
    { details: { dimension } },
  );
}

interface Part {
  /** Orthonormal columns f_i, one for each i of the block. */
  readonly columns: ComplexMatrix[];
  readonly multiplicity: number;
  readonly central: ComplexMatrix;
}

function attemptDecomposition(spanning: readonly ComplexMatrix[], random: Random): AlgebraDecomposition | null {
  const clusters = spectralClusters(genericElement(spanning, random));
  const y = genericElement(spanning, random);
  const parts: Part[] = [];
  const free = new Set(clusters.keys());
  for (const first of clusters.keys()) {
    if (!free.delete(first)) continue;
    const part = growBlock(clusters, first, free, y);
    if (!part) return null;
    parts.push(part);
  }
  parts.sort((p, q) => p.columns.length - q.columns.length || p.multiplicity - q.multiplicity);
  return {
    blocks: parts.map((p) => p.columns.length),
    multiplicities: parts.map((p) => p.multiplicity),
    centralProjections: parts.map((p) => p.central),
    isometry: sideBySide(parts.flatMap((p) => p.columns)),
  };
}

/** The reduced blocks of A into ⊕_b M_{n_b}: W*AW, exactly block-diagonal. */
export function reduceToBlocks(decomposition: AlgebraDecomposition, a: ComplexMatrix): ComplexMatrix {
  const { isometry, blocks } = decomposition;
  return projectToAlgebra(blockAlgebra(blocks), multiplyAdjointFirst(isometry, multiply(a, isometry)));
}

/** An element has ‖A‖² = Σ_b m_b‖A_b‖², since each block occurs m_b times and nothing lies outside. */
function isRepresented(decomposition: AlgebraDecomposition, a: ComplexMatrix): boolean {
  const reduced = reduceToBlocks(decomposition, a);
  const { blockOf } = blockAlgebra(decomposition.blocks);
  let sum = 0;
  for (let k = 0; k < reduced.re.length; k++) {
    const multiplicity = decomposition.multiplicities[blockOf[Math.floor(k / reduced.cols)]];
    sum += multiplicity * (reduced.re[k] ** 2 + reduced.im[k] ** 2);
  }
  const size = frobeniusNorm(a) ** 2;
  return Math.abs(sum - size) <= ALGEBRA_TOLERANCE * size;
}

/** All clusters joined to `first` by Y; null when a corner is not a multiple of an isometry, so that Y was not generic. */
function growBlock(clusters: ComplexMatrix[], first: number, free: Set<number>, y: ComplexMatrix): Part | null {
  const start = clusters[first];
  const seed = firstColumn(start);
  const columns = [seed];
  let central = multiply(start, adjoint(start));
  for (const other of [...free]) {
    // U_j*YU_1 = c·(unitary) when the two minimal projections are equivalent, 0 otherwise.
    const corner = multiplyAdjointFirst(clusters[other], multiply(y, start));
    const strength = frobeniusNorm(corner);
    if (strength <= ALGEBRA_TOLERANCE * frobeniusNorm(y)) continue;
    if (clusters[other].cols !== start.cols) return null;
    free.delete(other);
    const image = multiply(clusters[other], multiply(corner, multiplyAdjointFirst(start, seed)));
    columns.push(scale(image, 1 / frobeniusNorm(image)));
    central = addScaledInto(central, multiply(clusters[other], adjoint(clusters[other])), 1);
  }
  return { columns, multiplicity: start.cols, central };
}

/** Orthonormal columns for each group of nearly equal eigenvalues of a Hermitian matrix. */
function spectralClusters(x: ComplexMatrix): ComplexMatrix[] {
  const { values, vectors } = hermitianEigen(x);
  const n = values.length;
  const gap = CLUSTER_TOLERANCE * Math.max(Math.abs(values[0]), Math.abs(values[n - 1]));
  const clusters: ComplexMatrix[] = [];
  let start = 0;
  for (let k = 1; k <= n; k++) {
    if (k < n && values[k] - values[k - 1] <= gap) continue;
    clusters.push(columnRange(vectors, start, k));
    start = k;
  }
  return clusters;
}

/** A Hermitian element with random coefficients; products make it generic even when the span has a special basis. */
function genericElement(spanning: readonly ComplexMatrix[], random: Random): ComplexMatrix {
  const n = spanning[0].rows;
  const x = zeros(n);
  for (const a of spanning) addScaledInto(x, a, random.normal(), random.normal());
  return hermitianPart(x);
}

/** Dimension over C of the span, by pivoted Gram–Schmidt on the matrices as vectors. */
function spanDimension(spanning: readonly ComplexMatrix[]): number {
  const basis: ComplexMatrix[] = [];
  for (const a of spanning) {
    const size = frobeniusNorm(a);
    let rest = a;
    for (let pass = 0; pass < 2; pass++) rest = removeComponents(rest, basis);
    const left = frobeniusNorm(rest);
    if (left > ALGEBRA_TOLERANCE * size) basis.push(scale(rest, 1 / left));
  }
  return basis.length;
}

function removeComponents(a: ComplexMatrix, basis: readonly ComplexMatrix[]): ComplexMatrix {
  const rest = copy(a);
  for (const b of basis) {
    const c = innerProduct(b, rest);
    addScaledInto(rest, b, -c.re, -c.im);
  }
  return rest;
}

function firstColumn(a: ComplexMatrix): ComplexMatrix {
  return columnRange(a, 0, 1);
}

function columnRange(a: ComplexMatrix, from: number, to: number): ComplexMatrix {
  const out = zeros(a.rows, to - from);
  for (let i = 0; i < a.rows; i++) {
    for (let j = from; j < to; j++) {
      out.re[i * out.cols + j - from] = a.re[i * a.cols + j];
      out.im[i * out.cols + j - from] = a.im[i * a.cols + j];
    }
  }
  return out;
}

function sideBySide(columns: readonly ComplexMatrix[]): ComplexMatrix {
  const out = zeros(columns[0].rows, columns.length);
  columns.forEach((c, j) => {
    for (let i = 0; i < out.rows; i++) {
      out.re[i * out.cols + j] = c.re[i];
      out.im[i * out.cols + j] = c.im[i];
    }
  });
  return out;
}
