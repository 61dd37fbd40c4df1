import type { Generator } from '../generator/generator.js';
import { hermitianPart } from '../linalg/complex-matrix.js';
import type { End } from '../sheet/bracket.js';
import { hasGradientMetric } from '../sheet/hypotheses.js';
import type { Structure } from '../structure/structure.js';
import { COMPARISON_LIMIT } from '../tolerances.js';
import { carreDuChamp } from './carre-du-champ.js';
import { degeneratePencil } from './degenerate-pencil.js';

/**
 * clsi ≥ c/2 for GNS-symmetric L, c the largest number with Γ_L − cΓ_{id−E} completely positive: a generalised
 * eigenvalue problem of side D·n_b in each block, with the module relations of the fixed points as common kernel.
 *
 * Proof. Complete positivity of Γ_L − cΓ_{id−E} says that ∂_L(a)b ↦ ∂₀(a)b is well defined on the right module that
 * ∂_L(M) spans, with norm at most c^{-1/2} for the right form; by the Leibniz rule it is a bimodule map, and as the jumps
 * are closed under adjoints the left form obeys the same bound. The transformer inequality for operator means (Kubo & Ando
 * 1980) then gives c‖A‖²_{ρ,0} ≤ ‖A‖²_{ρ,L} for every state, also after tensoring with M_k, so I_L ≥ c I_{id−E}; and
 * I_{id−E}(ρ) = D(ρ‖E†ρ) + D(E†ρ‖ρ) ≥ D(ρ‖E†ρ).
 *
 * Null when L is not GNS-symmetric, everything is fixed, the problem is too large, or c is not positive beyond its margin.
 */
export function clsiByComparison(structure: Structure): End | null {
  const { generator, algebra, fixedPoints } = structure;
  if (!fixedPoints || !hasGradientMetric(structure) || fixedPoints.dimension === algebra.dimension) return null;
  if (algebra.dimension * Math.max(...algebra.blocks) > COMPARISON_LIMIT) return null;
  const here = carreDuChamp(generator);
  const there = carreDuChamp(minusProjection(structure, fixedPoints.expectation));
  let lowest = Infinity;
  let margin = 0;
  for (const [b, { gamma }] of here.blocks.entries()) {
    const found = degeneratePencil(hermitianPart(gamma), hermitianPart(there.blocks[b].gamma));
    if (!found.decided) return null;
    if (found.value - found.margin < lowest) {
      lowest = found.value - found.margin;
      margin = found.margin;
    }
  }
  if (!(lowest > 0) || !Number.isFinite(lowest)) return null;
  return {
    value: lowest / 2,
    grade: 'certified',
    by: 'comparison with id − E: Γ_L − cΓ_{id−E} completely positive (GNS-symmetric), clsi(id − E) ≥ 1/2',
    margin: margin / 2,
  };
}

/** E − id, the generator of the depolarisation onto the fixed points at rate one. */
function minusProjection({ generator, algebra }: Structure, expectation: Float64Array): Generator {
  const d = algebra.dimension;
  const superoperator = expectation.slice();
  for (let k = 0; k < d; k++) superoperator[k * d + k] -= 1;
  return {
    algebra,
    hamiltonian: null,
    jumps: [],
    superoperator,
    declaredState: generator.declaredState,
    origin: { kind: 'superoperator' },
  };
}
