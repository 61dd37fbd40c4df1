import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { unitsToHermitian } from '../generator/hermitian-units.js';
import { choleskyRealInto } from '../linalg/cholesky-real.js';
import { type ComplexMatrix, diagonal, multiply, zeros } from '../linalg/complex-matrix.js';
import { lanczosSmallest } from '../linalg/lanczos.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { seededRandom } from '../random.js';
import { FIXED_POINT_TOLERANCE, KERNEL_TOLERANCE, LANCZOS_TOLERANCE } from '../tolerances.js';
import { basisOf, generatorInStateBasis } from './generator-in-basis.js';
import { norm } from '../linalg/real-vector.js';
import type { ReferenceState } from './reference-state.js';

const MAX_MATVECS = 4000;

/**
 * Proves up to rounding that L has no fixed point besides 1, under a faithful invariant σ: e^{tL} is a contraction in the KMS
 * product, so that a fixed point is in the kernel of −½(L+L^KMS*) ⪰ 0, and this is positive definite off σ^{1/2} when a Cholesky
 * factorisation of it, shifted by KERNEL_TOLERANCE·‖L‖, succeeds. False says nothing. Cost D³/3.
 */
export function primitiveByCholesky(g: Generator, state: ReferenceState): boolean {
  if (!state.faithful) return false;
  const { algebra } = g;
  const d = algebra.dimension;
  const { units, matrix } = generatorInStateBasis(g, state);
  const quarter = Float64Array.from(units.row, (k, p) => (state.values[k] * state.values[units.col[p]]) ** 0.25);
  const weighted = zeros(d);
  for (let p = 0; p < d; p++) {
    for (let q = 0, at = p * d; q < d; q++, at++) {
      const factor = quarter[p] / quarter[q];
      weighted.re[at] = factor * matrix.re[at];
      weighted.im[at] = factor * matrix.im[at];
    }
  }
  const s = unitsToHermitian(algebra, units, weighted);
  const size = norm(s);
  const root = toCoordinates(algebra, diagonal(state.values.map(Math.sqrt)));
  const form = new Float64Array(d * d);
  for (let k = 0; k < d; k++) {
    for (let l = 0; l < d; l++) form[k * d + l] = -(s[k * d + l] + s[l * d + k]) / 2 + size * root[k] * root[l];
    form[k * d + k] -= KERNEL_TOLERANCE * size;
  }
  return choleskyRealInto(form, d, form) < 0;
}

/**
 * Whether a KMS-symmetric L on a large algebra has no fixed point besides 1: Lanczos on −L in the KMS picture, orthogonal to
 * σ^{1/2}. Throws `no-convergence` when the search does not end.
 */
export function primitiveBySearch(g: Generator, state: ReferenceState): boolean {
  const { algebra } = g;
  const flat = state.values.every((x) => x === state.values[0]) && !basisOf(state);
  const power = (p: number): ComplexMatrix | null => (flat ? null : matrixFunction(state, (x) => x ** p));
  const quarter = power(0.25);
  const inverse = power(-0.25);
  const conjugated = (s: ComplexMatrix | null, a: ComplexMatrix): ComplexMatrix =>
    s ? multiply(s, multiply(a, s)) : a;
  const { values } = lanczosSmallest({
    dimension: algebra.dimension,
    apply: (x, y) => {
      const image = applyGenerator(g, conjugated(inverse, fromCoordinates(algebra, x)));
      toCoordinates(algebra, conjugated(quarter, image), y);
      for (let k = 0; k < y.length; k++) y[k] = -y[k];
    },
    count: 1,
    deflate: [toCoordinates(algebra, matrixFunction(state, Math.sqrt))],
    random: seededRandom('primitive'),
    tolerance: LANCZOS_TOLERANCE,
    maxMatvecs: MAX_MATVECS,
  });
  return values[0] > FIXED_POINT_TOLERANCE * generatorNormBound(g);
}
