import { scaleLinear } from 'd3-scale';
import type { Point } from './contour-lines.js';
import type { ReliefData } from './relief-data.js';

/** How a slice is put on paper. */
export interface Projection {
  readonly to: (point: Point) => Point;
  /** Pixels per unit of the slice. */
  readonly scale: number;
  /** Box around the slice, pixels. */
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
  /** Coordinates at the sides of the box. */
  readonly domain: { readonly x: readonly [number, number]; readonly y: readonly [number, number] };
  readonly rim: readonly Point[];
}

/** Fits the slice, in true proportion, into a box centred at `middle` below `top`. */
export function projectSlice(
  { slice, grid }: ReliefData,
  { middle, top, width, height }: { middle: number; top: number; width: number; height: number },
): Projection {
  const disc = slice.kind === 'bloch disc';
  const rim = Array.from({ length: grid.rimX.length }, (_, k): Point => [grid.rimX[k] ?? 0, grid.rimY[k] ?? 0]);
  const range = (values: readonly number[]): [number, number] => [Math.min(...values), Math.max(...values)];
  const x: [number, number] = disc ? [-1, 1] : range(rim.map(([u]) => u));
  const y: [number, number] = disc ? [-1, 1] : range(rim.map(([, v]) => v));
  const scale = Math.min(width / (x[1] - x[0]), height / (y[1] - y[0]));
  const half = (scale * (x[1] - x[0])) / 2;
  const bottom = top + scale * (y[1] - y[0]);
  const across = scaleLinear(x, [middle - half, middle + half]);
  const up = scaleLinear(y, [bottom, top]);
  return {
    to: ([u, v]) => [across(u), up(v)],
    scale,
    left: middle - half,
    right: middle + half,
    top,
    bottom,
    domain: { x, y },
    rim: rim.map(([u, v]): Point => [across(u), up(v)]),
  };
}
