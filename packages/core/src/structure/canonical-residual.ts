import { fromCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { scaleSparse } from '../generator/lindblad-generator.js';
import { MAX_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import {
  type ComplexMatrix,
  frobeniusNorm,
  multiply,
  multiplyAdjointFirst,
  subtract,
  zeros,
} from '../linalg/complex-matrix.js';
import { denseFromSparse } from '../linalg/sparse-matrix.js';
import type { MatrixUnits } from '../metric/matrix-units.js';
import { seededRandom } from '../random.js';
import type { StoredJump } from './canonical-form.js';
import { basisOf, generatorInStateBasis } from './generator-in-basis.js';
import type { ReferenceState } from './reference-state.js';

/** ‖L − L rebuilt from canonical jumps‖_F/‖L‖_F: over the whole algebra, or on random observables where that is too large. */
export function canonicalResidual(g: Generator, state: ReferenceState, jumps: readonly StoredJump[]): number {
  return g.algebra.dimension <= MAX_DENSE_DIMENSION ? exactResidual(g, state, jumps) : probedResidual(g, jumps);
}

function exactResidual(g: Generator, state: ReferenceState, jumps: readonly StoredJump[]): number {
  const { units, matrix } = generatorInStateBasis(g, state);
  const size = frobeniusNorm(matrix);
  const u = basisOf(state);
  const rebuilt = zeros(units.count);
  const drift = zeros(units.size);
  for (const { sparse, frequency } of jumps) {
    const v = denseFromSparse(sparse);
    const inBasis = u ? multiplyAdjointFirst(u, multiply(v, u)) : v;
    addJump(rebuilt, drift, units, inBasis, 2 * Math.exp(-frequency / 2));
  }
  addDrift(rebuilt, drift, units);
  const difference = frobeniusNorm(subtract(rebuilt, matrix));
  return size > 0 ? difference / size : difference;
}

/** [L(e_kk')]_{ll'} += c·conj(V_kl)V_k'l', and drift += c·V*V. */
function addJump(rebuilt: ComplexMatrix, drift: ComplexMatrix, units: MatrixUnits, v: ComplexMatrix, c: number): void {
  const n = units.size;
  const places = Array.from({ length: n * n }, (_, k) => k).filter((k) => Math.hypot(v.re[k], v.im[k]) > 0);
  for (const first of places) {
    const k = Math.floor(first / n);
    const l = first % n;
    for (const second of places) {
      const k2 = Math.floor(second / n);
      const l2 = second % n;
      const re = c * (v.re[first] * v.re[second] + v.im[first] * v.im[second]);
      const im = c * (v.re[first] * v.im[second] - v.im[first] * v.re[second]);
      if (k === k2) {
        drift.re[l * n + l2] += re;
        drift.im[l * n + l2] += im;
      }
      const q = units.index[k * n + k2];
      const p = units.index[l * n + l2];
      if (p < 0 || q < 0) continue;
      rebuilt.re[p * units.count + q] += re;
      rebuilt.im[p * units.count + q] += im;
    }
  }
}

/** L(A) −= ½(KA + AK) for K = the drift: coefficient of e_ll' in K e_kk' is K_lk δ_l'k', in e_kk'K it is δ_lk K_k'l'. */
function addDrift(rebuilt: ComplexMatrix, drift: ComplexMatrix, units: MatrixUnits): void {
  const { size: n, count, row, col, index, blockOf } = units;
  for (let q = 0; q < count; q++) {
    const k = row[q];
    const k2 = col[q];
    for (let l = 0; l < n; l++) {
      if (blockOf[l] !== blockOf[k]) continue;
      const left = index[l * n + k2] * count + q;
      rebuilt.re[left] -= drift.re[l * n + k] / 2;
      rebuilt.im[left] -= drift.im[l * n + k] / 2;
      const right = index[k * n + l] * count + q;
      rebuilt.re[right] -= drift.re[k2 * n + l] / 2;
      rebuilt.im[right] -= drift.im[k2 * n + l] / 2;
    }
  }
}

const PROBES = 2;

function probedResidual(g: Generator, jumps: readonly StoredJump[]): number {
  const rebuilt: Generator = {
    ...g,
    hamiltonian: null,
    superoperator: null,
    jumps: jumps.map(({ sparse, frequency }) => ({
      matrix: scaleSparse(sparse, Math.SQRT2 * Math.exp(-frequency / 4)),
    })),
  };
  const random = seededRandom('canonical probes');
  let difference = 0;
  let total = 0;
  for (let k = 0; k < PROBES; k++) {
    const a = fromCoordinates(
      g.algebra,
      Float64Array.from({ length: g.algebra.dimension }, () => random.normal()),
    );
    const image = applyGenerator(g, a);
    total += frobeniusNorm(image) ** 2;
    difference += frobeniusNorm(subtract(image, applyGenerator(rebuilt, a))) ** 2;
  }
  return total > 0 ? Math.sqrt(difference / total) : Math.sqrt(difference);
}
