import { blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import { lindbladGenerator } from '../generator/lindblad-generator.js';
import { MAX_TENSOR_SIZE } from '../generator/tensor-algebra.js';
import { type SparseMatrix, type Triplet, sparseFromTriplets } from '../linalg/sparse-matrix.js';

/**
 * Number operator of m self-adjoint unitaries with x_ix_j = signs_ij x_jx_i (i≠j): L x_A = −|A| x_A on products of distinct x_i, the
 * finite models of q-Gaussian number operators (Speicher, Math. Z. 209 (1992); Biane, Commun. Math. Phys. 184 (1997)).
 * Spectrum of −L: k with multiplicity binomial(m,k). The m×m signs are ±1 and symmetric; the diagonal is not read.
 *
 * Realisation: the sign flip α_j of x_j alone is A ↦ U_jAU_j for a self-adjoint unitary U_j, and Σ_j ½(α_j − id) = L. A symplectic
 * Gram–Schmidt over F₂ turns the x_i into r anticommuting pairs, written as X and Z of r qubits, and c = m − 2r central elements,
 * the coordinates of 2^c blocks; U_j is a Pauli string on the qubits times a permutation of the blocks.
 * Throws `usage` for bad signs, `too-large` when 2^(r+c) > 1024.
 */
export function mixedSpinSystem(signs: readonly (readonly number[])[]): Generator {
  requireSigns(signs);
  const { pairs, central } = symplecticBasis(signs);
  const r = pairs.length;
  const c = central.length;
  if (2 ** (r + c) > MAX_TENSOR_SIZE) {
    throw new ThalwegError('too-large', `expected matrices of size at most ${MAX_TENSOR_SIZE}, got 2^${r + c}`);
  }
  return lindbladGenerator({
    algebra: blockAlgebra(new Array<number>(2 ** c).fill(2 ** r)),
    jumps: signs.map((_, j) => ({
      label: `x${j + 1}`,
      rate: 0.5,
      matrix: signFlip(
        pairs.map(([u, v]) => [hasBit(u, j), hasBit(v, j)]),
        central.map((z) => hasBit(z, j)),
      ),
    })),
  });
}

/** Products of the x_i as sets of indices (bit masks): r pairs that anticommute with each other only, and a basis of the centre. */
interface SymplecticBasis {
  readonly pairs: readonly (readonly [number, number])[];
  readonly central: readonly number[];
}

function symplecticBasis(signs: readonly (readonly number[])[]): SymplecticBasis {
  const anticommute = (u: number, v: number): boolean => {
    let odd = false;
    signs.forEach((row, i) =>
      row.forEach((s, j) => (odd = odd !== (i !== j && s < 0 && hasBit(u, i) && hasBit(v, j)))),
    );
    return odd;
  };
  const pairs: [number, number][] = [];
  const central: number[] = [];
  let rest = signs.map((_, j) => 1 << j);
  while (rest.length > 0) {
    const [u, ...others] = rest;
    const v = others.find((w) => anticommute(u, w));
    if (v === undefined) {
      central.push(u);
      rest = others;
      continue;
    }
    pairs.push([u, v]);
    rest = others.filter((w) => w !== v).map((w) => w ^ (anticommute(w, v) ? u : 0) ^ (anticommute(w, u) ? v : 0));
  }
  return { pairs, central };
}

/**
 * The unitary that changes the signs asked for: on qubit k, Z changes that of X (u), X that of Z (v), Y both; on a central
 * coordinate the blocks are exchanged. Block bits are the leading ones of an index.
 */
function signFlip(flips: readonly (readonly [boolean, boolean])[], exchanged: readonly boolean[]): SparseMatrix {
  const bits = flips.length + exchanged.length;
  const n = 2 ** bits;
  const triplets: Triplet[] = [];
  for (let column = 0; column < n; column++) {
    let row = column;
    let quarterTurns = 0;
    exchanged.forEach((flip, k) => {
      if (flip) row ^= 1 << (bits - 1 - k);
    });
    flips.forEach(([u, v], k) => {
      const bit = 1 << (flips.length - 1 - k);
      const one = (column & bit) !== 0;
      if (v) row ^= bit;
      if (u && !v && one) quarterTurns += 2;
      if (u && v) quarterTurns += one ? 3 : 1;
    });
    const turn = quarterTurns % 4;
    triplets.push([row, column, turn === 0 ? 1 : turn === 2 ? -1 : 0, turn === 1 ? 1 : turn === 3 ? -1 : 0]);
  }
  return sparseFromTriplets(n, n, triplets);
}

function hasBit(mask: number, j: number): boolean {
  return (mask & (1 << j)) !== 0;
}

function requireSigns(signs: readonly (readonly number[])[]): void {
  const m = signs.length;
  if (m === 0 || m > 20) throw new ThalwegError('usage', `expected from 1 to 20 rows of signs, got ${m}`);
  signs.forEach((row, i) => {
    if (row.length !== m) throw new ThalwegError('usage', `expected ${m} signs in row ${i}, got ${row.length}`);
    row.forEach((s, j) => {
      if (i === j || (Math.abs(s) === 1 && s === signs[j][i])) return;
      throw new ThalwegError(
        'usage',
        `expected symmetric signs ±1, got ${s} at (${i}, ${j}) and ${signs[j][i]} at (${j}, ${i})`,
      );
    });
  });
}
