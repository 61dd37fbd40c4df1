import type { Structure } from '../structure/structure.js';

/** GNS symmetry (tracial symmetry is a case of it) with a canonical form: what the gradient-flow metric needs. */
export function hasGradientMetric({ symmetry, canonical }: Structure): boolean {
  return canonical !== null && (symmetry.kind === 'tracial' || symmetry.kind === 'GNS');
}
