import { type MatrixUnits, matrixUnits } from '../algebra/matrix-units.js';
import { type ComplexMatrix, addScaledInto, zeros } from '../linalg/complex-matrix.js';
import type { SparseMatrix } from '../linalg/sparse-matrix.js';
import type { Generator } from './generator.js';
import { hermitianToUnits } from './hermitian-units.js';

/** A linear map of the algebra in matrix units. */
export interface UnitForm {
  readonly units: MatrixUnits;
  /** D×D, entry (p,q) the coefficient of unit p in the image of unit q: [L(e_kk')]_{ll'} at p = index(l,l'), q = index(k,k'). */
  readonly matrix: ComplexMatrix;
}

/**
 * L in the matrix units of the document's basis, put together jump by jump: R adds conj(R_kl)R_k'l' to [L(e_kk')]_{ll'}. Costs
 * (entries of R)² a jump, far less than applying L to a basis. Kept while the generator lives; needs D² complex numbers.
 */
export function unitForm(g: Generator): UnitForm {
  const known = forms.get(g);
  if (known) return known;
  const units = matrixUnits(g.algebra);
  const matrix = zeros(units.count);
  const drift = zeros(units.size);
  for (const jump of g.jumps) addSandwich(matrix, drift, units, jump.matrix, 1);
  // G = −½ΣR*R − iH, so that L(A) = ΣR*AR + AG + G*A.
  for (let k = 0; k < drift.re.length; k++) {
    drift.re[k] *= -0.5;
    drift.im[k] *= -0.5;
  }
  if (g.hamiltonian) subtractHamiltonian(drift, g.hamiltonian);
  addDrift(matrix, units, drift);
  if (g.superoperator) addScaledInto(matrix, hermitianToUnits(g.algebra, units, g.superoperator), 1);
  const form = { units, matrix };
  forms.set(g, form);
  return form;
}

const forms = new WeakMap<Generator, UnitForm>();

/** matrix += factor·(A ↦ R*AR) on the algebra, and square += factor·R*R. */
export function addSandwich(
  matrix: ComplexMatrix,
  square: ComplexMatrix,
  units: MatrixUnits,
  r: SparseMatrix,
  factor: number,
): void {
  const { size: n, count, index } = units;
  const rowIndex = new Int32Array(r.re.length);
  for (let i = 0; i < n; i++) rowIndex.fill(i, r.rowStart[i], r.rowStart[i + 1]);
  for (let s = 0; s < rowIndex.length; s++) {
    const k = rowIndex[s];
    const l = r.colIndex[s];
    const xr = factor * r.re[s];
    const xi = factor * r.im[s];
    for (let t = 0; t < rowIndex.length; t++) {
      const p = index[l * n + r.colIndex[t]];
      const q = index[k * n + rowIndex[t]];
      // Outside the blocks the result is projected away and A has no entries.
      if (p < 0 || q < 0) continue;
      const re = xr * r.re[t] + xi * r.im[t];
      const im = xr * r.im[t] - xi * r.re[t];
      if (k === rowIndex[t]) {
        square.re[l * n + r.colIndex[t]] += re;
        square.im[l * n + r.colIndex[t]] += im;
      }
      matrix.re[p * count + q] += re;
      matrix.im[p * count + q] += im;
    }
  }
}

/** matrix += (A ↦ AG + G*A): in e_kk'G the coefficient of e_kl' is G_k'l', in G*e_kk' that of e_lk' is conj(G_kl). */
export function addDrift(matrix: ComplexMatrix, units: MatrixUnits, g: ComplexMatrix): void {
  const { size: n, count, row, col, index, blockOf } = units;
  for (let q = 0; q < count; q++) {
    const k = row[q];
    const k2 = col[q];
    for (let l = 0; l < n; l++) {
      if (blockOf[l] !== blockOf[k]) continue;
      const right = index[k * n + l] * count + q;
      matrix.re[right] += g.re[k2 * n + l];
      matrix.im[right] += g.im[k2 * n + l];
      const left = index[l * n + k2] * count + q;
      matrix.re[left] += g.re[k * n + l];
      matrix.im[left] -= g.im[k * n + l];
    }
  }
}

/** drift −= iH. */
function subtractHamiltonian(drift: ComplexMatrix, h: SparseMatrix): void {
  for (let i = 0; i < h.rows; i++) {
    for (let s = h.rowStart[i]; s < h.rowStart[i + 1]; s++) {
      const at = i * h.cols + h.colIndex[s];
      drift.re[at] += h.im[s];
      drift.im[at] -= h.re[s];
    }
  }
}
