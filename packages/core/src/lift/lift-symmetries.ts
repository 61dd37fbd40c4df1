import {
  type ComplexMatrix,
  conjugate,
  frobeniusNorm,
  innerProduct,
  multiply,
  multiplyAdjointSecond,
  zeros,
} from '../linalg/complex-matrix.js';
import { nullSpaceReal } from '../linalg/null-space.js';
import { JUMP_SYMMETRY_TOLERANCE } from '../tolerances.js';
import type { LiftModel } from './lift-jumps.js';
import type { Charges } from './lift-terms.js';

/** A unitary (or antiunitary) U with U V_j U* = χ_j V_π(j) (conj V_j when anti): it permutes the jumps up to phases. */
export interface JumpSymmetry {
  readonly permutation: Int32Array;
  readonly phaseRe: Float64Array;
  readonly phaseIm: Float64Array;
  readonly anti: boolean;
}

/** Those of a list of candidate unitaries that permute the jumps up to phases, linear and antilinear. */
export function jumpSymmetries(model: LiftModel, candidates: readonly ComplexMatrix[]): JumpSymmetry[] {
  const out: JumpSymmetry[] = [];
  for (const u of candidates) {
    for (const anti of [false, true]) {
      const found = permuted(model, u, anti);
      if (found && !isTrivial(found)) out.push(found);
    }
  }
  return out;
}

function permuted({ jumps }: LiftModel, u: ComplexMatrix, anti: boolean): JumpSymmetry | null {
  const count = jumps.length;
  const permutation = new Int32Array(count).fill(-1);
  const phaseRe = new Float64Array(count);
  const phaseIm = new Float64Array(count);
  const taken = new Uint8Array(count);
  const norms = jumps.map((jump) => frobeniusNorm(jump.matrix));
  for (let j = 0; j < count; j++) {
    const v = anti ? conjugate(jumps[j].matrix) : jumps[j].matrix;
    const image = multiplyAdjointSecond(multiply(u, v), u);
    for (let k = 0; k < count; k++) {
      if (taken[k] || Math.abs(norms[j] - norms[k]) > JUMP_SYMMETRY_TOLERANCE * norms[j]) continue;
      if (
        Math.abs(jumps[j].frequency - jumps[k].frequency) >
        JUMP_SYMMETRY_TOLERANCE * (1 + Math.abs(jumps[k].frequency))
      )
        continue;
      const overlap = innerProduct(jumps[k].matrix, image);
      const size = norms[k] * norms[k];
      if (Math.abs(Math.hypot(overlap.re, overlap.im) - size) > JUMP_SYMMETRY_TOLERANCE * size) continue;
      permutation[j] = k;
      taken[k] = 1;
      const modulus = Math.hypot(overlap.re, overlap.im);
      phaseRe[j] = overlap.re / modulus;
      phaseIm[j] = overlap.im / modulus;
      break;
    }
    if (permutation[j] < 0) return null;
  }
  return { permutation, phaseRe, phaseIm, anti };
}

function isTrivial({ permutation, phaseRe, anti }: JumpSymmetry): boolean {
  return (
    !anti && permutation.every((k, j) => k === j) && phaseRe.every((x) => Math.abs(x - 1) <= JUMP_SYMMETRY_TOLERANCE)
  );
}

/**
 * Charges of the jumps under the diagonal unitaries that multiply every jump by a phase: θ with θ_a − θ_b the same for all
 * non-zero entries (a,b) of each V_j. One charge vector for each independent θ.
 */
export function diagonalCharges({ jumps, algebra }: LiftModel): Charges {
  const n = algebra.size;
  const rows: number[][] = [];
  const places = jumps.map(({ matrix }) => entriesOf(matrix));
  for (const entries of places) {
    const [a0, b0] = entries[0];
    for (const [a, b] of entries.slice(1)) {
      const row = new Array<number>(n).fill(0);
      row[a] += 1;
      row[b] -= 1;
      row[a0] -= 1;
      row[b0] += 1;
      if (row.some((x) => x !== 0)) rows.push(row);
    }
  }
  const thetas =
    rows.length === 0
      ? identityColumns(n)
      : columnsOf(nullSpaceReal(Float64Array.from(rows.flat()), rows.length, n, 1e-12).basis, n);
  const charges = thetas.map((theta) => Float64Array.from(places, ([[a, b]]) => theta[a] - theta[b]));
  return charges.filter((charge) => charge.some((x) => Math.abs(x) > JUMP_SYMMETRY_TOLERANCE));
}

function entriesOf(a: ComplexMatrix): [number, number][] {
  const n = a.rows;
  const top = frobeniusNorm(a);
  const out: [number, number][] = [];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      if (Math.hypot(a.re[i * n + j], a.im[i * n + j]) > 1e-12 * top) out.push([i, j]);
    }
  }
  return out;
}

function identityColumns(n: number): Float64Array[] {
  return Array.from({ length: n }, (_, k) => Float64Array.from({ length: n }, (__, i) => (i === k ? 1 : 0)));
}

function columnsOf(basis: Float64Array, n: number): Float64Array[] {
  const count = basis.length / n;
  return Array.from({ length: count }, (_, k) => Float64Array.from({ length: n }, (__, i) => basis[i * count + k]));
}

/** Unitaries worth trying: shift and clock, Fourier and quadratic phases, qubit gates, permutations of points. */
export function candidateUnitaries(model: LiftModel): ComplexMatrix[] {
  const { algebra } = model;
  const n = algebra.size;
  const out: ComplexMatrix[] = [diagonalPhases(n, () => 0)];
  if (algebra.blocks.length === 1) {
    out.push(
      permutationMatrix(n, (i) => (i + 1) % n),
      diagonalPhases(n, (k) => k / n),
    );
    if (n <= 8)
      out.push(
        fourier(n),
        diagonalPhases(n, (k) => (n % 2 === 0 ? (k * k) / (2 * n) : (k * (k + 1)) / (2 * n))),
      );
  } else {
    out.push(permutationMatrix(n, (i) => (i + 1) % n));
  }
  out.push(permutationMatrix(n, (i) => n - 1 - i));
  const qubits = Math.log2(n);
  if (Number.isInteger(qubits) && qubits >= 1) out.push(...qubitCandidates(qubits, algebra.blocks.length === 1));
  if (n <= 8)
    for (let i = 0; i + 1 < n; i++) out.push(permutationMatrix(n, (k) => (k === i ? i + 1 : k === i + 1 ? i : k)));
  return out;
}

function qubitCandidates(qubits: number, withGates: boolean): ComplexMatrix[] {
  const n = 2 ** qubits;
  const out: ComplexMatrix[] = [];
  for (let q = 0; q < qubits; q++) {
    const bit = 1 << (qubits - 1 - q);
    out.push(permutationMatrix(n, (i) => i ^ bit));
    if (withGates) {
      out.push(
        diagonalPhases(n, (k) => (k & bit ? 0.5 : 0)),
        diagonalPhases(n, (k) => (k & bit ? 0.25 : 0)),
        hadamard(n, bit),
      );
    }
    if (q + 1 < qubits) {
      const next = bit >> 1;
      out.push(permutationMatrix(n, (i) => ((i & bit ? 1 : 0) === (i & next ? 1 : 0) ? i : i ^ bit ^ next)));
    }
  }
  return out;
}

function permutationMatrix(n: number, to: (i: number) => number): ComplexMatrix {
  const u = zeros(n);
  for (let i = 0; i < n; i++) u.re[to(i) * n + i] = 1;
  return u;
}

/** diag(e^{2πi f(k)}). */
function diagonalPhases(n: number, turn: (k: number) => number): ComplexMatrix {
  const u = zeros(n);
  for (let k = 0; k < n; k++) {
    u.re[k * n + k] = Math.cos(2 * Math.PI * turn(k));
    u.im[k * n + k] = Math.sin(2 * Math.PI * turn(k));
  }
  return u;
}

function fourier(n: number): ComplexMatrix {
  const u = zeros(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      u.re[i * n + j] = Math.cos((2 * Math.PI * i * j) / n) / Math.sqrt(n);
      u.im[i * n + j] = Math.sin((2 * Math.PI * i * j) / n) / Math.sqrt(n);
    }
  }
  return u;
}

function hadamard(n: number, bit: number): ComplexMatrix {
  const u = zeros(n);
  for (let i = 0; i < n; i++) {
    u.re[i * n + i] = (i & bit ? -1 : 1) * Math.SQRT1_2;
    u.re[(i ^ bit) * n + i] = Math.SQRT1_2;
  }
  return u;
}
