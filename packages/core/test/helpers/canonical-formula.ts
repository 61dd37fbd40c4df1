import { type BlockAlgebra, basisElement, projectToAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGenerator } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  frobeniusNorm,
  multiply,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';

interface Term {
  readonly matrix: ComplexMatrix;
  readonly frequency: number;
}

/** Σ_j e^{−ω/2} V*[A,V] + e^{ω/2} [V,A]V*, summed as it is written in Carlen & Maas (2017), not as the library does. */
function canonicalFormula(algebra: BlockAlgebra, terms: readonly Term[], a: ComplexMatrix): ComplexMatrix {
  const out = zeros(algebra.size);
  for (const { matrix: v, frequency } of terms) {
    const w = adjoint(v);
    const commutator = subtract(multiply(a, v), multiply(v, a));
    addScaledInto(out, multiply(w, commutator), Math.exp(-frequency / 2));
    addScaledInto(out, multiply(commutator, w), -Math.exp(frequency / 2));
  }
  return projectToAlgebra(algebra, out);
}

/** ‖L − formula‖_F/‖L‖_F over the Hermitian basis. */
export function formulaResidual(g: Generator, terms: readonly Term[]): number {
  let difference = 0;
  let total = 0;
  for (let k = 0; k < g.algebra.dimension; k++) {
    const b = basisElement(g.algebra, k);
    const image = applyGenerator(g, b);
    total += frobeniusNorm(image) ** 2;
    difference += frobeniusNorm(subtract(image, canonicalFormula(g.algebra, terms, b))) ** 2;
  }
  return Math.sqrt(difference) / (total > 0 ? Math.sqrt(total) : 1);
}
