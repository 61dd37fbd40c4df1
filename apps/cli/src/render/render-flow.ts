import type { FlowDocument } from '@thalweg/format';
import { proseWidth, type Layout } from './layout.js';
import { modelHead } from './model-line.js';
import { listNumber, minus, scaleOf, shortNumber } from './number-text.js';
import { hanging, wrap } from './wrap.js';

type Point = FlowDocument['points'][number];
type Quantity = FlowDocument['bounds'][number]['quantity'];

const DIGITS = 5;
const ROWS_SHOWN = 21;
const GAP = '  ';
const INDENT = '  ';

/** A flow for people: a table of times, every few of them unless `whole`, then what bounds it. */
export function renderFlow(flow: FlowDocument, layout: Layout, { whole }: { readonly whole: boolean }): string {
  const { points, method, notes = [] } = flow;
  const every = whole ? 1 : Math.max(1, Math.round((points.length - 1) / (ROWS_SHOWN - 1)));
  const shown = points.filter((_, k) => k % every === 0 || k === points.length - 1);
  const worst = scaleOf(points.map(({ stateError }) => stateError));
  const accuracy = `states by ${method}, error ${method === 'eigenvectors' ? 'at most' : 'about'} ${shortNumber(worst)} in trace norm`;
  const thinned = every > 1 ? [`every ${ordinal(every)} of ${points.length} times; --json and --csv give all`] : [];
  const lines = [
    ...modelHead(flow.model, layout),
    ...[accuracy, ...thinned].flatMap((text) => wrap(text, proseWidth(layout), 2)),
    '',
    ...table(flow, shown, layout),
    '',
    ...boundLines(flow, layout),
    ...['', ...notes.flatMap((note) => wrap(note, proseWidth(layout), 2)), ...legend(layout)],
  ];
  return `${lines.join('\n')}\n`;
}

interface Column {
  readonly head: string;
  readonly cell: (point: Point) => string;
  readonly bound: boolean;
}

function table(flow: FlowDocument, shown: readonly Point[], layout: Layout): string[] {
  const { colours, width } = layout;
  const times = shown.map(({ time }) => time);
  const columns: Column[] = [
    { head: 't', cell: ({ time }) => trimmed(listNumber(time, scaleOf(times))), bound: false },
    quantityColumn('D(ρ_t‖E†ρ)', 'entropy'),
    ...bestBound(flow, 'entropy'),
    quantityColumn('I(ρ_t)', 'production'),
    ...bestBound(flow, 'production'),
    quantityColumn('‖ρ_t−E†ρ‖₁', 'distance'),
    ...bestBound(flow, 'distance'),
  ];
  const texts = columns.map(({ head, cell }) => padded([head, ...shown.map(cell)]));
  // Where the whole table does not fit, bounds go first.
  const total = texts.reduce((sum, [head = '']) => sum + head.length + GAP.length, 0);
  const kept = total <= width ? texts : texts.filter((_, c) => !columns[c]?.bound);
  const paints = total <= width ? columns : columns.filter(({ bound }) => !bound);
  const row = (k: number): string =>
    (INDENT + kept.map((column, c) => paint(column[k] ?? '', k > 0 && paints[c]?.bound === true)).join(GAP)).trimEnd();
  const paint = (text: string, bound: boolean): string => (bound ? colours.blue(text) : text);
  const rule = INDENT + '─'.repeat(kept.reduce((sum, [head = '']) => sum + head.length + GAP.length, -GAP.length));
  return [colours.bold(row(0)), rule, ...shown.map((_, k) => row(k + 1))];
}

function quantityColumn(head: string, quantity: Quantity): Column {
  return { head, cell: (point) => significant(point[quantity]), bound: false };
}

/** The least of the bounds on a quantity at each time; no column where there is none. */
function bestBound({ bounds, points }: FlowDocument, quantity: Quantity): Column[] {
  const ours = bounds.filter((bound) => bound.quantity === quantity);
  if (ours.length === 0) return [];
  const index = new Map(points.map((point, k) => [point, k]));
  const cell = (point: Point): string => {
    const values = ours.flatMap(({ values }) => values[index.get(point) ?? -1] ?? []);
    return values.length === 0 ? '—' : significant(Math.min(...values));
  };
  return [{ head: 'at most', cell, bound: true }];
}

function boundLines({ bounds }: FlowDocument, layout: Layout): string[] {
  if (bounds.length === 0) return [];
  const width = proseWidth(layout);
  return [
    `  ${layout.colours.bold('Bounds')}`,
    ...bounds.flatMap(({ constant, formula, rate, prefactor, grade, by }) => [
      ...hanging(`  ${constant}`, `${formula}, rate ${significant(rate)}, from ${significant(prefactor)}`, width, 8),
      ...hanging('', `${grade}: ${by}`, width, 8).map((line) => layout.colours.dim(line)),
    ]),
  ];
}

function legend(layout: Layout): string[] {
  return wrap(
    'D relative entropy in nats, E† the limit of the flow, I = −dD/dt the entropy production, ‖·‖₁ the trace norm. ' +
      '“At most” is the least of the bounds. Bounds hold for the model as given, not for a device.',
    proseWidth(layout),
    2,
  ).map((line) => layout.colours.dim(line));
}

/** Five significant digits. */
function significant(value: number | null): string {
  if (value === null) return '∞';
  if (value === 0) return '0';
  const size = Math.abs(value);
  return minus(size >= 1e-3 && size < 1e5 ? value.toPrecision(DIGITS) : value.toExponential(DIGITS - 2));
}

function trimmed(text: string): string {
  return text.includes('.') && !text.includes('e') ? text.replace(/\.?0+$/, '') : text;
}

function padded(texts: readonly string[]): string[] {
  const width = Math.max(...texts.map((text) => text.length));
  return texts.map((text) => text.padEnd(width));
}

function ordinal(n: number): string {
  return n === 2 ? 'second' : n === 3 ? 'third' : `${n}th`;
}
