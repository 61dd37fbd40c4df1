import { basisElement, fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, identity, multiply, scale } from '../linalg/complex-matrix.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { symmetricEigen } from '../linalg/symmetric-eigen.js';
import type { FixedPoints } from '../structure/fixed-points.js';
import type { ReferenceState } from '../structure/reference-state.js';
import { EPSILON } from '../tolerances.js';

/** The Poincaré constant with its eigenvector. */
export interface Gap {
  /** Largest λ with −<A,LA>_σ ≥ λ‖A−EA‖²_σ in the KMS product; +∞ when every observable is fixed. */
  readonly value: number;
  /** Bound on the floating-point error: backward error of the symmetric eigenproblem, by Weyl's inequality. */
  readonly margin: number;
  /** A at which the bound is attained, N×N Hermitian. */
  readonly observable: ComplexMatrix;
}

/** Dense gap: the smallest eigenvalue of −½(L + L^KMS*) off the fixed points, D×D symmetric. Cost D³. */
export function gapDense(g: Generator, state: ReferenceState, fixed: FixedPoints): Gap {
  const { algebra } = g;
  const d = algebra.dimension;
  const quarter = matrixFunction(state, (x) => x ** 0.25);
  const inverse = matrixFunction(state, (x) => x ** -0.25);
  const s = symmetrised(g, quarter, inverse);
  let norm = 0;
  for (const x of s) norm += x * x;
  norm = Math.sqrt(norm);
  if (fixed.dimension === d) return { value: Infinity, margin: 0, observable: scale(identity(algebra.size), 0) };
  // Lift the fixed points out of the way: in the KMS picture they are σ^{1/4}Fσ^{1/4}, an orthogonal complement.
  for (const v of orthonormalised(fixed.basis.map((f) => toCoordinates(algebra, sandwich(quarter, f))))) {
    for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) s[i * d + j] += 2 * norm * v[i] * v[j];
  }
  const { values, vectors } = symmetricEigen(s, d);
  const a = new Float64Array(d);
  for (let i = 0; i < d; i++) a[i] = vectors[i * d];
  return {
    value: values[0],
    margin: GAP_MARGIN * d * EPSILON * norm * conditionOf(state),
    observable: sandwich(inverse, fromCoordinates(algebra, a)),
  };
}

/** √(σ_max/σ_min): the KMS picture scales entries by up to this. */
function conditionOf(state: ReferenceState): number {
  return Math.sqrt(Math.max(...state.values) / state.smallest);
}

/** Multiple of D·2⁻⁵²·‖L‖ taken as the error of an eigenvalue: forming the matrix costs a few, the solver below ten. */
const GAP_MARGIN = 16;

function symmetrised(g: Generator, quarter: ComplexMatrix, inverse: ComplexMatrix): Float64Array {
  const d = g.algebra.dimension;
  const k = new Float64Array(d * d);
  for (let l = 0; l < d; l++) {
    const image = sandwich(quarter, applyGenerator(g, sandwich(inverse, basisElement(g.algebra, l))));
    const column = toCoordinates(g.algebra, image);
    for (let i = 0; i < d; i++) {
      k[i * d + l] -= column[i] / 2;
      k[l * d + i] -= column[i] / 2;
    }
  }
  return k;
}

function sandwich(outer: ComplexMatrix, a: ComplexMatrix): ComplexMatrix {
  return multiply(outer, multiply(a, outer));
}

/** Gram–Schmidt, twice for safety, on a short list of independent vectors. */
function orthonormalised(vectors: readonly Float64Array[]): Float64Array[] {
  const out: Float64Array[] = [];
  for (const vector of vectors) {
    const v = Float64Array.from(vector);
    for (let pass = 0; pass < 2; pass++) {
      for (const w of out) {
        let dot = 0;
        for (let i = 0; i < v.length; i++) dot += v[i] * w[i];
        for (let i = 0; i < v.length; i++) v[i] -= dot * w[i];
      }
    }
    const norm = Math.sqrt(v.reduce((sum, x) => sum + x * x, 0));
    out.push(v.map((x) => x / norm));
  }
  return out;
}
