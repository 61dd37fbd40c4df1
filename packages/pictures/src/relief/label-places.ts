import { CHARACTER } from '../svg/text.js';
import type { Point } from './contour-lines.js';

/** A rectangle that text needs, turned about its middle. */
export interface LabelBox {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
  /** Degrees. */
  readonly turn: number;
}

/** Keeps the boxes that are taken, and finds room for further ones. */
export class LabelPlaces {
  readonly #rim: readonly Point[];
  readonly #width: number;
  readonly #taken: LabelBox[] = [];

  /** `rim` is the convex outline of the slice, `width` that of the picture, in pixels. */
  constructor(rim: readonly Point[], width: number) {
    this.#rim = rim;
    this.#width = width;
  }

  take(box: LabelBox): void {
    this.#taken.push(box);
  }

  isFree(box: LabelBox): boolean {
    const half = box.width / 2;
    const isOnPaper = box.x - half >= EDGE && box.x + half <= this.#width - EDGE;
    return isOnPaper && this.#taken.every((other) => !overlaps(box, other));
  }

  /** Whether a box lies within the slice, away from its rim. */
  isInside({ x, y, width, height, turn }: LabelBox): boolean {
    const wide = { x, y, width: width + 2 * RIM_GAP, height: height + 2 * RIM_GAP, turn };
    return cornersOf(wide).every((corner) => isWithin(this.#rim, corner));
  }

  /** The first of some boxes that is free, taken; null when none is. */
  firstFree(boxes: readonly LabelBox[]): LabelBox | null {
    const free = boxes.find((box) => this.isFree(box)) ?? null;
    if (free) this.take(free);
    return free;
  }
}

/** Distance in pixels between a label and the edge of the picture. */
const EDGE = 8;

/** Distance in pixels between a label and the rim. */
const RIM_GAP = 3;

/** Even and odd crossings of a ray to the right. */
function isWithin(outline: readonly Point[], [x, y]: Point): boolean {
  let inside = false;
  outline.forEach(([ax, ay], k) => {
    const [bx, by] = outline[(k + 1) % outline.length] ?? [ax, ay];
    if (ay > y !== by > y && x < ax + ((y - ay) / (by - ay)) * (bx - ax)) inside = !inside;
  });
  return inside;
}

/** Separating axes of two turned rectangles. */
function overlaps(a: LabelBox, b: LabelBox): boolean {
  const corners = [cornersOf(a), cornersOf(b)] as const;
  return [a.turn, a.turn + 90, b.turn, b.turn + 90].every((turn) => {
    const angle = (turn * Math.PI) / 180;
    const spans = corners.map((points) => {
      const along = points.map(([x, y]) => x * Math.cos(angle) + y * Math.sin(angle));
      return [Math.min(...along), Math.max(...along)] as const;
    });
    const [[low, high], [otherLow, otherHigh]] = spans as [readonly [number, number], readonly [number, number]];
    return low < otherHigh && otherLow < high;
  });
}

function cornersOf({ x, y, width, height, turn }: LabelBox): Point[] {
  const angle = (turn * Math.PI) / 180;
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return [
    [-1, -1],
    [1, -1],
    [1, 1],
    [-1, 1],
  ].map(([u = 0, v = 0]): Point => {
    // prettier-ignore
    const [dx, dy] = [(u * width) / 2, (v * height) / 2];
    return [x + c * dx - s * dy, y + s * dx + c * dy];
  });
}

/** Places along a line where a text of this many characters lies nearly straight on it, upright, the straightest first. */
export function placesAlong(points: readonly Point[], characters: number, size: number): LabelBox[] {
  const width = characters * CHARACTER * size + 6;
  const lengths = [0];
  for (let k = 1; k < points.length; k++) lengths.push((lengths[k - 1] ?? 0) + distance(points[k - 1], points[k]));
  const total = lengths.at(-1) ?? 0;
  const places: { box: LabelBox; straightness: number }[] = [];
  for (let start = 0, k = 0; start + width < total; start += width / 3) {
    while ((lengths[k + 1] ?? Infinity) <= start) k++;
    let end = k;
    while ((lengths[end] ?? Infinity) < start + width) end++;
    const [a, b] = [points[k], points[end]];
    if (!a || !b) break;
    const straightness = distance(a, b) / ((lengths[end] ?? 0) - (lengths[k] ?? 0));
    if (straightness < STRAIGHT) continue;
    const turn = (Math.atan2(b[1] - a[1], b[0] - a[0]) * 180) / Math.PI;
    const upright = turn > 90 ? turn - 180 : turn <= -90 ? turn + 180 : turn;
    const middle = points[Math.round((k + end) / 2)] ?? a;
    places.push({ box: { x: middle[0], y: middle[1], width, height: size + 2, turn: upright }, straightness });
  }
  return places
    .sort((p, q) => q.straightness - Math.abs(q.box.turn) / 400 - (p.straightness - Math.abs(p.box.turn) / 400))
    .map(({ box }) => box);
}

const STRAIGHT = 0.96;

function distance(a: Point | undefined, b: Point | undefined): number {
  return a && b ? Math.hypot(a[0] - b[0], a[1] - b[1]) : 0;
}
