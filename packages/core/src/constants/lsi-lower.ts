import { isCommutative } from '../algebra/block-algebra.js';
import type { End } from '../sheet/bracket.js';
import type { Structure } from '../structure/structure.js';
import { positiveBound, scaledEnd } from './lower-ends.js';

/**
 * lsi ≥ gap · lsi(id − E_σ), as −<A,LA>_σ ≥ gap ‖A − Tr(σA)‖²_σ says that the Dirichlet form of L is at least gap times
 * that of id − E_σ. The constant of id − E_σ is known for σ = 1/n on one full block, 2(1−2/n)/log(n−1) (Müller-Hermes,
 * Stilck França & Wolf, J. Math. Phys. 57 (2016)), and for points with smallest weight π*, 2(1−2π*)/log(1/π*−1)
 * (Diaconis & Saloff-Coste, Ann. Appl. Probab. 6 (1996)); both values are from memory of these papers. Null when neither
 * applies, the generator is not primitive, or `gap` (a lower end) is no positive bound.
 */
export function lsiFromGap(structure: Structure, gap: End | null): End | null {
  const input = positiveBound(gap);
  const { algebra, state, symmetry, fixedPoints } = structure;
  if (!input || !state?.faithful || !fixedPoints?.primitive || algebra.dimension < 2) return null;
  if (isCommutative(algebra)) {
    const by = 'gap times the constant of id − E_σ, smallest weight of σ (primitive; Diaconis & Saloff-Coste 1996)';
    return scaledEnd(input, lsiOfProjection(state.smallest), by);
  }
  if (algebra.blocks.length === 1 && symmetry.kind === 'tracial') {
    const by = 'gap times the constant of id − E_σ, σ = 1/n (primitive; Müller-Hermes, Stilck França & Wolf 2016)';
    return scaledEnd(input, lsiOfProjection(1 / algebra.size), by);
  }
  return null;
}

/** 2(1−2s)/log(1/s−1) = u/artanh u with u = 1−2s, 1 at s = ½. */
export function lsiOfProjection(s: number): number {
  const u = 1 - 2 * s;
  return Math.abs(u) > 0 ? u / Math.atanh(u) : 1;
}
