import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, multiply } from '../linalg/complex-matrix.js';
import { lanczosSmallest } from '../linalg/lanczos.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { seededRandom } from '../random.js';
import { FIXED_POINT_TOLERANCE, LANCZOS_TOLERANCE } from '../tolerances.js';
import { basisOf } from './generator-in-basis.js';
import type { ReferenceState } from './reference-state.js';

const MAX_MATVECS = 4000;

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
