import { conventionOf, type ConstantId } from '@thalweg/core';
import { boundTexts } from './bound-texts.js';
import { constantName } from './constant-name.js';
import { decimalColumn } from './decimal-column.js';
import { proseWidth, type Layout } from './layout.js';
import { shortNumber } from './number-text.js';
import { differences, rowOf, type SweepResult, type SweptConstant } from './sweep-result.js';
import { wrap } from './wrap.js';

/** A head and one cell a point, all of the same width. */
type Column = readonly string[];

const MARGIN = '  ';
const GAP = '  ';
const NOTHING = '—';
const OBSERVED = '~';

/** A sweep as a table: a line a point; constants that do not fit beside each other go into further tables below. */
export function sweepTable(result: SweepResult, layout: Layout): string {
  const { sweep, points, over } = result;
  const parameters = over.map((name) =>
    column(
      name,
      points.map((point) => String(point.parameters[name])),
    ),
  );
  const groups = sweep.constants.map((constant) => columnsOf(result, constant));
  const room = layout.width - MARGIN.length - widthOf(parameters);
  const tables = stacked(groups, room).map((columns) => tableLines([...parameters, ...columns], layout));
  return [
    titleLine(result, layout),
    '',
    ...tables.flatMap((lines) => [...lines, '']),
    ...notes(result, layout),
    '',
  ].join('\n');
}

function titleLine({ sweep, points, over }: SweepResult, { colours }: Layout): string {
  const fixed = Object.entries(points[0]?.parameters ?? {}).filter(([name]) => !over.includes(name));
  const { name, version } = sweep.example;
  const settings = fixed.map(([parameter, value]) => `${parameter}=${String(value)}`);
  return MARGIN + [colours.bold(`${name} ${version}`), ...settings].join(' · ');
}

/** One column where every bracket is closed, a lower and an upper one otherwise, then the differences. */
function columnsOf(result: SweepResult, constant: SweptConstant): Column[] {
  const name = constantName(constant);
  const cells = result.points.map((point) => {
    const row = rowOf(point, constant);
    if (row === undefined) return { lower: NOTHING, upper: NOTHING, closed: true };
    const { lower, upper } = boundTexts(row.id, row, row.closed);
    return { lower, upper: row.upper?.grade === 'observed' ? upper + OBSERVED : upper, closed: row.closed };
  });
  const upper = cells.map((cell) => cell.upper);
  const ends = cells.every(({ closed }) => closed)
    ? [column(name, upper)]
    : [
        column(
          `${name} ≥`,
          cells.map((cell) => cell.lower),
        ),
        column(`${name} ≤`, upper),
      ];
  const changes = differences(result, constant);
  if (changes === null) return ends;
  const text = (value: number | null): string => (value === null ? NOTHING : shortNumber(value));
  ends.push(
    leftColumn(
      `Δ${name}`,
      changes.map(({ toPrevious }) => text(toPrevious)),
    ),
  );
  if (changes.some(({ toLimit }) => toLimit !== null)) {
    ends.push(
      leftColumn(
        `${name} − limit`,
        changes.map(({ toLimit }) => text(toLimit)),
      ),
    );
  }
  return ends;
}

/** As many groups beside each other as fit, at least one. */
function stacked(groups: readonly (readonly Column[])[], room: number): Column[][] {
  const tables: Column[][] = [];
  for (const group of groups) {
    const last = tables.at(-1);
    if (last && widthOf([...last, ...group]) <= room) last.push(...group);
    else tables.push([...group]);
  }
  return tables;
}

function tableLines(columns: readonly Column[], { colours }: Layout): string[] {
  const rows = (columns[0] ?? []).map((_, k) =>
    columns
      .map((cells) => cells[k] ?? '')
      .join(GAP)
      .trimEnd(),
  );
  const [head = '', ...lines] = rows;
  return [
    MARGIN + colours.bold(head),
    MARGIN + '─'.repeat(widthOf(columns) - GAP.length),
    ...lines.map((line) => MARGIN + line),
  ];
}

function notes({ sweep, points, convention, along }: SweepResult, layout: Layout): string[] {
  const rows = points.flatMap((point) => sweep.constants.map((constant) => rowOf(point, constant)));
  const failed = points.filter(({ error }) => error !== undefined);
  const texts = [
    ...(sweep.constants.some(({ id }) => ENTROPY.has(id))
      ? [`convention ${convention}: ${conventionOf(convention).summary}`]
      : []),
    ...(rows.some((row) => row?.upper?.grade === 'observed')
      ? [`${OBSERVED} observed: the lowest value a search met, an upper end only.`]
      : []),
    ...(along === null
      ? []
      : [`Δ: since the value of ${along} before; of an open bracket its upper end. limit: as the author claims it.`]),
    'Bounds hold for the models as given, not for a device.',
    ...failed.map(({ parameters, error }) => `${settingText(parameters)}: ${error?.message ?? ''}`),
  ];
  return texts.flatMap((text) => wrap(text, proseWidth(layout), MARGIN.length));
}

const ENTROPY: ReadonlySet<ConstantId> = new Set(['mlsi', 'clsi', 'lsi']);

function settingText(point: Readonly<Record<string, unknown>>): string {
  return Object.entries(point)
    .map(([name, value]) => `${name}=${String(value)}`)
    .join(', ');
}

/** Numbers with their points below each other. */
function column(head: string, cells: readonly string[]): Column {
  return leftColumn(head, decimalColumn(cells));
}

function leftColumn(head: string, cells: readonly string[]): Column {
  const width = Math.max(head.length, ...cells.map((cell) => cell.length));
  return [head, ...cells].map((text) => text.padEnd(width));
}

function widthOf(columns: readonly Column[]): number {
  return columns.reduce((sum, [head = '']) => sum + head.length + GAP.length, 0);
}
