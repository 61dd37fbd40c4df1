import { bracketText } from '@thalweg/core';
import type { ConstantDocument, EndDocument, SheetDocument } from '@thalweg/format';
import type { Colours } from '../output/colours.js';
import { decimalColumn } from './decimal-column.js';
import { modelLine } from './model-line.js';
import { wrap } from './wrap.js';

/** How text is laid out: columns to fill, and colours that may do nothing. */
export interface Layout {
  readonly width: number;
  readonly colours: Colours;
}

const INDENT = 4;

/** A sheet for people: a table of brackets with grades, and under each constant what it means and how its ends are known. */
export function renderSheet(sheet: SheetDocument, layout: Layout): string {
  const { colours, width } = layout;
  const rows = sheet.constants.map(numbersOf);
  const lower = decimalColumn(['', ...rows.map((row) => row.lower)]);
  const upper = decimalColumn(['', ...rows.map((row) => row.upper)]);
  const label = Math.max(8, ...sheet.constants.map((row) => nameOf(row).length));
  const columns = [lower[0]?.length ?? 0, upper[0]?.length ?? 0] as const;
  const head = `  ${'constant'.padEnd(label)}  ${'lower'.padStart(columns[0])}  ${'upper'.padStart(columns[1])}`;
  const lines = [...titleLines(sheet, layout), '', colours.bold(head), `  ${'─'.repeat(Math.min(width - 2, 76))}`];
  sheet.constants.forEach((row, k) => {
    const cells = [lower[k + 1] ?? '', upper[k + 1] ?? ''] as const;
    const name = colours.bold(nameOf(row).padEnd(label));
    lines.push(`  ${name}  ${colours.blue(cells[0])}  ${cells[1]}  ${statusOf(row, colours)}`.trimEnd());
    lines.push(...explanation(row, layout));
  });
  lines.push('', ...wrap(LIMITS, width, 2).map((line) => colours.dim(line)));
  return `${lines.join('\n')}\n`;
}

/** Shown under every sheet. */
const LIMITS =
  'Bounds hold for the model as given, not for a device. certified: floating point with its error margin inside the digits shown. observed: the lowest value a search met, an upper end only.';

function titleLines(sheet: SheetDocument, { width, colours }: Layout): string[] {
  const title = sheet.model.title ?? 'Untitled model';
  return [
    ...wrap(title, width, 2).map((line) => colours.bold(line)),
    ...wrap(`${modelLine(sheet.model)} · convention ${sheet.convention}`, width, 2),
  ];
}

function nameOf({ id, mean, epsilon }: ConstantDocument): string {
  if (id === 'mixing' && epsilon !== undefined) return `mixing(${epsilon})`;
  return mean !== undefined && mean !== 'logarithmic' ? `${id}:${mean}` : id;
}

function numbersOf(row: ConstantDocument): { lower: string; upper: string } {
  const { lower, upper } = bracketText(row.lower, row.upper, row.closed);
  return { lower: lower ?? '—', upper: upper ?? '—' };
}

function statusOf(row: ConstantDocument, colours: Colours): string {
  const grades = [row.lower?.grade, row.upper?.grade].filter((grade) => grade !== undefined);
  const words = [...new Set(grades)].join(' · ');
  if (row.closed) return `${colours.green('closed')}  ${words}`;
  return grades.length === 0 ? colours.dim('not given') : `${colours.dim('open  ')}  ${words}`;
}

function explanation(row: ConstantDocument, { width, colours }: Layout): string[] {
  const text: string[] = [row.definition];
  const below = howOf(row.lower);
  const above = howOf(row.upper);
  if (below !== null && below === above) text.push(`both ends: ${below}`);
  else {
    if (below !== null) text.push(`lower: ${below}`);
    if (above !== null) text.push(`upper: ${above}`);
  }
  if (row.note !== undefined) text.push(`note: ${row.note}`);
  return text.flatMap((each) => wrap(each, width, INDENT)).map((line) => colours.dim(line));
}

function howOf(end: EndDocument | null): string | null {
  if (!end) return null;
  return end.value === null ? (end.note ?? end.by) : end.by;
}
