import { element, pathData } from '../svg/element.js';
import { numberText } from '../svg/number-text.js';
import { type Colour, paint } from '../svg/palette.js';
import { TYPE, textLine, textWidth } from '../svg/text.js';
import type { Point } from './contour-lines.js';
import type { LabelBox, LabelPlaces } from './label-places.js';
import type { Projection } from './projection.js';
import type { ReliefData } from './relief-data.js';

/** The lowest point, the reference state and the states that a plane was laid through, with names that do not collide. */
export function sliceMarks(data: ReliefData, { to }: Projection, places: LabelPlaces): string[] {
  const { lowest, reference, slice } = data;
  const out: string[] = [];
  const points: Point[] = [];
  const symbol = (at: Point): void => {
    points.push(at);
    places.take({ x: at[0], y: at[1], width: 13, height: 13, turn: 0 });
  };
  const through = slice.kind === 'plane' ? slice.marks : [];
  for (const point of [lowest, reference, ...through]) if (point) symbol(to([point.x, point.y]));
  if (lowest) {
    const at = to([lowest.x, lowest.y]);
    out.push(triangle(at), ...named(at, `κ = ${numberText(lowest.kappa, 5)}`, 'ink', true, places));
  }
  if (reference) {
    const at = to([reference.x, reference.y]);
    out.push(ring(at), ...named(at, 'σ', 'water', true, places));
  }
  for (const mark of through) {
    const at = to([mark.x, mark.y]);
    // A cross on the triangle of the lowest point would hide it.
    const onLowest = lowest !== null && distance(at, to([lowest.x, lowest.y])) < HIDES;
    out.push(...(onLowest ? [] : [cross(at)]), ...named(at, shortened(mark.name), 'ink2', false, places));
  }
  return out;
}

/** Pixels within which one mark hides another. */
const HIDES = 6;

const LONGEST_NAME = 16;

function shortened(name: string): string {
  const letters = [...name];
  return letters.length <= LONGEST_NAME ? name : `${letters.slice(0, LONGEST_NAME - 1).join('')}…`;
}

function distance(a: Point, b: Point): number {
  return Math.hypot(a[0] - b[0], a[1] - b[1]);
}

/** The name of a point beside, above or below it; left out where there is no room at all. */
function named(at: Point, text: string, colour: Colour, bold: boolean, places: LabelPlaces): string[] {
  const width = textWidth(text) + 4;
  const [x, y] = at;
  const box = (dx: number, dy: number): LabelBox => ({ x: x + dx, y: y + dy, width, height: TYPE.text + 3, turn: 0 });
  const side = width / 2 + 9;
  const spots = [box(side, 0), box(-side, 0), box(0, -17), box(0, 18), box(side, -14), box(-side, -14), box(side, 14), box(-side, 14)]; // prettier-ignore
  const place = places.firstFree([...spots.filter((spot) => places.isInside(spot)), ...spots]);
  if (!place) return [];
  const halo = 'land' as const;
  return [textLine(place.x, place.y + 4, text, { colour, bold, anchor: 'middle', halo })];
}

function triangle([x, y]: Point): string {
  const d = pathData([[x, y - 5.5], [x + 5, y + 3.5], [x - 5, y + 3.5]], true); // prettier-ignore
  return element('path', { d, 'stroke-width': 1.5, ...paint({ fill: 'ink', stroke: 'land' }) });
}

function ring([x, y]: Point): string {
  return element('circle', { cx: x, cy: y, r: 6.5, 'stroke-width': 1.8, ...paint({ stroke: 'water' }) });
}

function cross([x, y]: Point): string {
  const d = pathData([[x - 4, y], [x + 4, y]]) + pathData([[x, y - 4], [x, y + 4]]); // prettier-ignore
  return element('path', { d, 'stroke-width': 1.5, ...paint({ stroke: 'ink2' }) });
}
