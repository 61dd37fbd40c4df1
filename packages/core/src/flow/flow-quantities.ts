import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { meanOfLogs } from '../entropy/log-terms.js';
import { relativeEntropy } from '../entropy/relative-entropy.js';
import {
  type ComplexMatrix,
  addScaledInto,
  copy,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
} from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { EPSILON, FLOW_INFLOW, FLOW_NEAR_LIMIT, SUPPORT_TOLERANCE } from '../tolerances.js';
import type { FlowStep } from './flow-times.js';

/** What is shown of a state on the flow, relative to its limit τ = E†ρ. */
export interface FlowQuantities {
  /** D(ρ_t‖τ), nats. */
  readonly entropy: number;
  /** I(ρ_t) = −Tr L†ρ_t (log ρ_t − log τ), a rate; +∞ where the flow leaves the boundary of state space. */
  readonly production: number;
  /** ‖ρ_t − τ‖₁. */
  readonly distance: number;
  /** Errors of the three to be expected: of propagation and of rounding. */
  readonly errors: { readonly entropy: number; readonly production: number; readonly distance: number };
}

/** Evaluate relative entropy, its production and the trace distance at a step of a flow with limit τ. */
export function flowQuantities(algebra: BlockAlgebra, tau: ComplexMatrix, step: FlowStep): FlowQuantities {
  const distance = hermitianEigenvalues(step.deviation).reduce((sum, x) => sum + Math.abs(x), 0);
  const rounding = algebra.size * EPSILON;
  const relative = relativeSize(algebra, tau, step.deviation);
  const near = relative !== null && relative < FLOW_NEAR_LIMIT;
  const { entropy, production, slope } = near
    ? nearLimit(algebra, tau, step, relative)
    : farFromLimit(algebra, tau, step);
  const lost = step.error + rounding * (near ? distance : 1);
  const speed = hermitianEigenvalues(step.velocity).reduce((sum, x) => sum + Math.abs(x), 0);
  return {
    entropy,
    production,
    distance,
    errors: {
      entropy: lost * slope,
      production: lost * slope * (distance > 0 ? speed / distance : 0),
      distance: step.error + rounding * distance,
    },
  };
}

interface Divergence {
  readonly entropy: number;
  readonly production: number;
  /** About ‖log ρ − log τ‖: what an error of the state is multiplied by. */
  readonly slope: number;
}

/** ‖τ^{-1/2} (ρ−τ) τ^{-1/2}‖; null when τ is not faithful to rounding. */
function relativeSize(algebra: BlockAlgebra, tau: ComplexMatrix, deviation: ComplexMatrix): number | null {
  const eigen = blockEigen(algebra, tau);
  if (!(Math.min(...eigen.values) > algebra.size * SUPPORT_TOLERANCE)) return null;
  const root = matrixFunction(eigen, (x) => 1 / Math.sqrt(x));
  const values = hermitianEigenvalues(multiply(root, multiply(deviation, root)));
  return values.reduce((top, x) => Math.max(top, Math.abs(x)), 0);
}

/** Nodes and weights of Gauss and Legendre on [0, 1]; the integrands are analytic in |s| < 1/FLOW_NEAR_LIMIT, so six do. */
const NODES = [
  [0.03376524289842399, 0.08566224618958518],
  [0.16939530676686773, 0.1803807865240693],
  [0.38069040695840156, 0.23395696728634552],
  [0.6193095930415985, 0.23395696728634552],
  [0.8306046932331322, 0.1803807865240693],
  [0.966234757101576, 0.08566224618958518],
] as const;

/**
 * With δ = ρ − τ and B_s(X,Y) = Σ_ab X_ba Y_ab/Λ(λ_a,λ_b) in the eigenbasis of τ + sδ, the derivative of the logarithm,
 * D = ∫₀¹ (1−s) B_s(δ,δ) ds and I = −∫₀¹ B_s(L†ρ,δ) ds: no difference of nearly equal numbers is taken.
 */
function nearLimit(
  algebra: BlockAlgebra,
  tau: ComplexMatrix,
  { deviation, velocity }: FlowStep,
  relative: number,
): Divergence {
  let entropy = 0;
  let production = 0;
  for (const [s, weight] of NODES) {
    const { values, vectors } = blockEigen(algebra, addScaledInto(copy(tau), deviation, s));
    const logs = values.map(Math.log);
    const rotate = (a: ComplexMatrix): ComplexMatrix => multiplyAdjointFirst(vectors, multiply(a, vectors));
    const delta = rotate(deviation);
    const speed = rotate(velocity);
    const { size: n, blockOf } = algebra;
    for (let a = 0; a < n; a++) {
      for (let b = 0; b < n; b++) {
        if (blockOf[a] !== blockOf[b]) continue;
        const k = a * n + b;
        const mean = meanOfLogs(logs[a], logs[b]);
        entropy += (weight * (1 - s) * (delta.re[k] ** 2 + delta.im[k] ** 2)) / mean;
        production -= (weight * (speed.re[k] * delta.re[k] + speed.im[k] * delta.im[k])) / mean;
      }
    }
  }
  return { entropy, production, slope: 2 * relative };
}

/** The definitions themselves; eigenvalues within rounding of zero count as zero. */
function farFromLimit(algebra: BlockAlgebra, tau: ComplexMatrix, { deviation, velocity }: FlowStep): Divergence {
  const rho = addScaledInto(copy(tau), deviation, 1);
  const floor = algebra.size * SUPPORT_TOLERANCE;
  const eigen = blockEigen(algebra, rho);
  const speed = multiplyAdjointFirst(eigen.vectors, multiply(velocity, eigen.vectors));
  const fastest = speed.re.reduce((top, x) => Math.max(top, Math.abs(x)), 0);
  const n = algebra.size;
  let production = innerProduct(velocity, logarithm(blockEigen(algebra, tau), floor)).re;
  let lowest = Infinity;
  for (let a = 0; a < n; a++) {
    const rate = speed.re[a * n + a];
    if (eigen.values[a] > floor) {
      production -= rate * Math.log(eigen.values[a]);
      lowest = Math.min(lowest, eigen.values[a]);
    } else if (rate > FLOW_INFLOW * fastest) production = Infinity;
  }
  return { entropy: relativeEntropy(rho, tau), production, slope: 1 - Math.log(lowest) };
}

/** log of the part above the floor; 0 elsewhere, where the flow puts nothing. */
function logarithm(eigen: { values: Float64Array; vectors: ComplexMatrix }, floor: number): ComplexMatrix {
  return matrixFunction(eigen, (x) => (x > floor ? Math.log(x) : 0));
}
