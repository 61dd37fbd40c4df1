import {
  generatorNormBound,
  type ConstantId,
  type End,
  type InequalityConstants,
  type TransportModel,
} from '@thalweg/core';
import { endValue, type ConstantDocument, type EndDocument, type SheetDocument } from '@thalweg/format';

/** The row of a constant; null where the sheet has none. */
export function rowOf(sheet: SheetDocument, constant: ConstantId): ConstantDocument | null {
  return sheet.constants.find(({ id }) => id === constant) ?? null;
}

/** The ends that inequalities rest on: proved ones. */
export function inequalityConstants(sheet: SheetDocument): InequalityConstants {
  return {
    ge: provedEnd('ge', rowOf(sheet, 'ge')?.lower ?? null),
    t2: provedEnd('t2', rowOf(sheet, 't2')?.lower ?? null),
    diameter: provedEnd('diameter', rowOf(sheet, 'diameter')?.upper ?? null),
  };
}

/** The time scale of a comparison: the gap, or the size of the generator where the gap is not known. */
export function rateOf({ structure: { generator } }: TransportModel, sheet: SheetDocument): number {
  const gap = rowOf(sheet, 'gap')?.upper?.value ?? 0;
  return gap > 0 ? gap : generatorNormBound(generator) || 1;
}

function provedEnd(constant: ConstantId, end: EndDocument | null): End | null {
  if (!end || end.grade === 'observed') return null;
  const value = endValue(constant, end);
  return Number.isFinite(value) ? { value, grade: end.grade, by: end.by } : null;
}
