import {
  type ComplexMatrix,
  addScaledInto,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  scale,
  zeros,
} from '../linalg/complex-matrix.js';
import { QUICK_ENTROPY } from '../tolerances.js';
import type { EntropyModel } from './entropy-model.js';
import { productionOf } from './entropy-production.js';
import { type LogState, logarithmOf, matrixOf } from './log-state.js';
import { meanOfLogs } from './log-terms.js';
import { relativeEntropyOfStates } from './relative-entropy.js';

/** D(·‖E†·) at a state, with what its derivative is made of, in the eigenbasis of the state. */
export interface DivergenceForms {
  /** D(ρ‖E†ρ), nats. */
  readonly entropy: number;
  /** log ρ − log E†ρ. */
  readonly difference: ComplexMatrix;
  /** Λ(λ_a, λ_b) over pairs in one block, N×N; 0 outside the blocks. */
  readonly mean: Float64Array;
}

/** The same with the entropy production. */
export interface EntropyForms extends DivergenceForms {
  /** I(ρ), a rate. */
  readonly production: number;
  /** −L(log ρ − log σ). */
  readonly potential: ComplexMatrix;
  /** L†ρ. */
  readonly flow: ComplexMatrix;
}

export function divergenceForms(model: EntropyModel, rho: LogState): DivergenceForms {
  const tau = model.reference(rho);
  const n = rho.logs.length;
  const difference = scale(toFrame(rho, logarithmOf(tau)), -1);
  for (let a = 0; a < n; a++) difference.re[a * n + a] += rho.logs[a];
  return { entropy: relativeEntropyOfStates(rho, tau), difference, mean: meanTable(rho) };
}

/**
 * Evaluate all. `quick` takes the production as −Tr ρL(log ρ − log σ) where D is large enough for its cancellation to be
 * harmless: good for a search, not for a printed value.
 */
export function entropyForms(model: EntropyModel, rho: LogState, quick = false): EntropyForms {
  const divergence = divergenceForms(model, rho);
  const potential = toFrame(rho, scale(model.apply(addScaledInto(logarithmOf(rho), model.logSigma, -1)), -1));
  const isPlain = quick && divergence.entropy > QUICK_ENTROPY;
  return {
    ...divergence,
    production: isPlain ? diagonalMean(rho, potential) : productionOf(model, rho),
    potential,
    flow: toFrame(rho, model.applyAdjoint(matrixOf(rho))),
  };
}

/** U*AU, the matrix of A in the eigenbasis of ρ. */
export function toFrame({ u }: LogState, a: ComplexMatrix): ComplexMatrix {
  return multiplyAdjointFirst(u, multiply(a, u));
}

/** UAU*, back to the original basis. */
export function fromStateFrame({ u }: LogState, a: ComplexMatrix): ComplexMatrix {
  return multiply(u, multiplyAdjointSecond(a, u));
}

/** Tr ρA for A in the eigenbasis of ρ. */
function diagonalMean({ lambda }: LogState, a: ComplexMatrix): number {
  const n = lambda.length;
  let sum = 0;
  for (let i = 0; i < n; i++) sum += lambda[i] * a.re[i * n + i];
  return sum;
}

/**
 * Derivative of I in ρ: dI = Tr dρ (−L(log ρ − log σ)) − Tr L†ρ D(log)[dρ], an N×N Hermitian matrix in the eigenbasis
 * of ρ. Large where an eigenvalue is small.
 */
export function productionGradient({ potential, flow, mean }: EntropyForms): ComplexMatrix {
  const out = zeros(potential.rows);
  for (let k = 0; k < mean.length; k++) {
    if (!(mean[k] > 0)) continue;
    out.re[k] = potential.re[k] - flow.re[k] / mean[k];
    out.im[k] = potential.im[k] - flow.im[k] / mean[k];
  }
  return out;
}

/**
 * Derivative of D(ρ‖E†ρ) in ρ, in the eigenbasis of ρ. As D(ρ‖E†ρ) = D(ρ‖σ) − D(E†ρ‖σ) it is
 * log ρ − log σ − E(log E†ρ − log σ), and log E†ρ − log σ is a fixed point of E: log ρ − log E†ρ.
 */
export function entropyGradient({ difference }: DivergenceForms): ComplexMatrix {
  return difference;
}

/**
 * Derivatives of I and D in H, ρ = exp(H)/Tr exp(H), combined as cI·dI + cD·dD: N×N Hermitian, in the original basis.
 * With dρ_ab = Λ(λ_a,λ_b) dH_ab the divided difference of log cancels against Λ, so small eigenvalues do no harm.
 */
export function pullBackToLogarithm(
  rho: LogState,
  { production, entropy, potential, flow, difference, mean }: EntropyForms,
  cI: number,
  cD: number,
): ComplexMatrix {
  const n = rho.logs.length;
  const frame = zeros(n);
  for (let k = 0; k < n * n; k++) {
    frame.re[k] = mean[k] * (cI * potential.re[k] + cD * difference.re[k]) - cI * flow.re[k];
    frame.im[k] = mean[k] * (cI * potential.im[k] + cD * difference.im[k]) - cI * flow.im[k];
  }
  const total = cI * production + cD * entropy;
  for (let a = 0; a < n; a++) frame.re[a * n + a] -= total * rho.lambda[a];
  return fromStateFrame(rho, frame);
}

/** Λ(λ_a, λ_b) inside the blocks. */
function meanTable({ algebra, logs }: LogState): Float64Array {
  const { size: n, blockOf } = algebra;
  const out = new Float64Array(n * n);
  for (let a = 0; a < n; a++) {
    for (let b = a; b < n; b++) {
      if (blockOf[a] !== blockOf[b]) continue;
      out[a * n + b] = out[b * n + a] = meanOfLogs(logs[a], logs[b]);
    }
  }
  return out;
}
