import { scaleLinear } from 'd3-scale';
import type { BracketRow } from './bracket.js';

/** The common axis of all gauges. */
export interface Axis {
  readonly from: number;
  readonly to: number;
  readonly ticks: readonly number[];
}

/** An end further out than this times the median of all is drawn at the edge, as an arrow. */
const FAR = 6;

/** From 0, or the lowest end below it, to the largest end that is not far out; null where no end is finite. */
export function gaugeAxis(rows: readonly BracketRow[]): Axis | null {
  const values = rows.flatMap(({ lower, upper }) => [lower?.value, upper?.value]).filter(isFiniteNumber);
  if (values.length === 0) return null;
  const sizes = values.map(Math.abs).sort((a, b) => a - b);
  const median = sizes[Math.floor(sizes.length / 2)] ?? 0;
  const near = values.filter((value) => median === 0 || Math.abs(value) <= FAR * median);
  const [least, most] = [Math.min(0, ...near), Math.max(0, ...near)];
  const span = most > least ? most - least : 1;
  const scale = scaleLinear([least - (least < 0 ? 0.04 * span : 0), least + 1.06 * span], [0, 1]);
  const [from = 0, to = 1] = scale.domain();
  return { from, to, ticks: scale.ticks(4) };
}

function isFiniteNumber(value: number | undefined): value is number {
  return value !== undefined && Number.isFinite(value);
}
