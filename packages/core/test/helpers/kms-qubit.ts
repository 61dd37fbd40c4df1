import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { diagonal, fromRows } from '../../src/linalg/complex-matrix.js';

/**
 * A qubit generator that is KMS- but not GNS-symmetric for σ = diag(p, 1−p). A jump R with Δ^{1/2}-fixed adjoint,
 * σ^{1/2}R*σ^{-1/2} = R, makes A ↦ R*AR KMS-symmetric: R = [[x, √(p/q) y], [y, z]] with real entries has it. The drift G = −½R*R − iH is
 * then balanced, σ^{1/2}G*σ^{-1/2} = G, by the H with [G]_{01}/[G*]_{01} = √(p/q) (Fagnola & Umanità, Infin. Dimens. Anal. Quantum Probab. 10 (2007)).
 */
export function kmsQubit(p = 0.7): Generator {
  const q = 1 - p;
  const s = Math.sqrt(p / q);
  const [x, y, z] = [0.4, 0.8, -0.3];
  // R = σ^{1/2}R*σ^{−1/2}: entry (0,1) is √(p/q) times entry (1,0).
  const r01 = s * y;
  const k01 = x * r01 + y * z;
  // G_01 = −½K_01 − iH_01 and G*_01 = −½K_01 + iH_01 with G_01 = s·G*_01 gives iH_01 = −½K_01 (1−s)/(1+s).
  const h = (0.5 * k01 * (1 - s)) / (1 + s);
  return {
    ...lindbladGenerator({
      algebra: blockAlgebra([2]),
      hamiltonian: fromRows([[0, 0], [0, 0]], [[0, h], [-h, 0]]), // prettier-ignore
      jumps: [{ matrix: fromRows([[x, r01], [y, z]]) }], // prettier-ignore
    }),
    declaredState: diagonal([p, q]),
  };
}
