import { blockEigen } from '../../src/algebra/block-eigen.js';
import type { BlockAlgebra } from '../../src/algebra/block-algebra.js';
import {
  type ComplexMatrix,
  commutator,
  fromEntries,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
} from '../../src/linalg/complex-matrix.js';

/** A jump V with σVσ⁻¹ = e^{−ω}V. */
export interface Modular {
  readonly matrix: ComplexMatrix;
  readonly frequency: number;
}

/** [ρ]_ω X by its definition, with Λ(x,y) = √(xy) sinh(h)/h, h = ½log(x/y): no table or series of the library. */
export function multiplication(
  algebra: BlockAlgebra,
  rho: ComplexMatrix,
  omega: number,
  x: ComplexMatrix,
): ComplexMatrix {
  const { values, vectors: u } = blockEigen(algebra, rho);
  const inFrame = multiplyAdjointFirst(u, multiply(x, u));
  const n = algebra.size;
  const scaled = fromEntries(n, n, (a, b) => {
    const h = (omega + Math.log(values[a] / values[b])) / 2;
    const mean = Math.sqrt(values[a] * values[b]) * (h === 0 ? 1 : Math.sinh(h) / h);
    return [mean * inFrame.re[a * n + b], mean * inFrame.im[a * n + b]];
  });
  return multiplyAdjointSecond(multiply(u, scaled), u);
}

/** ‖A‖²_ρ = Σ_j <∂_jA,[ρ]_{ω_j}∂_jA>. */
export function metricForm(
  algebra: BlockAlgebra,
  jumps: readonly Modular[],
  rho: ComplexMatrix,
  a: ComplexMatrix,
): number {
  return jumps.reduce((sum, { matrix, frequency }) => {
    const x = commutator(matrix, a);
    return sum + innerProduct(x, multiplication(algebra, rho, frequency, x)).re;
  }, 0);
}
