import { definitionOf, type ConstantId, type Grade } from '@thalweg/core';
import { sheetSchema, type ConstantDocument, type EndDocument, type SheetDocument } from '@thalweg/format';

export function end(value: number, by: string, grade: Grade = 'certified', margin = 0): EndDocument {
  return { value, grade, by, margin };
}

export const UNBOUNDED: EndDocument = {
  value: null,
  grade: 'certified',
  by: 'unbounded',
  unbounded: 'below',
  note: 'an eigenvalue problem',
};

export function row(
  id: ConstantId,
  lower: EndDocument | null,
  upper: EndDocument | null,
  more: Partial<ConstantDocument> = {},
): ConstantDocument {
  return {
    id,
    ...(id === 'ge' && { mean: 'logarithmic' as const }),
    ...(id === 'mixing' && { epsilon: 0.01 }),
    lower,
    upper,
    closed: false,
    definition: definitionOf(id),
    ...more,
  };
}

/** A sheet that its schema accepts. */
export function sheet(
  constants: readonly ConstantDocument[],
  model: Partial<SheetDocument['model']> = {},
): SheetDocument {
  return sheetSchema.parse({
    schema: 'thalweg.sheet/1',
    model: {
      title: 'A qubit',
      digest: 'a'.repeat(64),
      dimension: 4,
      blocks: [2],
      symmetry: 'gns',
      primitive: true,
      ...model,
    },
    convention: 'two-alpha',
    constants,
    seed: 1,
    tool: { name: 'thalweg', version: '0' },
  });
}
