import { type BlockAlgebra, fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import { logarithmicMean } from './logarithmic-mean.js';
import { rotateBackInto } from './rotate.js';
import { type StateFrame, fromFrame } from './state-frame.js';

/**
 * Unconstrained parameters of the faithful states: ρ = exp(H)/Tr exp(H), H in the algebra. With `diagonal` only the
 * eigenvalues move, in a fixed frame: enough when the generator commutes with every unitary of the algebra, or when the
 * algebra is commutative.
 */
export interface StateParameters {
  readonly count: number;
  /** Frame of the state, eigenvalues scaled to sum one. */
  frame(x: Float64Array): StateFrame;
  /** Pull a gradient in ρ, given in the frame of ρ as a Hermitian matrix, back to the parameters. */
  pullBack(frame: StateFrame, gradient: ComplexMatrix, out: Float64Array): void;
  /** Parameters of a given faithful state. */
  of(frame: StateFrame): Float64Array;
}

/** All of H (D parameters). */
export function hermitianParameters(algebra: BlockAlgebra): StateParameters {
  const n = algebra.size;
  const [h, scaled] = [zeros(n), zeros(n)];
  const scratch = new Float64Array(2 * n * n);
  return {
    count: algebra.dimension,
    frame(x) {
      const { values, vectors } = blockEigen(algebra, fromCoordinates(algebra, x, h));
      return { lambda: exponentials(values), u: vectors };
    },
    pullBack({ lambda, u }, gradient, out) {
      // dρ = Λ(λ_a,λ_b) dH_ab in the frame: the divided difference of exp.
      const mean = expectation(lambda, gradient);
      for (let a = 0; a < n; a++) {
        for (let b = 0; b < n; b++) {
          if (algebra.blockOf[a] !== algebra.blockOf[b]) continue;
          const w = logarithmicMean(lambda[a], lambda[b]);
          scaled.re[a * n + b] = w * (gradient.re[a * n + b] - (a === b ? mean : 0));
          scaled.im[a * n + b] = w * gradient.im[a * n + b];
        }
      }
      rotateBackInto(scaled, scaled, u, n, scratch);
      toCoordinates(algebra, scaled, out);
    },
    of({ lambda, u }) {
      return toCoordinates(algebra, fromFrame({ lambda: lambda.map(Math.log), u }));
    },
  };
}

/** The N log-eigenvalues alone, in a fixed frame (null for the given basis). */
export function diagonalParameters(size: number, u: ComplexMatrix | null = null): StateParameters {
  return {
    count: size,
    frame: (x) => ({ lambda: exponentials(x), u }),
    pullBack({ lambda }, gradient, out) {
      const mean = expectation(lambda, gradient);
      for (let a = 0; a < size; a++) out[a] = lambda[a] * (gradient.re[a * size + a] - mean);
    },
    of: ({ lambda }) => lambda.map(Math.log),
  };
}

/** exp(x − max x) scaled to sum one. */
function exponentials(x: Float64Array): Float64Array {
  let top = -Infinity;
  for (const value of x) top = Math.max(top, value);
  const out = x.map((value) => Math.exp(value - top));
  let sum = 0;
  for (const value of out) sum += value;
  return out.map((value) => value / sum);
}

/** Σ λ_a G_aa: zero for functions that do not change when ρ is scaled, up to rounding. */
function expectation(lambda: Float64Array, gradient: ComplexMatrix): number {
  const n = lambda.length;
  let sum = 0;
  for (let a = 0; a < n; a++) sum += lambda[a] * gradient.re[a * n + a];
  return sum;
}
