import type { ConstantDocument } from '@thalweg/format';
import { constantName } from './constant-name.js';
import { proseWidth, type Layout } from './layout.js';
import { provenance } from './provenance.js';
import { hanging } from './wrap.js';

/** Below this, text goes under the name of a constant instead of beside it. */
const NARROW = 60;
const NARROW_INDENT = 4;

/** What each constant means and how its ends are known; those without any end by the reason why. */
export function sheetDetails(constants: readonly ConstantDocument[], layout: Layout): string[] {
  const given = constants.filter(({ lower, upper }) => lower !== null || upper !== null);
  return [...given.flatMap((row) => details(row, constants, layout)), ...missingLines(constants, layout)];
}

function details(row: ConstantDocument, rows: readonly ConstantDocument[], layout: Layout): string[] {
  const { colours } = layout;
  const indent = indentOf(rows, layout);
  const width = proseWidth(layout);
  const below = row.lower && provenance(row.lower, row, rows);
  const above = row.upper && provenance(row.upper, row, rows);
  const origins =
    below === above ? [`both ends: ${below}`] : [below && `lower end: ${below}`, above && `upper end: ${above}`];
  const notes = row.note === undefined ? [] : [`note: ${row.note}`];
  const name = constantName(row);
  const [first = '', ...rest] = hanging(`  ${name}`, row.definition, width, indent);
  const more = [...origins, ...notes].flatMap((text) => (text ? hanging('', text, width, indent) : []));
  return [first.replace(name, colours.bold(name)), ...rest, ...more.map((line) => colours.dim(line))];
}

/** Constants with neither end, those of one reason together. */
function missingLines(constants: readonly ConstantDocument[], layout: Layout): string[] {
  const reasons = new Map<string, string[]>();
  for (const row of constants) {
    if (row.lower !== null || row.upper !== null) continue;
    const reason = row.note ?? 'neither end is known';
    reasons.set(reason, [...(reasons.get(reason) ?? []), constantName(row)]);
  }
  const lines = [...reasons].flatMap(([reason, names]) =>
    hanging('', `${names.join(', ')}: ${reason}`, proseWidth(layout), NARROW_INDENT),
  );
  return lines.length === 0 ? [] : ['', `  ${layout.colours.bold('Not given')}`, ...lines];
}

function indentOf(rows: readonly ConstantDocument[], { width }: Layout): number {
  if (width < NARROW) return NARROW_INDENT;
  return 4 + Math.max('constant'.length, ...rows.map((row) => constantName(row).length));
}
