import type { Grade } from '@thalweg/core';
import { element, pathData } from '../svg/element.js';
import { type Colour, paint } from '../svg/palette.js';
import { CHARACTER, TYPE, textLine } from '../svg/text.js';
import type { BracketEnd, BracketRow } from './bracket.js';

/** The gauge of one bracket, centred at height y: its span, and a mark for each end by its grade. */
export function gauge(
  { lower, upper, closed }: BracketRow,
  scale: (value: number) => number,
  [left, right]: readonly [number, number],
  y: number,
): string[] {
  const base = stroke([[left, y], [right, y]], 'hair', 1); // prettier-ignore
  const known = [lower, upper].filter((end) => end !== null && Number.isFinite(end.value));
  if (closed && known.length === 2 && lower && upper) return [base, diamond(scale((lower.value + upper.value) / 2), y)];
  const low = lower ? scale(lower.value) : left;
  const high = upper ? scale(upper.value) : right;
  const dashed = lower && upper ? undefined : '2 3';
  const span = lower || upper ? [stroke([[low, y], [Math.max(low, high), y]], 'contour', 3, dashed)] : []; // prettier-ignore
  const ends = [
    ...(lower ? [endMark(lower, low, y, -1, left, right)] : []),
    ...(upper ? [endMark(upper, high, y, 1, left, right)] : []),
  ];
  return [base, ...span, ...ends];
}

const HALF = 6;

/** `side` is −1 for a lower end, 1 for an upper one. Ends outside of the axis are arrows at its edge. */
function endMark(
  { value, grade }: BracketEnd,
  x: number,
  y: number,
  side: -1 | 1,
  left: number,
  right: number,
): string {
  const colour: Colour = side < 0 ? 'water' : 'ink';
  if (!Number.isFinite(value)) return arrow(value < 0 ? left : right, y, value < 0 ? -1 : 1, colour);
  if (x <= left && value < 0) return arrow(left, y, -1, colour);
  if (x >= right) return arrow(right, y, 1, colour);
  return gradeMark(grade, x, y, side, colour);
}

/** Double bar *exact*, bar and half-bar *enclosed*, bar *certified*, open ring *observed*. */
function gradeMark(grade: Grade, x: number, y: number, side: -1 | 1, colour: Colour): string {
  if (grade === 'observed') {
    const colours = paint({ fill: 'ground', stroke: colour });
    return element('circle', { cx: x, cy: y, r: 3.4, 'stroke-width': 1.4, ...colours });
  }
  const bar = (at: number, half: number): string => stroke([[at, y - half], [at, y + half]], colour, 1.6); // prettier-ignore
  if (grade === 'exact') return bar(x, HALF) + bar(x + 3 * side, HALF);
  return grade === 'enclosed' ? bar(x, HALF) + bar(x + 3 * side, HALF / 2) : bar(x, HALF);
}

function diamond(x: number, y: number): string {
  const d = pathData([[x, y - 5], [x + 5, y], [x, y + 5], [x - 5, y]], true); // prettier-ignore
  return element('path', { d, ...paint({ fill: 'proved' }) });
}

function arrow(x: number, y: number, side: -1 | 1, colour: Colour): string {
  const d = pathData([[x + 5 * side, y], [x - 2 * side, y - 4.5], [x - 2 * side, y + 4.5]], true); // prettier-ignore
  return element('path', { d, ...paint({ fill: colour }) });
}

function stroke(points: readonly (readonly [number, number])[], colour: Colour, width: number, dash?: string): string {
  return element('path', {
    d: pathData(points),
    'stroke-width': width,
    'stroke-dasharray': dash,
    ...paint({ stroke: colour }),
  });
}

const KEY: readonly (readonly [Grade | 'closed', string])[] = [
  ['exact', 'exact'],
  ['enclosed', 'enclosed'],
  ['certified', 'certified'],
  ['observed', 'observed only'],
  ['closed', 'closed'],
];

/** What the marks mean, those that occur. */
export function gradeKey(
  met: ReadonlySet<Grade | 'closed'>,
  x: number,
  y: number,
  width: number,
): { readonly body: string[]; readonly bottom: number } {
  let [at, line] = [x, y];
  const body: string[] = [];
  for (const [grade, text] of KEY) {
    if (!met.has(grade)) continue;
    const room = 18 + text.length * CHARACTER * TYPE.small + 18;
    if (at + room > x + width + 18) [at, line] = [x, line + 18];
    body.push(grade === 'closed' ? diamond(at + 6, line - 4) : gradeMark(grade, at + 6, line - 4, 1, 'ink'));
    body.push(textLine(at + 18, line, text, { size: TYPE.small, colour: 'ink2' }));
    at += room;
  }
  return { body, bottom: body.length === 0 ? y - 14 : line };
}
