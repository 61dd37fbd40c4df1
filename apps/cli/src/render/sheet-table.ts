import type { ConstantDocument } from '@thalweg/format';
import { boundTexts } from './bound-texts.js';
import { constantName } from './constant-name.js';
import { decimalColumn } from './decimal-column.js';
import type { Layout } from './layout.js';
import { unitOf, type Units } from './units.js';

/** One row of the table, as text. */
interface Cells {
  readonly name: string;
  readonly lower: string;
  readonly lowerGrade: string;
  readonly upper: string;
  readonly upperGrade: string;
  readonly closed: boolean;
}

const GAP = '  ';
const BETWEEN = '   ';
const CLOSED = 'closed';

/** Brackets below each other, each end with its grade; where they do not fit side by side, one end a line. */
export function sheetTable(constants: readonly ConstantDocument[], units: Units, layout: Layout): string[] {
  const rows = aligned(constants.map((row) => cellsOf(row, units)));
  const width = GAP.length + widthOf(rows);
  return width <= layout.width ? wideTable(rows, layout) : narrowTable(constants, units, layout);
}

function cellsOf(row: ConstantDocument, units: Units): Cells {
  const { lower, upper } = boundTexts(row.id, row, row.closed, unitOf(row, units));
  return {
    name: constantName(row),
    lower,
    lowerGrade: row.lower?.grade ?? '',
    upper,
    upperGrade: row.upper?.grade ?? '',
    closed: row.closed,
  };
}

/** Cells of a column get the same width, numbers with their points below each other. */
function aligned(rows: readonly Cells[]): Cells[] {
  const lower = decimalColumn(rows.map((row) => row.lower));
  const upper = decimalColumn(rows.map((row) => row.upper));
  const name = column(['constant', ...rows.map((row) => row.name)]).slice(1);
  const lowerGrade = column(rows.map((row) => row.lowerGrade));
  const upperGrade = column(rows.map((row) => row.upperGrade));
  return rows.map((row, k) => ({
    name: name[k] ?? '',
    lower: lower[k] ?? '',
    lowerGrade: lowerGrade[k] ?? '',
    upper: upper[k] ?? '',
    upperGrade: upperGrade[k] ?? '',
    closed: row.closed,
  }));
}

const HEADS = ['lower end', 'upper end'] as const;

function wideTable(rows: readonly Cells[], { colours }: Layout): string[] {
  const [lowerWidth, upperWidth] = endWidths(rows);
  const head = ['constant'.padEnd(rows[0]?.name.length ?? 0), HEADS[0].padEnd(lowerWidth), HEADS[1]].join(BETWEEN);
  const lines = rows.map(({ name, lower, lowerGrade, upper, upperGrade, closed }) =>
    [
      painted(name, colours.bold),
      `${painted(lower, colours.blue)}${GAP}${painted(lowerGrade, colours.dim)}${filling(lower, lowerGrade, lowerWidth)}`,
      `${upper}${GAP}${painted(upperGrade, colours.dim)}${filling(upper, upperGrade, upperWidth)}`,
      closed ? colours.green(CLOSED) : '',
    ].join(BETWEEN),
  );
  return [colours.bold(GAP + head), GAP + '─'.repeat(widthOf(rows)), ...lines.map((line) => (GAP + line).trimEnd())];
}

/** Paints the text and not the spaces around it. */
function painted(text: string, paint: (text: string) => string): string {
  const word = text.trim();
  return word === '' ? text : text.replace(word, () => paint(word));
}

function filling(value: string, grade: string, width: number): string {
  return ' '.repeat(width - (value + GAP + grade).length);
}

function endWidths([first]: readonly Cells[]): readonly [number, number] {
  const { lower = '', lowerGrade = '', upper = '', upperGrade = '' } = first ?? {};
  const width = (head: string, value: string, grade: string) => Math.max(head.length, (value + GAP + grade).length);
  return [width(HEADS[0], lower, lowerGrade), width(HEADS[1], upper, upperGrade)];
}

function narrowTable(constants: readonly ConstantDocument[], units: Units, { colours }: Layout): string[] {
  const rows = constants.map((row) => cellsOf(row, units));
  const values = decimalColumn(rows.flatMap(({ lower, upper }) => [lower, upper]));
  return rows.flatMap(({ name, lowerGrade, upperGrade, closed }, k) => {
    const [lower = '', upper = ''] = values.slice(2 * k, 2 * k + 2);
    return [
      `${GAP}${colours.bold(name)}${closed ? `${GAP}${colours.green(CLOSED)}` : ''}`,
      `${GAP}${GAP}lower${GAP}${painted(lower, colours.blue)}${GAP}${painted(lowerGrade, colours.dim)}`.trimEnd(),
      `${GAP}${GAP}upper${GAP}${upper}${GAP}${painted(upperGrade, colours.dim)}`.trimEnd(),
    ];
  });
}

function widthOf(rows: readonly Cells[]): number {
  const [lower, upper] = endWidths(rows);
  const name = rows[0]?.name.length ?? 0;
  const closed = rows.some((row) => row.closed) ? BETWEEN.length + CLOSED.length : 0;
  return name + lower + upper + 2 * BETWEEN.length + closed;
}

function column(texts: readonly string[]): string[] {
  const width = Math.max(0, ...texts.map((text) => text.length));
  return texts.map((text) => text.padEnd(width));
}
