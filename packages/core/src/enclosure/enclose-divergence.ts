import { blockAlgebra } from '../algebra/block-algebra.js';
import { addComplex, scaleComplex, squaredModulus, subComplex } from '../checker/arithmetic/complex-interval.js';
import { type ComplexIntervalMatrix, adjointComplexMatrix, entryAt } from '../checker/arithmetic/interval-matrix.js';
import { multiplyTightly } from '../checker/arithmetic/interval-product.js';
import { type Interval, ZERO, add, div, mul, point } from '../checker/arithmetic/interval.js';
import { divUp, mulDown, subDown } from '../checker/arithmetic/rounding.js';
import { amplifiedAlgebra, ancillaTrace } from '../entropy/amplify.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { divergenceEnclosure } from './entropy-terms.js';
import { encloseFrame, encloseKronecker, encloseStateMatrix } from './frame-enclosure.js';
import type { ModelBox } from './model-box.js';

/** ρ̃ = Ũ diag(λ) Ũ* on M ⊗ M_k, Ũ the unitary nearest to u (null: the identity). */
export interface FramedState {
  /** The matrix that ρ̃ is near to. */
  readonly rho: ComplexMatrix;
  readonly lambda: Float64Array;
  readonly u: ComplexMatrix | null;
  readonly k: number;
}

/**
 * D(ρ‖σ ⊗ Tr_M ρ), in the trace of ρ. For a state τ near the marginal it is D(ρ‖σ⊗τ) − D(Tr_M ρ‖τ), the first a sum of
 * non-negative terms, the second at most ‖Tr_M ρ − τ‖²_F/τ_min (Rényi divergences grow with their order: Petz 1986).
 */
export function encloseDivergence(box: ModelBox, state: FramedState): Interval {
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
  let squares = ZERO;
  for (let c = 0; c < k; c++) {
    for (let d = 0; d < k; d++) {
      let entry = subComplex({ re: ZERO, im: ZERO }, scaleComplex(entryAt(near, c, d), scale));
      for (let i = 0; i < n; i++) entry = addComplex(entry, entryAt(rho, i * k + c, i * k + d));
      squares = add(squares, squaredModulus(entry));
    }
  }
  const smallest = weights.reduce((low, x) => Math.min(low, x.lo), Infinity);
  return smallest > 0 ? divUp(squares.hi, mulDown(trace.lo, smallest)) : Infinity;
}
