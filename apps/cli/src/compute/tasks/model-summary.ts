import type { Structure, SymmetryKind } from '@thalweg/core';
import type { SheetDocument } from '@thalweg/format';

const SYMMETRY: Record<SymmetryKind, SheetDocument['model']['symmetry']> = {
  tracial: 'tracial',
  GNS: 'gns',
  KMS: 'kms',
  none: 'none',
};

/** What a result says of its model. */
export function modelSummary(structure: Structure, digest: string, title: string | undefined): SheetDocument['model'] {
  return {
    ...(title === undefined ? {} : { title }),
    digest,
    dimension: structure.algebra.dimension,
    blocks: [...structure.algebra.blocks],
    symmetry: SYMMETRY[structure.symmetry.kind],
    primitive: structure.fixedPoints?.primitive ?? null,
  };
}
