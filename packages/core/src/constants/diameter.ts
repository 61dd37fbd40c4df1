import type { End } from '../sheet/bracket.js';
import type { Structure } from '../structure/structure.js';
import { computedGrade, positiveBound } from './lower-ends.js';
import { isPrimitiveMetric } from './transport-entropy.js';

/**
 * Upper end of the transport diameter, a length: W(ρ,ρ′) ≤ W(ρ,σ) + W(σ,ρ′) ≤ 2√(2 log(1/σ_min)/κ), κ a lower end of t2,
 * since D(ρ‖σ) ≤ log(1/σ_min). Needs GNS symmetry and a primitive generator. Null otherwise, or when `t2` is no positive
 * bound.
 */
export function diameterUpper(structure: Structure, t2: End | null): End | null {
  const input = positiveBound(t2);
  const { state } = structure;
  if (!input || !state?.faithful || !isPrimitiveMetric(structure)) return null;
  const value = 2 * Math.sqrt((-2 * Math.log(state.smallest)) / input.value);
  return {
    value,
    grade: computedGrade(input.grade),
    by: `t2 and D ≤ log(1/σ_min): ${input.by}`,
    ...(input.margin === undefined ? {} : { margin: (value * input.margin) / (2 * input.value) }),
  };
}
