import { add, adjoint, scale, subtract } from '../matrix/arithmetic.js';
import { type Matrix } from '../matrix/matrix.js';
import { kron } from '../matrix/products.js';
import { matrixUnit } from '../matrix/special.js';
import { pauli } from './pauli.js';
import { requireWhole } from '../require.js';

const MOST_MODES = 10;

/**
 * Annihilation operator of mode k = 0…m−1 by the Jordan–Wigner transformation: Z ⊗ … ⊗ Z ⊗ |0><1| ⊗ 1 ⊗ …; occupied is e_1.
 * They satisfy {a_k, a_l*} = δ_kl and {a_k, a_l} = 0.
 */
export function fermionAnnihilation(modes: number, k: number): Matrix {
  requireWhole(modes, 1, MOST_MODES, 'the number of modes');
  requireWhole(k, 0, modes - 1, 'the mode');
  const before = k > 0 ? [pauli('Z'.repeat(k))] : [];
  const after = k < modes - 1 ? [pauli('I'.repeat(modes - 1 - k))] : [];
  return kron(...before, matrixUnit(2, 0, 1), ...after);
}

/** Creation operator, the adjoint of the annihilation operator. */
export function fermionCreation(modes: number, k: number): Matrix {
  return adjoint(fermionAnnihilation(modes, k));
}

/** Majorana operators k = 0…2m−1, self-adjoint with square 1, anticommuting: a_j + a_j* for k = 2j, (a_j − a_j*)/i for k = 2j+1. */
export function majorana(modes: number, k: number): Matrix {
  requireWhole(modes, 1, MOST_MODES, 'the number of modes');
  requireWhole(k, 0, 2 * modes - 1, 'the index');
  const a = fermionAnnihilation(modes, Math.floor(k / 2));
  if (k % 2 === 0) return add(a, adjoint(a));
  return scale({ re: 0, im: -1 }, subtract(a, adjoint(a)));
}
