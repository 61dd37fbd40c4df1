import { clusterMiddles } from '../generator/cluster-values.js';
import { FREQUENCY_TOLERANCE } from '../tolerances.js';
import type { ReferenceState } from './reference-state.js';
import { stateError } from './state-accuracy.js';

/**
 * The frequency ω_kl = log(σ_l/σ_k) of each matrix unit e_kl of the eigenbasis of σ, N×N row-major: σ e_kl σ⁻¹ = e^{−ω_kl} e_kl.
 * Nearly equal ones are given one value; ω_lk = −ω_kl holds exactly, and what is near zero is zero.
 */
export function modularFrequencies(state: ReferenceState): Float64Array {
  const n = state.values.length;
  const logs = state.values.map(Math.log);
  const w = new Float64Array(n * n);
  for (let k = 0; k < n; k++) for (let l = 0; l < n; l++) w[k * n + l] = logs[l] - logs[k];
  return clusterMiddles(w, frequencyTolerance(state));
}

/** Distance within which frequencies of this state are one. */
function frequencyTolerance(state: ReferenceState): number {
  const width = state.values.reduce((top, x) => Math.max(top, x), 0) / state.smallest;
  return FREQUENCY_TOLERANCE * (1 + Math.log(width)) + FREQUENCY_ERRORS * stateError(state);
}

/** Two logarithms, and a few neighbours chained. */
const FREQUENCY_ERRORS = 8;
