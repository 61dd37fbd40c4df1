import { conventionOf, type ConventionName } from '@thalweg/core';
import { endValue, type ConstantDocument, type EndDocument, type SheetDocument } from '@thalweg/format';
import { bracket, type BracketEnd } from '@thalweg/pictures';
import { constantName } from './constant-name.js';
import { UNTITLED } from './model-line.js';
import { unitOf, unitsOf, unitsText } from './units.js';

/** The brackets of a sheet as an SVG picture, in the units of the printed sheet. */
export function sheetPicture({ model, constants, convention }: SheetDocument): string {
  const units = unitsOf(constants);
  const rows = constants.map((row) => {
    const unit = unitOf(row, units);
    const { id, lower, upper, closed } = row;
    return { id, name: constantName(row), lower: scaled(id, lower, unit), upper: scaled(id, upper, unit), closed };
  });
  const subtitle = [conventionText(constants, convention), unitsText(units)].filter((text) => text !== null);
  return bracket({ title: model.title ?? UNTITLED, convention: subtitle.join('; '), rows });
}

function conventionText(constants: readonly ConstantDocument[], convention: string): string | null {
  const entropic = constants.some(({ id }) => id === 'mlsi' || id === 'clsi' || id === 'lsi');
  return entropic ? `convention ${convention}: ${conventionOf(convention as ConventionName).summary}` : null;
}

function scaled(id: ConstantDocument['id'], end: EndDocument | null, unit: number): BracketEnd | null {
  if (end === null) return null;
  const { grade, margin } = end;
  return { value: endValue(id, end) / unit, grade, ...(margin === undefined ? {} : { margin: margin / unit }) };
}
