import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  copy,
  frobeniusNorm,
  innerProduct,
} from '../linalg/complex-matrix.js';

/**
 * How far a list {V_j} is from being closed under adjoints up to unitary mixing, relative to its size: the positive
 * operators Σ|V_j)(V_j| and Σ|V_j*)(V_j*| agree exactly when they agree on the span of all V_j and V_j*. Returns the
 * largest norm of the difference there, divided by (Σ‖V_j‖²) times the norm of the matrix it is applied to.
 */
export function adjointClosureResidual(list: readonly ComplexMatrix[]): number {
  const adjoints = list.map(adjoint);
  const total = list.reduce((sum, v) => sum + frobeniusNorm(v) ** 2, 0);
  let worst = 0;
  for (const x of [...list, ...adjoints]) {
    const size = frobeniusNorm(x);
    if (size === 0) continue;
    const difference = copy(x);
    difference.re.fill(0);
    difference.im.fill(0);
    for (const v of list) {
      const c = innerProduct(v, x);
      addScaledInto(difference, v, c.re, c.im);
    }
    for (const v of adjoints) {
      const c = innerProduct(v, x);
      addScaledInto(difference, v, -c.re, -c.im);
    }
    worst = Math.max(worst, frobeniusNorm(difference) / (total * size));
  }
  return worst;
}
