import { conventionOf, type ConventionName, type Grade } from '@thalweg/core';
import type { SheetDocument } from '@thalweg/format';
import { proseWidth, type Layout } from './layout.js';
import { modelHead } from './model-line.js';
import { sheetDetails } from './sheet-details.js';
import { sheetTable } from './sheet-table.js';
import { unitsOf, unitsText } from './units.js';
import { wrap } from './wrap.js';

/** A sheet for people: the table of brackets, then what each constant means and how its ends are known. */
export function renderSheet(sheet: SheetDocument, layout: Layout): string {
  const { constants } = sheet;
  const units = unitsOf(constants);
  const lines = [
    ...modelHead(sheet.model, layout),
    ...conventionLines(sheet, layout),
    ...wrap(unitsText(units) ?? '', proseWidth(layout), 2),
    '',
    ...sheetTable(constants, units, layout),
    '',
    ...sheetDetails(constants, layout),
    '',
    ...legend(sheet, layout),
  ];
  return `${lines.join('\n')}\n`;
}

function conventionLines({ constants, convention }: SheetDocument, layout: Layout): string[] {
  if (!constants.some(({ id }) => id === 'mlsi' || id === 'clsi' || id === 'lsi')) return [];
  const { summary } = conventionOf(convention as ConventionName);
  return wrap(`convention ${convention}: ${summary}`, proseWidth(layout), 2);
}

const SYMBOLS =
  'ρ any state, A any observable, P_t = e^{tL}, E = lim P_t, σ the invariant state, ‖·‖_ρ the metric of the gradient flow, D relative entropy, W transport distance.';

const GRADES: Record<Grade, string> = {
  exact: 'Exact: rational arithmetic.',
  enclosed: 'Enclosed: interval arithmetic.',
  certified: 'Certified: floating point, its error margin inside the digits shown.',
  observed: 'Observed: the lowest value a search met, an upper end only.',
};

function legend({ constants }: SheetDocument, layout: Layout): string[] {
  const met = new Set(constants.flatMap(({ lower, upper }) => [lower?.grade, upper?.grade]));
  const grades = (Object.keys(GRADES) as Grade[]).filter((grade) => met.has(grade)).map((grade) => GRADES[grade]);
  return [SYMBOLS, ...grades, 'Bounds hold for the model as given, not for a device.']
    .flatMap((text) => wrap(text, proseWidth(layout), 2))
    .map((line) => layout.colours.dim(line));
}
