import { blockAlgebra } from '../../../src/algebra/block-algebra.js';
import { type CanonicalModel, encloseQuotient } from '../../../src/checker/arithmetic/quotient-enclosure.js';
import {
  type ComplexMatrix,
  fromEntries,
  fromRows,
  hermitianPart,
  identity,
  scale,
} from '../../../src/linalg/complex-matrix.js';
import { hermitianEigen } from '../../../src/linalg/hermitian-eigen.js';
import type { MetricModel } from '../../../src/metric/metric-model.js';
import { type Random } from '../../../src/random.js';
import { over } from './big-float.js';
import { bigQuotient } from './big-quotient.js';
import { expectEnclosed } from './enclosure-checks.js';

export const SX = fromRows([
  [0, 1],
  [1, 0],
]);
export const SY = fromRows(
  [
    [0, 0],
    [0, 0],
  ],
  [
    [0, -1],
    [1, 0],
  ],
);
export const SZ = fromRows([
  [1, 0],
  [0, -1],
]);
export const LOWER = fromRows([
  [0, 1],
  [0, 0],
]);
export const RAISE = fromRows([
  [0, 0],
  [1, 0],
]);

type Frame = { lambda: number[]; u: ComplexMatrix | null };

export const randomMatrix = (random: Random, n: number) => fromEntries(n, n, () => [random.normal(), random.normal()]);

export const randomUnitary = (random: Random, n: number) =>
  hermitianEigen(hermitianPart(randomMatrix(random, n))).vectors;

/** Eigenvalues from 1 down to `smallest`, geometrically, shuffled. */
export function graded(random: Random, n: number, smallest: number): number[] {
  const list = Array.from({ length: n }, (_, k) => Math.exp((k / Math.max(1, n - 1)) * Math.log(smallest)));
  return list.sort(() => random.uniform() - 0.5);
}

/** The plain model that quotientAt wants. */
export function plainModel(model: CanonicalModel): MetricModel {
  const algebra = blockAlgebra(model.blocks);
  const frequencies = [...new Set(model.jumps.map((jump) => jump.frequency))];
  return {
    algebra,
    frequencies,
    jumps: model.jumps.map((jump) => ({ ...jump, group: frequencies.indexOf(jump.frequency), pairWeight: 1 })),
    sigma: identity(algebra.size),
    fixed: [],
    commutative: false,
  };
}

/** Random jumps in adjoint pairs with opposite frequencies, not tied to any reference state: the forms do not need one. */
export function randomModel(
  random: Random,
  blocks: number[],
  pairs: number,
  mean: CanonicalModel['mean'],
): CanonicalModel {
  const n = blocks.reduce((x, y) => x + y, 0);
  const jumps: { matrix: ComplexMatrix; frequency: number }[] = [];
  for (let k = 0; k < pairs; k++) {
    const v = scale(randomMatrix(random, n), 0.5);
    const frequency = k === 0 ? 0 : 2 * random.normal();
    const adjointV = fromEntries(n, n, (i, j) => [v.re[j * n + i], -v.im[j * n + i]]);
    jumps.push({ matrix: v, frequency }, { matrix: adjointV, frequency: -frequency });
  }
  return { blocks, jumps, mean };
}

/** Fails unless both forms and their quotient are enclosed at 700 bits; returns the width of the quotient. */
export function expectReference(model: CanonicalModel, frame: Frame, a: ComplexMatrix): number {
  const found = encloseQuotient(model, frame, a);
  const { metric, curvature } = bigQuotient(model, frame, a);
  expectEnclosed(found.metric, metric, 'metric');
  expectEnclosed(found.curvature, curvature, 'curvature');
  expectEnclosed(found.quotient, over(curvature, metric), 'quotient');
  return found.quotient.hi - found.quotient.lo;
}
