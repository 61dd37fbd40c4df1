import { bracketText } from '@thalweg/core';
import type { DistanceDocument } from '@thalweg/format';
import { decimalColumn } from './decimal-column.js';
import { proseWidth, type Layout } from './layout.js';
import { modelHead } from './model-line.js';
import { listNumber, scaleOf, shortNumber } from './number-text.js';
import { hanging, wrap } from './wrap.js';

const INDENT = '  ';
const GAP = '   ';

/** A transport distance for people: the bracket, how its ends are known, and the geodesic as a table. */
export function renderDistance(document: DistanceDocument, layout: Layout): string {
  const { model, distance, geodesic, notes = [] } = document;
  const width = proseWidth(layout);
  const lines = [
    ...modelHead(model, layout),
    '',
    ...wrap(headOf(distance), width, 2).map((line) => layout.colours.bold(line)),
    ...endLines('lower', distance.lower, width),
    ...endLines('upper', distance.upper, width),
    ...(geodesic === null ? [] : ['', ...geodesicLines(geodesic, layout)]),
    '',
    ...notes.flatMap((note) => wrap(note, width, 2)),
    ...wrap(
      'W the transport distance of the gradient-flow metric, a length (root of a time), D relative entropy in nats. Bounds hold for the model as given.',
      width,
      2,
    ).map((line) => layout.colours.dim(line)),
  ];
  return `${lines.join('\n')}\n`;
}

type Ends = DistanceDocument['distance'];

function headOf({ lower, upper }: Ends): string {
  const above = { lower: '∞', upper: '∞' };
  const isInfinite = lower?.unbounded === 'above';
  if (isInfinite) return 'W = ∞';
  if (lower?.value === 0 && upper.value === 0) return 'W = 0';
  const texts = bracketText(lower, upper, false, above);
  return `${texts.lower ?? '0'} ≤ W ≤ ${texts.upper ?? '∞'}`;
}

function endLines(name: string, end: Ends['lower'], width: number): string[] {
  if (end === null) return [];
  const margin = end.margin === undefined ? '' : ` (rounding ${shortNumber(end.margin)})`;
  const by = end.value === null ? (end.note ?? end.by) : end.by;
  return hanging(`  ${name}`, `${end.grade}: ${by}${margin}`, width, 10);
}

function geodesicLines({ pieces, speed, points }: NonNullable<DistanceDocument['geodesic']>, layout: Layout): string[] {
  const column = (head: string, values: readonly number[]): string[] => {
    const scale = scaleOf(values);
    return padded([head, ...decimalColumn(values.map((value) => listNumber(value, scale)))]);
  };
  const columns = [
    column(
      't',
      points.map(({ time }) => time),
    ),
    column(
      'D(ρ_t‖E†ρ)',
      points.map(({ entropy }) => entropy),
    ),
    column(
      'speed',
      points.map(({ speed }) => speed),
    ),
  ];
  const row = (k: number): string => (INDENT + columns.map((texts) => texts[k] ?? '').join(GAP)).trimEnd();
  const spread = speed.most > 0 ? (speed.most - speed.least) / speed.most : 0;
  const text = `Geodesic, ${pieces} pieces; its speed varies by ${shortNumber(spread)} of its size over them (on a geodesic it is constant)`;
  return [...wrap(text, proseWidth(layout), 2), '', layout.colours.bold(row(0)), ...points.map((_, k) => row(k + 1))];
}

function padded(texts: readonly string[]): string[] {
  const width = Math.max(...texts.map((text) => text.length));
  return texts.map((text) => text.padEnd(width));
}
