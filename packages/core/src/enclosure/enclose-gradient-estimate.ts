import { blockEigen } from '../algebra/block-eigen.js';
import { isCommutative, projectToAlgebra } from '../algebra/block-algebra.js';
import type { Interval } from '../checker/arithmetic/interval.js';
import { encloseQuotient } from '../checker/arithmetic/quotient-enclosure.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { MeanName } from '../metric/operator-mean.js';
import type { Structure } from '../structure/structure.js';
import { attempt } from './attempt.js';
import { modelBox } from './model-box.js';

/**
 * Enclosure over the box of the model of q_ρ̃(A)/‖A‖²_ρ̃ at the state with the computed eigenvalues of ρ and, as eigenvectors, the
 * unitary nearest to the computed ones: any state is a witness, so that it need not be ρ itself. Null where there is no box or
 * nothing is proved.
 */
export function encloseGradientEstimate(
  structure: Structure,
  mean: MeanName,
  rho: ComplexMatrix,
  observable: ComplexMatrix,
): Interval | null {
  const box = modelBox(structure);
  if (!box) return null;
  const { algebra, jumps } = box;
  const { values, vectors } = blockEigen(algebra, rho);
  const frame = { lambda: values, u: isCommutative(algebra) ? null : vectors };
  const model = { blocks: algebra.blocks, jumps, mean };
  return attempt(() => encloseQuotient(model, frame, projectToAlgebra(algebra, observable)).quotient);
}
