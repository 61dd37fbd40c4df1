import type { BakryEmeryResult } from '../constants/bakry-emery.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import type { EnclosedForms } from './enclosed-forms.js';

/** A vector over all units as one over those kept: the unit dropped of a class is minus the others, modulo the fixed points. */
export function reduced({ classes, kept }: EnclosedForms, x: ComplexMatrix, size: number): ComplexMatrix {
  const { classOf, units } = classes;
  const out = zeros(kept.length * size, 1);
  const isKept = new Set(kept);
  const dropped = new Map<number, number>();
  for (let p = 0; p < units.count; p++) if (!isKept.has(p)) dropped.set(classOf[p], p);
  kept.forEach((p, i) => {
    const d = dropped.get(classOf[p]);
    for (let k = 0; k < size; k++) {
      out.re[i * size + k] = x.re[p * size + k] - (d === undefined ? 0 : x.re[d * size + k]);
      out.im[i * size + k] = x.im[p * size + k] - (d === undefined ? 0 : x.im[d * size + k]);
    }
  });
  return out;
}

/** A ⊗ ψ over matrix units and the vectors of the block of ψ. */
export function product(
  { classes, structure }: EnclosedForms,
  { observable: a, psi }: BakryEmeryResult,
  block: number,
): ComplexMatrix {
  const { units } = classes;
  const { blocks, offsets } = structure.algebra;
  const size = blocks[block];
  const out = zeros(units.count * size, 1);
  for (let p = 0; p < units.count; p++) {
    const i = units.row[p] * units.size + units.col[p];
    for (let k = 0; k < size; k++) {
      const s = offsets[block] + k;
      out.re[p * size + k] = a.re[i] * psi.re[s] - a.im[i] * psi.im[s];
      out.im[p * size + k] = a.re[i] * psi.im[s] + a.im[i] * psi.re[s];
    }
  }
  return out;
}
