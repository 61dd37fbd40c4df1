import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { applyGeneratorAdjoint } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, fromEntries } from '../linalg/complex-matrix.js';
import { expmAction } from '../linalg/expm-action.js';
import { EPSILON } from '../tolerances.js';
import { norm } from './kernel.js';

/** Longest total evolution tried, in units of 1/‖L‖. */
const MAX_TIME = 1e5;

/**
 * lim e^{tL†}ρ by following the flow over doubling times until L†ρ is at rounding level. For algebras too large for D×D
 * matrices. Throws `no-convergence` when the gap is below about 1e-4 of ‖L‖.
 */
export function evolvedState(g: Generator, rho: ComplexMatrix): ComplexMatrix {
  const { algebra } = g;
  const bound = generatorNormBound(g);
  const apply = (x: Float64Array): Float64Array =>
    toCoordinates(algebra, applyGeneratorAdjoint(g, fromCoordinates(algebra, x)));
  let x = toCoordinates(algebra, rho);
  for (let time = 1; time <= MAX_TIME; time *= 2) {
    x = expmAction(apply, time / bound, x, bound);
    if (norm(apply(x)) <= algebra.size * EPSILON * bound * norm(x)) return withoutDust(fromCoordinates(algebra, x));
  }
  throw new ThalwegError(
    'no-convergence',
    `expected the flow to settle within ${MAX_TIME} units of 1/‖L‖, got a state that still moves; declare the invariant state`,
    { pointer: '/state', details: { limit: MAX_TIME } },
  );
}

/** Off-diagonal entries at rounding level become exact zeros, so that a diagonal limit is seen to be diagonal. */
function withoutDust(a: ComplexMatrix): ComplexMatrix {
  const n = a.rows;
  return fromEntries(n, n, (i, j) => {
    const k = i * n + j;
    return i !== j && Math.hypot(a.re[k], a.im[k]) <= EPSILON ? [0, 0] : [a.re[k], a.im[k]];
  });
}
