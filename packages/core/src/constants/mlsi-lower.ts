import type { End } from '../sheet/bracket.js';
import type { Structure } from '../structure/structure.js';
import { inheritedEnd, positiveBound } from './lower-ends.js';
import { hasMetric } from './lsi-lower.js';

/**
 * mlsi ≥ K from a gradient estimate with K > 0 for the logarithmic mean: GE(K) makes the entropy production decay as
 * e^{-2Kt}, and integrating gives D ≤ I/(2K) (Carlen & Maas 2017). Needs GNS symmetry and a primitive
 * generator. Null otherwise, or when `ge` (a lower end) is no positive bound.
 */
export function mlsiFromGradientEstimate(structure: Structure, ge: End | null): End | null {
  const input = positiveBound(ge);
  if (!input || !hasMetric(structure) || !structure.fixedPoints?.primitive) return null;
  return inheritedEnd(input, `ge (primitive, GNS-symmetric): ${input.by}`);
}

/**
 * clsi ≥ K from a complete gradient estimate with K > 0; the generator need not be primitive, as e^{tL}ρ tends to E†ρ and
 * entropies are relative to it (Brannan, Gao & Junge 2022; Wirth & Zhang 2021). Needs GNS symmetry. Null otherwise.
 */
export function clsiFromCompleteGradientEstimate(structure: Structure, cge: End | null): End | null {
  const input = positiveBound(cge);
  if (!input || !hasMetric(structure) || !structure.fixedPoints) return null;
  return inheritedEnd(input, `cge (GNS-symmetric): ${input.by}`);
}

/** mlsi ≥ clsi, the case k = 1. Null when `clsi` (a lower end) is no positive bound. */
export function mlsiFromClsi(clsi: End | null): End | null {
  const input = positiveBound(clsi);
  return input && inheritedEnd(input, `clsi: ${input.by}`);
}
