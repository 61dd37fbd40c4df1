import { basisElement, type BlockAlgebra } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { addScaledInto, commutator, frobeniusNorm, type ComplexMatrix } from '../linalg/complex-matrix.js';
import { COVARIANCE_TOLERANCE } from '../tolerances.js';

/**
 * True when L commutes with A ↦ U*AU for every unitary U of the algebra: [X, L(A)] = L([X,A]) for X, A in a basis.
 * A constant of such a generator is an infimum over eigenvalues alone. Trivially true for commutative algebras.
 */
export function isUnitarilyCovariant(g: Generator): boolean {
  const { algebra } = g;
  const basis = Array.from({ length: algebra.dimension }, (_, k) => basisElement(algebra, k));
  const images = basis.map((b) => applyGenerator(g, b));
  const scale = Math.max(...images.map(frobeniusNorm));
  return generatorsOfUnitaries(algebra, basis).every((x) =>
    basis.every((b, k) => {
      const difference = applyGenerator(g, commutator(x, b));
      addScaledInto(difference, commutator(x, images[k]), -1);
      return frobeniusNorm(difference) <= COVARIANCE_TOLERANCE * scale;
    }),
  );
}

/** Neighbouring off-diagonal elements, real and imaginary: their commutators span su(n) in each block. */
function generatorsOfUnitaries(algebra: BlockAlgebra, basis: readonly ComplexMatrix[]): ComplexMatrix[] {
  return basis.filter((_, k) => Math.abs(algebra.row[k] - algebra.col[k]) === 1);
}
