import { contours } from 'd3-contour';
import type { ReliefField } from './relief-data.js';

export type Point = readonly [number, number];

/** One line of equal κ in the coordinates of the slice. */
export interface ContourLine {
  readonly points: readonly Point[];
  readonly closed: boolean;
}

/**
 * Lines κ = level. Marching squares run over rings and rays, so that lines follow the rim instead of jittering along it; the ray
 * at angle 0 is there twice, and lines are joined across it. Lines end at the last ring and where κ is not defined.
 */
export function contourLines(field: ReliefField, level: number): ContourLine[] {
  const { rings, rays, kappa } = field;
  const columns = rays + 1;
  const values = Array.from({ length: rings * columns }, (_, k) => {
    const value = kappa[Math.floor(k / columns) * rays + ((k % columns) % rays)];
    return value ?? NaN;
  });
  const shape = contours().size([columns, rings]).contour(values, level);
  const defined = (x: number, y: number): boolean => isDefined(values, columns, rings, x, y);
  const pieces = shape.coordinates.flatMap((polygon) =>
    polygon.flatMap((ring) => brokenAt(ring as [number, number][], columns, rings, defined)),
  );
  return joinAcrossSeam(pieces, rays).map(({ points, closed }) => ({
    closed,
    points: points.map(([x, y]) => onSlice(field, x, y)),
  }));
}

interface Piece {
  /** Ray and ring, as fractions. */
  points: [number, number][];
  closed: boolean;
}

/** Grid coordinates of d3 count from the corner of a cell, half a cell before its value; a ring outside of that is its frame. */
function brokenAt(
  ring: readonly (readonly [number, number])[],
  columns: number,
  rows: number,
  defined: (x: number, y: number) => boolean,
): Piece[] {
  const places = ring.map(([x, y]): [number, number] => [x - 0.5, y - 0.5]);
  const inside = ([x, y]: readonly [number, number]): boolean => x >= 0 && y >= 0 && x <= columns - 1 && y <= rows - 1;
  const pieces: Piece[] = [];
  let current: [number, number][] = [];
  const finish = (): void => {
    if (current.length > 1) pieces.push({ points: current, closed: false });
    current = [];
  };
  for (let k = 0; k + 1 < places.length; k++) {
    const [a, b] = [places[k], places[k + 1]];
    if (!a || !b || !inside(a) || !inside(b) || !defined((a[0] + b[0]) / 2, (a[1] + b[1]) / 2)) {
      finish();
      continue;
    }
    if (current.length === 0) current.push(a);
    current.push(b);
  }
  const unbroken = pieces.length === 0 && current.length === places.length;
  finish();
  const [first, last] = [pieces[0], pieces.at(-1)];
  if (unbroken && first) return [{ points: first.points, closed: true }];
  // A ring begins anywhere: its first and last piece are one where they meet.
  if (first && last && first !== last && isSame(first.points[0], last.points.at(-1))) {
    return [{ points: [...last.points, ...first.points.slice(1)], closed: false }, ...pieces.slice(1, -1)];
  }
  return pieces;
}

function isDefined(values: readonly number[], columns: number, rows: number, x: number, y: number): boolean {
  const [i, j] = [Math.min(columns - 2, Math.floor(x)), Math.min(rows - 2, Math.floor(y))];
  return [0, 1].every((di) => [0, 1].every((dj) => !Number.isNaN(values[(j + dj) * columns + i + di])));
}

function isSame(a: readonly [number, number] | undefined, b: readonly [number, number] | undefined): boolean {
  return a !== undefined && b !== undefined && Math.hypot(a[0] - b[0], a[1] - b[1]) < 1e-9;
}

const SEAM = 1e-6;

/** Joins pieces that end on ray 0 and on its copy, ray `rays`, at the same ring. */
function joinAcrossSeam(pieces: readonly Piece[], rays: number): Piece[] {
  const open = pieces.filter(({ closed }) => !closed);
  const done: Piece[] = pieces.filter(({ closed }) => closed);
  for (let piece = open.pop(); piece; piece = open.pop()) {
    let points = piece.points;
    let closed = false;
    for (let found = true; found;) {
      found = false;
      const tail = points.at(-1);
      if (tail && meetsAcross(tail, points[0], rays)) {
        closed = true;
        break;
      }
      for (const [k, other] of open.entries()) {
        const oriented = orientedFor(tail, other.points, rays);
        if (oriented === null) continue;
        points = [...points, ...oriented];
        open.splice(k, 1);
        found = true;
        break;
      }
      if (!found && !closed && startsOnSeam(points, rays, open)) {
        points = [...points].reverse();
        found = true;
      }
    }
    done.push({ points, closed });
  }
  return done;
}

function meetsAcross(
  a: readonly [number, number] | undefined,
  b: readonly [number, number] | undefined,
  rays: number,
): boolean {
  if (!a || !b) return false;
  return Math.abs(Math.abs(a[0] - b[0]) - rays) < SEAM && Math.abs(a[1] - b[1]) < SEAM;
}

/** The other piece, turned so that it goes on from `tail`; null when it does not meet it. */
function orientedFor(
  tail: readonly [number, number] | undefined,
  other: [number, number][],
  rays: number,
): [number, number][] | null {
  if (meetsAcross(tail, other[0], rays)) return other;
  return meetsAcross(tail, other.at(-1), rays) ? [...other].reverse() : null;
}

/** Whether the piece, turned around, could go on. */
function startsOnSeam(points: readonly [number, number][], rays: number, open: readonly Piece[]): boolean {
  return open.some((other) => orientedFor(points[0], other.points, rays) !== null);
}

/** Between the four nodes around a place on the grid, linear in both directions. */
function onSlice({ rays, rings, x, y }: ReliefField, ray: number, ring: number): Point {
  const i = Math.min(rings - 2, Math.floor(ring));
  const j = Math.floor(ray);
  const [v, u] = [ring - i, ray - j];
  const node = (of: ArrayLike<number>, di: number, dj: number): number => of[(i + di) * rays + ((j + dj) % rays)] ?? 0;
  const mix = (of: ArrayLike<number>): number =>
    (1 - v) * ((1 - u) * node(of, 0, 0) + u * node(of, 0, 1)) + v * ((1 - u) * node(of, 1, 0) + u * node(of, 1, 1));
  return [mix(x), mix(y)];
}
