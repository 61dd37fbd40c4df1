import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { Generator } from '../generator/generator.js';
import { scaleSparse } from '../generator/lindblad-generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  frobeniusNorm,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
  scale,
  subtract,
} from '../linalg/complex-matrix.js';
import {
  type SparseMatrix,
  type Triplet,
  denseFromSparse,
  sparseAdjoint,
  sparseFromDense,
  sparseFromTriplets,
} from '../linalg/sparse-matrix.js';
import { GIVEN_JUMP_TOLERANCE } from '../tolerances.js';
import type { StoredJump } from './canonical-form.js';
import { basisOf } from './generator-in-basis.js';
import { modularFrequencies } from './modular-frequencies.js';
import type { ReferenceState } from './reference-state.js';
import { stateError } from './state-accuracy.js';

/** The part of a given jump R in one corner. */
interface Corner {
  readonly label: string;
  readonly r: SparseMatrix;
  /** Blocks of the rows and the columns. */
  readonly a: number;
  readonly b: number;
  readonly norm: number;
  readonly frequency: number;
}

/**
 * The given jumps as canonical ones, V = e^{ω/4}R/√2, when they are: no Hamiltonian and no superoperator part, and every corner of
 * every jump modular, traceless (a Hermitian one is made so, which leaves L as it is), orthogonal to the others, and paired with its
 * adjoint up to a phase. Null when any of this fails.
 */
export function givenJumps(g: Generator, state: ReferenceState): StoredJump[] | null {
  if (g.hamiltonian || g.superoperator) return null;
  const corners: Corner[] = [];
  const frequencies = modularFrequencies(state);
  const u = basisOf(state);
  const tolerance = GIVEN_JUMP_TOLERANCE + stateError(state);
  const total = g.jumps.reduce((top, { matrix }) => Math.max(top, sparseNorm(matrix)), 0);
  for (const [m, { label, matrix }] of g.jumps.entries()) {
    const pieces = splitIntoCorners(g.algebra, matrix).filter((c) => sparseNorm(c.r) > GIVEN_JUMP_TOLERANCE * total);
    for (const { r: whole, a, b } of pieces) {
      const r = a === b ? withoutTrace(whole, g.algebra, a) : whole;
      if (!r) return null;
      const norm = sparseNorm(r);
      // A multiple of a block's identity does nothing inside the block.
      if (norm <= GIVEN_JUMP_TOLERANCE * sparseNorm(whole)) continue;
      const frequency = frequencyOf(r, frequencies, u, tolerance * norm);
      if (frequency === null) return null;
      const name = label ?? `V${m + 1}`;
      corners.push({ label: pieces.length > 1 ? `${name}[${a},${b}]` : name, r, a, b, norm, frequency });
    }
  }
  return areOrthogonal(corners) ? paired(corners, tolerance) : null;
}

function splitIntoCorners(algebra: BlockAlgebra, r: SparseMatrix): { r: SparseMatrix; a: number; b: number }[] {
  const { blockOf, blocks } = algebra;
  const parts = new Map<number, Triplet[]>();
  for (const entry of entriesOf(r)) {
    const key = blockOf[entry[0]] * blocks.length + blockOf[entry[1]];
    const list = parts.get(key);
    if (list) list.push(entry);
    else parts.set(key, [entry]);
  }
  return [...parts].map(([key, list]) => ({
    r: sparseFromTriplets(r.rows, r.cols, list),
    a: Math.floor(key / blocks.length),
    b: key % blocks.length,
  }));
}

function* entriesOf(r: SparseMatrix): IterableIterator<Triplet> {
  for (let i = 0; i < r.rows; i++) {
    for (let s = r.rowStart[i]; s < r.rowStart[i + 1]; s++) yield [i, r.colIndex[s], r.re[s], r.im[s]];
  }
}

function sparseNorm(r: SparseMatrix): number {
  return frobeniusNorm({ rows: 1, cols: r.re.length, re: r.re, im: r.im });
}

/** R less its trace part in the block; null when that would change L, because R is not Hermitian up to a phase. */
function withoutTrace(r: SparseMatrix, algebra: BlockAlgebra, block: number): SparseMatrix | null {
  const size = algebra.blocks[block];
  let re = 0;
  let im = 0;
  for (const [i, j, x, y] of entriesOf(r)) {
    if (i !== j) continue;
    re += x / size;
    im += y / size;
  }
  const norm = sparseNorm(r);
  const shift = Math.hypot(re, im) * Math.sqrt(size);
  if (shift <= GIVEN_JUMP_TOLERANCE * norm) return r;
  const entries = [...entriesOf(r)];
  for (let i = 0; i < size; i++) entries.push([algebra.offsets[block] + i, algebra.offsets[block] + i, -re, -im]);
  const rest = sparseFromTriplets(r.rows, r.cols, entries);
  if (sparseNorm(rest) <= GIVEN_JUMP_TOLERANCE * norm) return rest;
  // With the phase of its trace removed, a jump that is Hermitian up to a phase is Hermitian.
  const turned = scale(denseFromSparse(r), re, -im);
  const skew = frobeniusNorm(subtract(turned, adjoint(turned)));
  return skew <= GIVEN_JUMP_TOLERANCE * frobeniusNorm(turned) ? rest : null;
}

/** The one frequency that R has in the eigenbasis of σ, or null. */
function frequencyOf(
  r: SparseMatrix,
  frequencies: Float64Array,
  u: ComplexMatrix | null,
  tolerance: number,
): number | null {
  const entries = u ? entriesOf(sparseFromDense(rotated(r, u))) : entriesOf(r);
  const weights = new Map<number, number>();
  for (const [i, j, x, y] of entries) {
    const w = frequencies[i * r.cols + j];
    weights.set(w, (weights.get(w) ?? 0) + x * x + y * y);
  }
  let best = 0;
  let most = -1;
  let sum = 0;
  for (const [w, weight] of weights) {
    sum += weight;
    if (weight <= most) continue;
    best = w;
    most = weight;
  }
  return Math.sqrt(Math.max(0, sum - most)) <= tolerance ? best : null;
}

function rotated(r: SparseMatrix, u: ComplexMatrix): ComplexMatrix {
  return multiplyAdjointFirst(u, multiply(denseFromSparse(r), u));
}

/** Different corners are orthogonal anyway. */
function areOrthogonal(corners: readonly Corner[]): boolean {
  const groups = new Map<string, Corner[]>();
  for (const corner of corners) {
    const key = `${corner.a} ${corner.b}`;
    const list = groups.get(key) ?? [];
    if (list.some((other) => Math.abs(overlap(corner.r, other.r)) > GIVEN_JUMP_TOLERANCE * corner.norm * other.norm)) {
      return false;
    }
    list.push(corner);
    groups.set(key, list);
  }
  return true;
}

/** |Tr R*S| of two sparse matrices. */
function overlap(r: SparseMatrix, s: SparseMatrix): number {
  let re = 0;
  let im = 0;
  for (let i = 0; i < r.rows; i++) {
    let q = s.rowStart[i];
    for (let p = r.rowStart[i]; p < r.rowStart[i + 1]; p++) {
      while (q < s.rowStart[i + 1] && s.colIndex[q] < r.colIndex[p]) q++;
      if (q === s.rowStart[i + 1]) break;
      if (s.colIndex[q] !== r.colIndex[p]) continue;
      re += r.re[p] * s.re[q] + r.im[p] * s.im[q];
      im += r.re[p] * s.im[q] - r.im[p] * s.re[q];
    }
  }
  return Math.hypot(re, im);
}

/** V_j with partners: V_m = V_j* exactly wherever R_m = e^{iθ}e^{ω_j/2}R_j*. Null when some jump has none. */
function paired(corners: readonly Corner[], tolerance: number): StoredJump[] | null {
  const partners = findPartners(corners, tolerance);
  if (!partners) return null;
  const jumps: StoredJump[] = [];
  corners.forEach(({ label, r, norm, frequency }, j) => {
    const partner = partners[j];
    const factor = Math.exp(frequency / 4) * Math.SQRT1_2;
    if (partner < j) {
      jumps.push({
        ...jumps[partner],
        label,
        sparse: sparseAdjoint(jumps[partner].sparse),
        frequency: 0 - jumps[partner].frequency,
        partner,
      });
      return;
    }
    const v = partner === j ? selfAdjointPart(r, factor) : scaleSparse(r, factor);
    jumps.push({ label, sparse: v, frequency: partner === j ? 0 : frequency, partner, norm: factor * norm });
  });
  return jumps;
}

function findPartners(corners: readonly Corner[], tolerance: number): Int32Array | null {
  const partners = new Int32Array(corners.length).fill(-1);
  const places = new Map<string, number[]>();
  corners.forEach(({ a, b }, j) => places.set(`${a} ${b}`, [...(places.get(`${a} ${b}`) ?? []), j]));
  for (let j = 0; j < corners.length; j++) {
    if (partners[j] >= 0) continue;
    const { r, a, b, norm, frequency } = corners[j];
    const wanted = sparseAdjoint(r);
    const expected = Math.exp(frequency / 2) * norm;
    const m = (places.get(`${b} ${a}`) ?? []).find((k) => {
      if (partners[k] >= 0) return false;
      const other = corners[k].norm;
      const matches = Math.abs(overlap(wanted, corners[k].r) - norm * other) <= GIVEN_JUMP_TOLERANCE * norm * other;
      return matches && Math.abs(other - expected) <= tolerance * expected;
    });
    if (m === undefined) return null;
    partners[j] = m;
    partners[m] = j;
  }
  return partners;
}

/** factor · R with its phase removed, exactly self-adjoint. */
function selfAdjointPart(r: SparseMatrix, factor: number): SparseMatrix {
  const dense = denseFromSparse(r);
  // Tr R² = e^{2iθ}‖R‖² for R = e^{iθ}S with S self-adjoint.
  const square = innerProduct(adjoint(dense), dense);
  const angle = -Math.atan2(square.im, square.re) / 2;
  const turned = Math.abs(angle) > GIVEN_JUMP_TOLERANCE ? scale(dense, Math.cos(angle), Math.sin(angle)) : dense;
  return sparseFromDense(scale(addScaledInto(adjoint(turned), turned, 1), factor / 2));
}
