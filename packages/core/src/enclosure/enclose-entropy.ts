import { blockAlgebra } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { addComplex, scaleComplex, squaredModulus, subComplex } from '../checker/arithmetic/complex-interval.js';
import {
  type ComplexIntervalMatrix,
  adjointComplexMatrix,
  complexIntervalZeros,
  entryAt,
  setEntry,
} from '../checker/arithmetic/interval-matrix.js';
import { multiplyTightly } from '../checker/arithmetic/interval-product.js';
import { type Interval, ZERO, add, div, mul, point } from '../checker/arithmetic/interval.js';
import { divUp, mulDown, subDown } from '../checker/arithmetic/rounding.js';
import { rotated, unitaryFrame } from '../checker/arithmetic/unitary-frame.js';
import { widenCorners } from '../checker/arithmetic/widen-corners.js';
import { amplifiedAlgebra, ancillaTrace } from '../entropy/amplify.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import { type ComplexMatrix, identity, kronecker } from '../linalg/complex-matrix.js';
import type { Structure } from '../structure/structure.js';
import { attempt } from './attempt.js';
import { divergenceEnclosure, productionEnclosure, rootDifferenceEnclosure } from './entropy-terms.js';
import { encloseFrame, encloseKronecker, encloseStateMatrix } from './frame-enclosure.js';
import { ENCLOSURE_SIDE } from './limits.js';
import { type ModelBox, modelBox } from './model-box.js';

/**
 * Enclosure over the box of a primitive model of an entropy constant's quotient at the state ρ̃ = Ũ diag(λ) Ũ* with the
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
  if (!box || !structure.fixedPoints?.primitive || rho.rows > ENCLOSURE_SIDE) return null;
  const { values, vectors, exact } = blockEigen(amplifiedAlgebra(box.algebra, amplification), rho);
  if (!values.every((x) => x > 0 && x < Infinity)) return null;
  const state: FramedState = { rho, lambda: values, u: exact ? null : vectors, k: amplification };
  return attempt(() => {
    const entropy = encloseDivergence(box, state);
    const positive = { lo: Math.max(0, entropy.lo), hi: entropy.hi };
    if (constant !== 'lsi') return div(jumpSum(box, state, productionEnclosure), mul(point(2), positive));
    return div(mul(point(2), jumpSum(box, state, rootDifferenceEnclosure)), positive);
  });
}

interface FramedState {
  readonly rho: ComplexMatrix;
  readonly lambda: Float64Array;
  readonly u: ComplexMatrix | null;
  readonly k: number;
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

/**
 * D(ρ‖σ ⊗ Tr_M ρ), in the trace of ρ. For a state τ near the marginal it is D(ρ‖σ⊗τ) − D(Tr_M ρ‖τ), the first a sum of
 * non-negative terms, the second at most ‖Tr_M ρ − τ‖²_F/τ_min (Rényi divergences grow with their order: Petz 1986).
 */
function encloseDivergence(box: ModelBox, state: FramedState): Interval {
  const { lambda, k } = state;
  const n = box.algebra.size;
  const trace = lambda.reduce((sum, x) => add(sum, point(x)), ZERO);
  const u = encloseFrame(state.u, amplifiedAlgebra(box.algebra, k));
  const marginal = nearMarginal(state, n);
  const reference = encloseKronecker(encloseFrame(box.frame, box.algebra), marginal.u);
  const overlaps = multiplyTightly(adjointComplexMatrix(u), reference);
  let sum = ZERO;
  for (let b = 0; b < n * k; b++) {
    const mu = mul(mul(trace, box.weights[Math.floor(b / k)]), marginal.weights[b % k]);
    for (let a = 0; a < n * k; a++) {
      const weight = squaredModulus(entryAt(overlaps, a, b));
      if (weight.hi > 0) sum = add(sum, mul(weight, divergenceEnclosure(lambda[a], mu)));
    }
  }
  return k === 1 ? sum : { lo: subDown(sum.lo, marginalExcess(u, state, n, trace, marginal)), hi: sum.hi };
}

interface Marginal {
  readonly u: ComplexIntervalMatrix;
  /** Of sum one. */
  readonly weights: readonly Interval[];
  readonly values: Float64Array;
}

/** A state near Tr_M ρ with known eigenvalues. */
function nearMarginal({ rho, k }: FramedState, n: number): Marginal {
  if (k === 1) return { u: encloseFrame(null, ANCILLA), weights: [point(1)], values: Float64Array.of(1) };
  const { values, vectors } = hermitianEigen(ancillaTrace(rho, n, k));
  const total = values.reduce((sum, x) => add(sum, point(x)), ZERO);
  return {
    u: encloseFrame(vectors, blockAlgebra([k])),
    weights: Array.from(values, (x) => div(point(x), total)),
    values,
  };
}

const ANCILLA = blockAlgebra([1]);

/** Upper bound of Tr ρ·D(Tr_M ρ/Tr ρ‖τ). */
function marginalExcess(
  u: ComplexIntervalMatrix,
  { lambda, k }: FramedState,
  n: number,
  trace: Interval,
  { u: w, weights, values }: Marginal,
): number {
  const rho = encloseStateMatrix(u, lambda);
  const near = encloseStateMatrix(w, values);
  const scale = div(
    trace,
    values.reduce((sum, x) => add(sum, point(x)), ZERO),
  );
  const difference = complexIntervalZeros(k);
  let squares = ZERO;
  for (let c = 0; c < k; c++) {
    for (let d = 0; d < k; d++) {
      let entry = subComplex({ re: ZERO, im: ZERO }, scaleComplex(entryAt(near, c, d), scale));
      for (let i = 0; i < n; i++) entry = addComplex(entry, entryAt(rho, i * k + c, i * k + d));
      setEntry(difference, c, d, entry);
      squares = add(squares, squaredModulus(entry));
    }
  }
  const smallest = weights.reduce((low, x) => Math.min(low, x.lo), Infinity);
  return smallest > 0 ? divUp(squares.hi, mulDown(trace.lo, smallest)) : Infinity;
}
