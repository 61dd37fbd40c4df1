import type { End } from '../sheet/bracket.js';
import { hasGradientMetric } from '../sheet/hypotheses.js';
import type { Structure } from '../structure/structure.js';
import { inheritedEnd, positiveBound } from './lower-ends.js';

/**
 * t2 ≥ mlsi: I ≥ 2κD gives W(ρ,σ)² ≤ (2/κ)D(ρ‖σ), as along the flow dW ≤ √I dt ≤ −√(2/κ) d√D (Otto & Villani 2000;
 * Carlen & Maas 2017). Needs GNS symmetry and a primitive generator. Null otherwise, or when `mlsi` (a
 * lower end) is no positive bound.
 */
export function transportEntropyLower(structure: Structure, mlsi: End | null): End | null {
  const input = positiveBound(mlsi);
  if (!input || !isPrimitiveMetric(structure)) return null;
  return inheritedEnd(input, `mlsi (primitive, GNS-symmetric): ${input.by}`);
}

/** t2 ≤ gap, by linearisation at σ. Null where t2 is not defined. */
export function transportEntropyUpper(structure: Structure, gap: End | null): End | null {
  return gap && isPrimitiveMetric(structure) ? inheritedEnd(gap, `t2 ≤ gap; ${gap.by}`) : null;
}

/** Where the transport distance joins any two states. */
export function isPrimitiveMetric(structure: Structure): boolean {
  return hasGradientMetric(structure) && structure.fixedPoints?.primitive === true;
}
