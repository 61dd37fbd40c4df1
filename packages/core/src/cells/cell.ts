import { type Interval, ZERO, point, sub } from '../checker/arithmetic/interval.js';
import type { Jet } from './jet.js';

/** A box of parameters; an upper end may be ∞. */
export type Cell = readonly Interval[];

export function isBounded({ hi }: Interval): boolean {
  return hi < Infinity;
}

function centreOf(range: Interval): Interval {
  return isBounded(range) ? point(middle(range)) : range;
}

/** The coordinate functions on a cell. An unbounded one has its range for a centre and does not move: slopes are about the others. */
export function coordinateJets(cell: Cell): Jet[] {
  return cell.map((range, k) => ({
    range,
    centre: centreOf(range),
    slopes: cell.map((_, l) => point(l === k && isBounded(range) ? 1 : 0)),
  }));
}

/** x − centre over the cell, for every coordinate; zero where the centre is the whole range. */
export function displacements(cell: Cell): Interval[] {
  return cell.map((range) => (isBounded(range) ? sub(range, centreOf(range)) : ZERO));
}

/** Two halves along one coordinate; [a,∞] falls into [a,2a+1] and the rest. */
export function halves(cell: Cell, k: number): [Cell, Cell] {
  const { lo, hi } = cell[k];
  const at = hi < Infinity ? middle(cell[k]) : 2 * lo + 1;
  const part = (range: Interval): Cell => cell.map((old, l) => (l === k ? range : old));
  return [part({ lo, hi: at }), part({ lo: at, hi })];
}

function middle({ lo, hi }: Interval): number {
  return lo + (hi - lo) / 2;
}
