import { blockEigen } from '../algebra/block-eigen.js';
import { squaredModulus } from '../checker/arithmetic/complex-interval.js';
import { entryAt } from '../checker/arithmetic/interval-matrix.js';
import { ENTIRE, type Interval, ZERO, add, div, mul, point } from '../checker/arithmetic/interval.js';
import { rotated, unitaryFrame } from '../checker/arithmetic/unitary-frame.js';
import { widenCorners } from '../checker/arithmetic/widen-corners.js';
import { amplifiedAlgebra } from '../entropy/amplify.js';
import { type ComplexMatrix, identity, kronecker } from '../linalg/complex-matrix.js';
import type { Structure } from '../structure/structure.js';
import { attempt } from './attempt.js';
import { type FramedState, encloseDivergence } from './enclose-divergence.js';
import { encloseProjectedDivergence } from './enclose-projected-divergence.js';
import { productionEnclosure, rootDifferenceEnclosure } from './entropy-terms.js';
import { ENCLOSURE_DIMENSION, ENCLOSURE_SIDE } from './limits.js';
import { type ModelBox, modelBox } from './model-box.js';

/**
 * Enclosure over the box of the model (`modelBox`) of an entropy constant's quotient at the state ρ̃ = Ũ diag(λ) Ũ* with the
 * computed eigenvalues of ρ and the unitary nearest to its computed eigenvectors: I/(2D) for `mlsi` and `clsi`, 2E₂/D for `lsi`.
 * With x = e^{ω/2}λ_a, y = e^{−ω/2}λ_b, I = Σ_j Σ_ab |<a|V_j|b>|²(x − y)(log x − log y) and E₂ = Σ_j Σ_ab |<a|V_j|b>|²(√x − √y)²:
 * nothing cancels. Null where there is no box or nothing is proved.
 */
export function encloseEntropyQuotient(
  structure: Structure,
  constant: 'mlsi' | 'clsi' | 'lsi',
  rho: ComplexMatrix,
  amplification: number,
): Interval | null {
  const box = modelBox(structure);
  if (!box || rho.rows > ENCLOSURE_DIMENSION) return null;
  const { values, vectors, exact } = blockEigen(amplifiedAlgebra(box.algebra, amplification), rho);
  if (!values.every((x) => x > 0 && x < Infinity) || (!exact && rho.rows > ENCLOSURE_SIDE)) return null;
  const state: FramedState = { rho, lambda: values, u: exact ? null : vectors, k: amplification };
  const primitive = structure.fixedPoints?.primitive ?? false;
  if (constant === 'lsi' && !primitive) return null;
  return attempt(() => {
    const entropy = primitive ? encloseDivergence(box, state) : encloseProjectedDivergence(structure, box, state);
    if (!entropy) return ENTIRE;
    const positive = { lo: Math.max(0, entropy.lo), hi: entropy.hi };
    if (constant !== 'lsi') return div(jumpSum(box, state, productionEnclosure), mul(point(2), positive));
    return div(mul(point(2), jumpSum(box, state, rootDifferenceEnclosure)), positive);
  });
}

/** Σ_j Σ_ab |<a|V_j ⊗ 1|b>|² f(λ_a, λ_b, ω_j). */
function jumpSum(
  { jumps, algebra }: ModelBox,
  { lambda, u, k }: FramedState,
  f: (x: number, y: number, omega: Interval) => Interval,
): Interval {
  const rotation = unitaryFrame(u);
  const blocks = algebra.blocks.map((size) => size * k);
  let sum = ZERO;
  for (const { matrix, radius, frequency } of jumps) {
    const amplified = k === 1 ? matrix : kronecker(matrix, identity(k));
    const v = widenCorners(rotated(rotation, amplified), amplified, blocks, radius);
    for (let a = 0; a < v.rows; a++) {
      for (let b = 0; b < v.cols; b++) {
        const weight = squaredModulus(entryAt(v, a, b));
        if (weight.hi > 0) sum = add(sum, mul(weight, f(lambda[a], lambda[b], frequency)));
      }
    }
  }
  return sum;
}
