import {
  type ComplexIntervalMatrix,
  scaleComplexMatrix,
  subComplexMatrix,
} from '../checker/arithmetic/interval-matrix.js';
import { magnitude, point } from '../checker/arithmetic/interval.js';
import { subDown } from '../checker/arithmetic/rounding.js';
import { isPositiveDefinite } from '../checker/arithmetic/smallest-eigenvalue-bound.js';
import { denseFromSparse } from '../linalg/sparse-matrix.js';
import type { Structure } from '../structure/structure.js';
import type { BlockForms } from './enclosed-forms.js';
import { type ExactGenerator, exactCurvature, isBoundExact } from './exact-curvature.js';
import { FINE_STEP, FIRST_STEP, STEPS, STEP_RATIO } from './limits.js';

/**
 * A K a little below `value` with Γ₂ − KΓ ⪰ 0 on all parts, the better of two proofs: for every member of the box, in interval
 * arithmetic, and for one, in exact arithmetic. Null for none. `whole` are the blocks that have the value, null where only their parts do.
 */
export function formLowerEnd(
  structure: Structure,
  whole: readonly BlockForms[] | null,
  parts: readonly BlockForms[],
  value: number,
): number | null {
  const bound = provedBelow(parts, value);
  const near = value - FINE_STEP * sizeOf(parts, value);
  if (!whole || (bound !== null && bound >= near)) return bound;
  const exactly = exactlyBelow(structure, whole, value);
  return bound === null || exactly === null ? (bound ?? exactly) : Math.max(bound, exactly);
}

/** The largest K tried below `value` with Γ₂ − KΓ proved positive in every block. */
function provedBelow(blocks: readonly BlockForms[], value: number): number | null {
  return largestBound(blocks, value, (bound) =>
    blocks.every(({ gamma, gamma2 }) =>
      isPositiveDefinite(subComplexMatrix(gamma2, scaleComplexMatrix(gamma, point(bound)))),
    ),
  );
}

/** Steps down from the value, in the size of the quotients, to the first bound that holds; null for none, or one not decided. */
function largestBound(
  blocks: readonly BlockForms[],
  value: number,
  holds: (bound: number) => boolean | null,
): number | null {
  let step = FIRST_STEP * sizeOf(blocks, value);
  for (let k = 0; k < STEPS && step < Infinity; k++, step *= STEP_RATIO) {
    const bound = subDown(value, step);
    const answer = holds(bound);
    if (answer !== false) return answer ? bound : null;
  }
  return null;
}

/**
 * The same in exact arithmetic, where Γ₂ vanishes on more than the fixed points, so that no neighbourhood can be positive: for the one
 * generator whose jumps are the doubles, given or canonical without frequencies, which lies in the box.
 */
function exactlyBelow(structure: Structure, blocks: readonly BlockForms[], value: number): number | null {
  const generator = exactGenerator(structure);
  const curvature = generator && exactCurvature(structure.algebra, generator);
  if (!curvature) return null;
  return largestBound(blocks, value, (bound) => isBoundExact(curvature, bound));
}

function exactGenerator({ generator, canonical }: Structure): ExactGenerator | null {
  if (!generator.superoperator?.some((x) => x !== 0)) {
    const { hamiltonian } = generator;
    return {
      jumps: generator.jumps.map(({ matrix }) => denseFromSparse(matrix)),
      hamiltonian: hamiltonian && denseFromSparse(hamiltonian),
      weight: 1,
    };
  }
  if (!canonical?.jumps.every(({ frequency }) => frequency === 0)) return null;
  return { jumps: canonical.jumps.map(({ matrix }) => matrix), hamiltonian: null, weight: 2 };
}

function sizeOf(blocks: readonly BlockForms[], value: number): number {
  return Math.max(...blocks.map(rateOf)) + Math.abs(value);
}

/** The size of the quotients of Γ₂ and Γ. */
export function rateOf({ gamma, gamma2 }: BlockForms): number {
  return largest(gamma2) / largest(gamma);
}

function largest({ re, im }: ComplexIntervalMatrix): number {
  let top = 0;
  for (const { lo, hi } of [re, im]) lo.forEach((x, k) => (top = Math.max(top, magnitude({ lo: x, hi: hi[k] }))));
  return top;
}
