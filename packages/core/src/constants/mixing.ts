import type { End } from '../sheet/bracket.js';
import { ThalwegError } from '../errors.js';
import type { Structure } from '../structure/structure.js';
import { computedGrade, positiveBound } from './lower-ends.js';

/**
 * Upper end of the mixing time t(ε), the least t with ‖P_t†ρ − E†ρ‖₁ ≤ ε for all states, from lower ends of `mlsi` and
 * `gap`, the better of the two:
 * Pinsker's ½‖·‖₁² ≤ D with D(ρ‖E†ρ) ≤ D(ρ‖σ) ≤ log(1/σ_min) gives √(2 log(1/σ_min)) e^{−αt};
 * ‖Y‖₁ ≤ ‖σ^{-1/4}Yσ^{-1/4}‖₂, in which norm E† is an orthogonal projection and ρ − E†ρ decays at rate λ from at most
 * σ_min^{-1/2}, gives σ_min^{-1/2} e^{−λt}.
 * Throws `usage` unless 0 < ε < 2. Null without a faithful state or a positive bound.
 */
export function mixingUpper(
  structure: Structure,
  epsilon: number,
  { mlsi, gap }: { readonly mlsi: End | null; readonly gap: End | null },
): End | null {
  requireDistance(epsilon);
  const { state } = structure;
  if (!state?.faithful) return null;
  const logInverse = -Math.log(state.smallest);
  const candidates = [
    decayTime(positiveBound(mlsi), Math.log(Math.sqrt(2 * logInverse) / epsilon), 'mlsi and the inequality of Pinsker'),
    decayTime(positiveBound(gap), logInverse / 2 - Math.log(epsilon), 'decay of the variance with the gap'),
  ].filter((end) => end !== null);
  return candidates.length === 0 ? null : candidates.reduce((a, b) => (b.value < a.value ? b : a));
}

/**
 * Lower end of the mixing time, log(1/ε)/λ, from an upper end of the gap.
 *
 * Proof. Let LA = −λA, A self-adjoint, EA = 0 (under KMS symmetry the gap is an eigenvalue of −L). Let ρ project on an
 * eigenvector of A at ±‖A‖. Then ‖A‖ ‖P_t†ρ − E†ρ‖₁ ≥ |Tr (P_t†ρ − E†ρ)A| = e^{−λt}|Tr ρA| = e^{−λt}‖A‖, so that
 * ‖P_t†ρ − E†ρ‖₁ ≤ ε forces t ≥ log(1/ε)/λ.
 *
 * Throws `usage` unless 0 < ε < 2. Null without KMS symmetry, for a gap that is only observed or infinite, and for ε ≥ 1,
 * where it says nothing.
 */
export function mixingLower(structure: Structure, epsilon: number, gap: End | null): End | null {
  requireDistance(epsilon);
  const input = positiveBound(gap);
  const kind = structure.symmetry.kind;
  if (!input || epsilon >= 1 || kind === 'none') return null;
  return decayTime(input, -Math.log(epsilon), 'eigenvector of the gap (KMS-symmetric)');
}

/** logFactor/rate, never below zero. */
function decayTime(rate: End | null, logFactor: number, by: string): End | null {
  if (!rate) return null;
  const value = Math.max(0, logFactor / rate.value);
  return {
    value,
    grade: computedGrade(rate.grade),
    by: `${by}: ${rate.by}`,
    ...(rate.margin === undefined ? {} : { margin: (value * rate.margin) / rate.value }),
  };
}

function requireDistance(epsilon: number): void {
  if (epsilon > 0 && epsilon < 2) return;
  throw new ThalwegError('usage', `expected a trace distance ε with 0 < ε < 2, got ${epsilon}`);
}
