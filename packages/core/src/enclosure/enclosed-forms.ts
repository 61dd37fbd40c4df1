import type { ComplexIntervalMatrix } from '../checker/arithmetic/interval-matrix.js';
import { point } from '../checker/arithmetic/interval.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { denseFromSparse } from '../linalg/sparse-matrix.js';
import type { Structure } from '../structure/structure.js';
import { type CurvatureTensors, encloseCurvature, formOnBlock } from './curvature-enclosure.js';
import { type FixedClasses, complement, fixedClasses } from './fixed-classes.js';
import { type IntervalGenerator, encloseOnUnits } from './generator-enclosure.js';
import { ENCLOSURE_DIMENSION } from './limits.js';
import { jumpEnclosure, modelBox, radiusOf } from './model-box.js';
import { weightOf } from './rotated-jumps.js';

/** Γ and Γ₂ of every member of a box of generators, on a complement of the fixed points, where both forms vanish. */
export interface EnclosedForms {
  readonly structure: Structure;
  readonly tensors: CurvatureTensors;
  readonly classes: FixedClasses;
  readonly kept: readonly number[];
}

/**
 * The forms over the box of the model (`modelBox`), or, for a generator without symmetry given by jumps, over all with jumps and H
 * within BOX_RADIUS of those given. Null where there is neither, for large algebras, and for fixed points of another kind
 * (`fixedClasses`).
 */
export function encloseForms(structure: Structure): EnclosedForms | null {
  if (structure.algebra.dimension > ENCLOSURE_DIMENSION) return null;
  const { fixedPoints, state } = structure;
  // Γ vanishes on an algebra of fixed points; without a faithful state they need not be one.
  if (!fixedPoints || !(state?.faithful || fixedPoints.dimension === 1)) return null;
  const generator = intervalGenerator(structure);
  const classes = generator && fixedClasses(structure, null);
  if (!generator || !classes) return null;
  const { units } = classes;
  const tensors = encloseCurvature(units, encloseOnUnits(generator, units));
  return { structure, tensors, classes, kept: complement(classes, (p) => -p) };
}

/** Both forms on one block. */
export interface BlockForms {
  readonly gamma: ComplexIntervalMatrix;
  readonly gamma2: ComplexIntervalMatrix;
}

/** Entry ((p,k),(q,l)) = F(e_p,e_q)_kl over the units kept. */
export function formsOnBlock({ structure, tensors, kept }: EnclosedForms, block: number): BlockForms {
  const on = (tensor: ComplexIntervalMatrix) => formOnBlock(tensor, tensors.units, structure.algebra, block, kept);
  return { gamma: on(tensors.gamma), gamma2: on(tensors.gamma2) };
}

function intervalGenerator(structure: Structure): IntervalGenerator | null {
  const { algebra, generator } = structure;
  const box = modelBox(structure);
  if (box) {
    const jumps = box.jumps.map((jump) => ({ matrix: jumpEnclosure(jump, algebra), weight: weightOf(jump.frequency) }));
    return { jumps, hamiltonian: null };
  }
  if (generator.superoperator?.some((x) => x !== 0)) return null;
  const near = (matrix: ComplexMatrix) => jumpEnclosure({ matrix, radius: radiusOf(matrix) }, algebra);
  return {
    jumps: generator.jumps.map(({ matrix }) => ({ matrix: near(denseFromSparse(matrix)), weight: point(1) })),
    hamiltonian: generator.hamiltonian && near(denseFromSparse(generator.hamiltonian)),
  };
}
