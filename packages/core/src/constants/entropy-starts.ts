import { toCoordinates } from '../algebra/block-algebra.js';
import { amplifyOperator } from '../entropy/amplify.js';
import type { EntropyModel } from '../entropy/entropy-model.js';
import { type ComplexMatrix, addScaledInto, copy, zeros } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { type Random, seededRandom } from '../random.js';
import type { ReferenceState } from '../structure/reference-state.js';
import type { Structure } from '../structure/structure.js';
import { GAP_START_LIMIT } from '../tolerances.js';
import { isUnitarilyCovariant } from './covariance.js';
import type { EntropyStart } from './entropy-search.js';
import { gapDense } from './gap.js';

export interface EntropySearchOptions {
  /** Seed of the random starts; the same seed gives the same list. */
  readonly seed: number | string;
  /** Random starts beside the structured ones; default 6. */
  readonly randomStarts?: number;
}

/**
 * Starts of a search, structured ones first: tilts s·A of log σ by the gap's eigenvector, by eigenprojections of σ (nearly
 * pure states), by their sums (two-level spectra), by a superposition of eigenvectors; with an ancilla by entangled
 * vectors, which mixes them with a product state; then seeded random tilts of several sizes.
 */
export function entropyStarts(
  structure: Structure,
  model: EntropyModel,
  state: ReferenceState,
  constant: EntropyStart['constant'],
  { seed, randomStarts = 6 }: EntropySearchOptions,
): EntropyStart[] {
  const k = model.amplification;
  const diagonal = k === 1 && isUnitarilyCovariant(structure.generator);
  const starts: EntropyStart[] = [];
  const push = (label: string, tilt: ComplexMatrix, size: number): void => {
    const h = addScaledInto(copy(model.logSigma), tilt, size);
    const n = h.rows;
    const x = diagonal ? Array.from({ length: n }, (_, i) => h.re[i * n + i]) : [...toCoordinates(model.algebra, h)];
    starts.push({ constant, amplification: k, diagonal, label, x });
  };
  for (const { label, tilt, sizes } of [
    ...innerTilts(structure, state, diagonal, k),
    ...entangledTilts(structure, state, k),
  ]) {
    for (const size of sizes) push(label, tilt, size);
  }
  const random = seededRandom(`${constant}:${k}:${seed}`);
  for (let i = 0; i < randomStarts; i++)
    push('random', randomTilt(model, random), RANDOM_SIZES[i % RANDOM_SIZES.length]);
  return starts;
}

/** Sizes of random tilts in units of the logarithm of an eigenvalue: near σ, intermediate, far. */
const RANDOM_SIZES = [1.5, 0.5, 4];

interface Tilt {
  readonly label: string;
  /** Hermitian in M ⊗ M_k. */
  readonly tilt: ComplexMatrix;
  readonly sizes: readonly number[];
}

/** Tilts of M alone; fewer of them when an ancilla is there, where they only reproduce the search without it. */
function innerTilts(structure: Structure, state: ReferenceState, diagonal: boolean, k: number): Tilt[] {
  const tilts: Tilt[] = [];
  const n = structure.algebra.size;
  const add = (label: string, a: ComplexMatrix, sizes: readonly number[]): void => {
    tilts.push({ label, tilt: amplifyOperator(a, k), sizes });
  };
  if (!diagonal || structure.algebra.blocks.length > 1) {
    const direction = gapDirection(structure, state);
    if (direction) add('gap eigenvector', direction, k === 1 ? [0.5, -0.5, 2, -2] : [1, -1]);
  }
  if (k > 1) return tilts;
  for (let m = 1; m < Math.min(n, SPECTRUM_STARTS); m++) {
    add(
      'two-level spectrum',
      projection(state, (i) => i < m),
      [2, -2, 6],
    );
  }
  for (let i = 1; i < Math.min(n, EIGENSTATE_STARTS); i++) {
    if (!diagonal || structure.algebra.blocks.length > 1)
      add(
        'eigenstate',
        projection(state, (j) => j === i),
        [4],
      );
  }
  if (!diagonal)
    add(
      'superposition',
      superposition(structure, state, () => 1),
      [2, 6],
    );
  return tilts;
}

/** Limits on structured starts of one kind. */
const SPECTRUM_STARTS = 8;
const EIGENSTATE_STARTS = 5;

/** Projections on Σ_i √w_i v_i ⊗ e_i over one block, uniform w and w = σ. */
function entangledTilts(structure: Structure, state: ReferenceState, k: number): Tilt[] {
  if (k === 1) return [];
  const { algebra } = structure;
  return algebra.blocks.flatMap((size, b) => {
    if (size === 1) return [];
    const members = (i: number): boolean => algebra.blockOf[i] === b && i - algebra.offsets[b] < k;
    const weights = [(): number => 1, (i: number): number => state.values[i]];
    return weights.map((weight) => ({
      label: 'entangled',
      tilt: entangledProjection(state, k, (i) => (members(i) ? weight(i) : 0), algebra.offsets[b]),
      sizes: [2, 5, 10],
    }));
  });
}

function entangledProjection(
  { vectors }: ReferenceState,
  k: number,
  weight: (i: number) => number,
  offset: number,
): ComplexMatrix {
  const n = vectors.rows;
  const psi = zeros(n * k, 1);
  for (let i = 0; i < n; i++) {
    const w = Math.sqrt(weight(i));
    if (!(w > 0)) continue;
    for (let row = 0; row < n; row++) {
      psi.re[row * k + i - offset] += w * vectors.re[row * n + i];
      psi.im[row * k + i - offset] += w * vectors.im[row * n + i];
    }
  }
  return rankOne(psi);
}

/** Σ over chosen i of |v_i><v_i|. */
function projection({ vectors }: ReferenceState, chosen: (i: number) => boolean): ComplexMatrix {
  const n = vectors.rows;
  const out = zeros(n);
  for (let i = 0; i < n; i++) if (chosen(i)) addScaledInto(out, rankOne(column(vectors, i)), 1);
  return out;
}

/** Projection on the sum of all eigenvectors of the largest block. */
function superposition({ algebra }: Structure, { vectors }: ReferenceState, weight: () => number): ComplexMatrix {
  const n = vectors.rows;
  const largest = algebra.blocks.indexOf(Math.max(...algebra.blocks));
  const psi = zeros(n, 1);
  for (let i = 0; i < n; i++) {
    if (algebra.blockOf[i] === largest) addScaledInto(psi, column(vectors, i), weight());
  }
  return rankOne(psi);
}

function column(u: ComplexMatrix, i: number): ComplexMatrix {
  const n = u.rows;
  const out = zeros(n, 1);
  for (let row = 0; row < n; row++) {
    out.re[row] = u.re[row * u.cols + i];
    out.im[row] = u.im[row * u.cols + i];
  }
  return out;
}

/** |ψ><ψ| / <ψ|ψ>. */
function rankOne(psi: ComplexMatrix): ComplexMatrix {
  const n = psi.rows;
  const out = zeros(n);
  let norm = 0;
  for (let i = 0; i < n; i++) norm += psi.re[i] ** 2 + psi.im[i] ** 2;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      out.re[i * n + j] = (psi.re[i] * psi.re[j] + psi.im[i] * psi.im[j]) / norm;
      out.im[i * n + j] = (psi.im[i] * psi.re[j] - psi.re[i] * psi.im[j]) / norm;
    }
  }
  return out;
}

/** The gap's eigenvector scaled to operator norm one; null when it is not there or too dear. */
function gapDirection({ generator, algebra, fixedPoints }: Structure, state: ReferenceState): ComplexMatrix | null {
  if (!fixedPoints || algebra.dimension > GAP_START_LIMIT) return null;
  const { value, observable } = gapDense(generator, state, fixedPoints);
  if (!Number.isFinite(value)) return null;
  const norm = Math.max(...hermitianEigenvalues(observable).map(Math.abs));
  return norm > 0 ? addScaledInto(zeros(algebra.size), observable, 1 / norm) : null;
}

/** Gaussian Hermitian element, entries of variance about one. */
function randomTilt({ algebra }: EntropyModel, random: Random): ComplexMatrix {
  const { size: n, blockOf } = algebra;
  const out = zeros(n);
  for (let i = 0; i < n; i++) {
    out.re[i * n + i] = random.normal();
    for (let j = i + 1; j < n; j++) {
      if (blockOf[i] !== blockOf[j]) continue;
      const re = random.normal() * Math.SQRT1_2;
      const im = random.normal() * Math.SQRT1_2;
      out.re[i * n + j] = out.re[j * n + i] = re;
      out.im[i * n + j] = im;
      out.im[j * n + i] = -im;
    }
  }
  return out;
}
