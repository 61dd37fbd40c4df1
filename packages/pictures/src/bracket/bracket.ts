import { type ConstantId, type Grade, bracketText } from '@thalweg/core';
import { type TextStyle, textLine, TYPE, textWidth } from '../svg/text.js';
import { element, pathData } from '../svg/element.js';
import { tickTexts } from '../svg/number-text.js';
import { paint } from '../svg/palette.js';
import { tickLabels } from '../svg/tick-labels.js';
import { type PictureOptions, MARGIN, foot, head, picture } from '../svg/picture.js';
import { type Axis, gaugeAxis } from './gauge-axis.js';
import { gauge, gradeKey } from './gauge.js';

/** One end of a bracket; ±∞ for an unbounded one. */
export interface BracketEnd {
  readonly value: number;
  readonly grade: Grade;
  readonly margin?: number | undefined;
}

export interface BracketRow {
  readonly id: ConstantId;
  /** How the constant is named to people: `ge:left`, `mixing(0.01)`. */
  readonly name: string;
  readonly lower: BracketEnd | null;
  readonly upper: BracketEnd | null;
  readonly closed: boolean;
}

/** A sheet as it is drawn. */
export interface BracketData {
  readonly title: string;
  /** What the reader must know of the entropy constants. */
  readonly convention: string;
  readonly rows: readonly BracketRow[];
}

const ROW = 24;
const GAP = 12;
const NARROWEST_GAUGE = 150;
const WIDTH = 480;

interface Columns {
  readonly width: number;
  readonly name: number;
  /** Where the decimal points of the lower and of the upper ends stand. */
  readonly lower: number;
  readonly upper: number;
  readonly gauge: readonly [number, number];
}

/** All brackets of a sheet on one axis of rates: lower end, gauge, upper end. */
export function bracket(data: BracketData, options: PictureOptions = {}): string {
  const texts = data.rows.map((row) => textsOf(row));
  const columns = layOut(data.rows, texts);
  const axis = gaugeAxis(data.rows.filter(isRate));
  const top = head(columns.width, data.title, data.convention);
  const start = top.bottom + 40;
  const end = start + ROW * data.rows.length;
  const scale = axis && ((value: number): number => place(axis, columns, value));
  const body = [
    ...top.lines,
    ...heads(columns, start - 16),
    ...(axis && scale ? scaleLines(axis, scale, columns.gauge, start - 8, end - 8) : []),
    ...data.rows.flatMap((row, k) =>
      rowOf(row, texts[k] ?? { lower: '', upper: '' }, columns, scale, start + ROW * k + 8),
    ),
  ];
  const key = gradeKey(metGrades(data.rows), MARGIN, end + 14, columns.width - 2 * MARGIN);
  const notes = foot(columns.width, key.bottom + 6, footNotes(data.rows));
  const parts = { kind: 'bracket', width: columns.width, height: notes.bottom + MARGIN } as const;
  const name = `Brackets of the constants: ${data.title}`;
  return picture(
    { ...parts, name, description: describe(data, texts), body: [...body, ...key.body, ...notes.lines] },
    options,
  );
}

/** `diameter` is a length and `mixing` a time: they have no place on an axis of rates. */
function isRate({ id }: BracketRow): boolean {
  return id !== 'diameter' && id !== 'mixing';
}

interface EndTexts {
  readonly lower: string;
  readonly upper: string;
}

function textsOf({ lower, upper, closed }: BracketRow): EndTexts {
  const { lower: low, upper: high } = bracketText(lower, upper, closed);
  return { lower: low ?? '—', upper: high ?? '—' };
}

function layOut(rows: readonly BracketRow[], texts: readonly EndTexts[]): Columns {
  const widest = (lines: readonly string[]): number => Math.max(...lines.map((line) => textWidth(line)));
  const name = widest(['constant', ...rows.map((row) => row.name)]);
  const lower = decimals(texts.map((text) => text.lower));
  const upper = decimals(texts.map((text) => text.upper));
  const fixed = 2 * MARGIN + name + lower.before + lower.after + upper.before + upper.after + 3 * GAP + 8;
  const width = Math.max(WIDTH, Math.ceil(fixed + NARROWEST_GAUGE));
  const left = MARGIN + name + GAP + lower.before + lower.after;
  const right = width - MARGIN - upper.before - upper.after;
  return {
    width,
    name: MARGIN,
    lower: left - lower.after,
    upper: right + upper.before,
    gauge: [left + GAP + 4, right - GAP - 4],
  };
}

/** Widths before the decimal point, and from it on; at least room for the head of the column. */
function decimals(texts: readonly string[]): { readonly before: number; readonly after: number } {
  const before = Math.max(...texts.map((text) => textWidth(wholePart(text))));
  const after = Math.max(...texts.map((text) => textWidth(text.slice(wholePart(text).length))));
  return { before: Math.max(before, textWidth('at least', TYPE.small) - after), after };
}

function wholePart(text: string): string {
  const point = text.indexOf('.');
  return point < 0 ? text : text.slice(0, point);
}

/** A number with its decimal point at x. */
function aligned(x: number, y: number, text: string, style: TextStyle): string {
  return textLine(x - textWidth(wholePart(text)), y, text, style);
}

function place({ from, to }: Axis, { gauge: [left, right] }: Columns, value: number): number {
  const share = (value - from) / (to - from);
  return left + Math.max(0, Math.min(1, share)) * (right - left);
}

function heads({ name, gauge: [left, right] }: Columns, y: number): string[] {
  const style = { size: TYPE.small, colour: 'ink2' } as const;
  return [
    textLine(name, y, 'constant', style),
    textLine(left - GAP - 4, y, 'at least', { ...style, anchor: 'end' }),
    textLine(right + GAP + 4, y, 'at most', style),
  ];
}

/** Numbers of the axis and hairlines down the rows. */
function scaleLines(
  { ticks }: Axis,
  scale: (value: number) => number,
  [left, right]: Columns['gauge'],
  top: number,
  bottom: number,
): string[] {
  const texts = tickTexts(ticks);
  const lines = ticks.map((tick) => {
    const d = pathData([[scale(tick), top], [scale(tick), bottom]]); // prettier-ignore
    return element('path', { d, 'stroke-width': tick === 0 ? 1 : 0.6, ...paint({ stroke: 'hair' }) });
  });
  const places = ticks.map((tick, k) => ({ x: scale(tick), text: texts[k] ?? '' }));
  const style = { size: TYPE.small, colour: 'ink2', anchor: 'middle' } as const;
  return [
    ...lines,
    ...tickLabels(places, [left - GAP + 4, right + GAP - 4]).map(({ x, text }) => textLine(x, top - 8, text, style)),
  ];
}

function rowOf(
  row: BracketRow,
  texts: EndTexts,
  columns: Columns,
  scale: ((value: number) => number) | null,
  y: number,
): string[] {
  const rule = pathData([[MARGIN, y + 10], [columns.width - MARGIN, y + 10]]); // prettier-ignore
  const out = [
    element('path', { d: rule, 'stroke-width': 0.6, ...paint({ stroke: 'hair' }) }),
    textLine(columns.name, y + 2, row.name, { bold: true }),
    aligned(columns.lower, y + 2, texts.lower, { colour: 'water' }),
    aligned(columns.upper, y + 2, texts.upper, row.closed ? { colour: 'proved' } : {}),
  ];
  if (isRate(row)) return scale ? [...out, ...gauge(row, scale, columns.gauge, y - 2)] : out;
  const [left, right] = columns.gauge;
  const unit = row.id === 'mixing' ? 'a time' : 'a length';
  return [
    ...out,
    textLine((left + right) / 2, y + 2, unit, { size: TYPE.small, colour: 'ink2', anchor: 'middle', halo: 'ground' }),
  ];
}

function footNotes(rows: readonly BracketRow[]): string[] {
  const open = rows.some((row) => isRate(row) && (row.lower === null) !== (row.upper === null));
  return [
    ...(open ? ['Dotted: the other end is not known.'] : []),
    'Bounds hold for the model as given, not for a device.',
  ];
}

function metGrades(rows: readonly BracketRow[]): ReadonlySet<Grade | 'closed'> {
  const met = new Set<Grade | 'closed'>();
  for (const row of rows.filter(isRate)) {
    if (row.closed) met.add('closed');
    else for (const end of [row.lower, row.upper]) if (end && Number.isFinite(end.value)) met.add(end.grade);
  }
  return met;
}

function describe({ rows, convention }: BracketData, texts: readonly EndTexts[]): string {
  const sentences = rows.map(({ name, lower, upper, closed }, k) => {
    const text = texts[k];
    if (lower === null && upper === null) return `${name}: nothing is known.`;
    if (closed) return `${name} = ${text?.upper}, closed.`;
    const low = lower ? `at least ${text?.lower} (${lower.grade})` : 'no lower end';
    const high = upper ? `at most ${text?.upper} (${upper.grade})` : 'no upper end';
    return `${name}: ${low}, ${high}.`;
  });
  return [`${convention}.`, ...sentences].join(' ');
}
