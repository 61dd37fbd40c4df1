import { ThalwegError } from '../errors.js';
import { type EntropyForms, entropyForms, entropyGradient, productionGradient } from '../entropy/entropy-gradient.js';
import { type EntropyModel, entropyModel } from '../entropy/entropy-model.js';
import { type LogState, logStateOf } from '../entropy/log-state.js';
import { type ComplexMatrix, addScaledInto, frobeniusNorm, scale } from '../linalg/complex-matrix.js';
import type { Structure } from '../structure/structure.js';
import { EPSILON, QUOTIENT_ROUNDING } from '../tolerances.js';

/** An entropy constant's quotient at one state: an upper bound on the constant. */
export interface EntropyQuotient {
  /** The quotient, a rate. */
  readonly value: number;
  /** Estimate, first order in 2⁻⁵², of the error of `value` when the matrix entries themselves are exact. */
  readonly margin: number;
  /** D(ρ‖E†ρ), nats. */
  readonly entropy: number;
  /** Smallest eigenvalue of the state: tiny when the infimum sits at the boundary of state space. */
  readonly smallestEigenvalue: number;
}

/**
 * I(ρ)/(2 D(ρ‖E†ρ)) at a faithful density matrix of M ⊗ M_k (k the amplification), an upper bound on `mlsi` (k = 1) and
 * `clsi`. Throws `state-not-positive` when ρ is not faithful, `usage` when D(ρ‖E†ρ) is so small that the quotient would
 * be rounding; there the quotient's limits are eigenvalues of L, none below the gap.
 */
export function mlsiAt(structure: Structure, rho: ComplexMatrix, amplification = 1): EntropyQuotient {
  const model = entropyModel(structure, amplification);
  const state = logStateOf(model.algebra, rho);
  const forms = entropyForms(model, state);
  requireResolved(forms.entropy, model.entropyFloor);
  return {
    value: forms.production / (2 * forms.entropy),
    margin: quotientMargin(model, state, forms),
    entropy: forms.entropy,
    smallestEigenvalue: Math.min(...state.lambda),
  };
}

/** Throws `usage` for a state too near its projection. */
export function requireResolved(entropy: number, floor: number): void {
  if (entropy >= floor) return;
  throw new ThalwegError(
    'usage',
    `expected a state with relative entropy to its projection at least ${floor}, got ${entropy}; take one farther away`,
  );
}

/** Rounding N·2⁻⁵² of the entries of ρ times the derivative of the quotient, and the rounding of the sums themselves. */
function quotientMargin(model: EntropyModel, state: LogState, forms: EntropyForms): number {
  const { production, entropy, potential } = forms;
  const value = production / (2 * entropy);
  const derivative = addScaledInto(
    scale(productionGradient(forms), 1 / (2 * entropy)),
    entropyGradient(forms),
    -value / entropy,
  );
  const sums = model.jumps
    ? value * (1 + 1 / Math.sqrt(entropy))
    : (frobeniusNorm(potential) * frobeniusNorm(forms.difference)) / entropy;
  return QUOTIENT_ROUNDING * state.logs.length * EPSILON * (frobeniusNorm(derivative) + sums);
}
