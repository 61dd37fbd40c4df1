import { ThalwegError } from '../errors.js';
import { log } from '../checker/arithmetic/interval-log.js';
import { type Interval, ZERO, add, div, mul, point, sub } from '../checker/arithmetic/interval.js';

/** Rates x→y of a chain in the order of a chart, row x, column y, each enclosed; the diagonal is not read. */
export type ChainRates = readonly (readonly Interval[])[];

/** An unordered pair of points x < y with rates, and its functionals in the coordinates of a spanning tree. */
export interface ChainEdge {
  readonly x: number;
  readonly y: number;
  /** log(r_xy/r_yx). */
  readonly bias: Interval;
  /** d a = a_y − a_x: entries 0, ±1. */
  readonly difference: readonly number[];
  /** d L a. */
  readonly flow: readonly Interval[];
}

/**
 * The edges of a connected chain. Coordinates of observables modulo constants are the differences along a spanning tree that grows
 * from the first point, the largest in its chart, by the largest points next: the factors that tend to ∞ at the boundary then stand
 * on the diagonal of the form, where they do not cancel.
 */
export function chainEdges(rates: ChainRates): ChainEdge[] {
  const n = rates.length;
  const values = treeValues(rates);
  const rows = rates.map((row, x) =>
    Array.from({ length: n - 1 }, (_, k) =>
      row.reduce((sum, r, v) => (v === x ? sum : add(sum, mul(r, point(values[v][k] - values[x][k])))), ZERO),
    ),
  );
  const edges: ChainEdge[] = [];
  for (let x = 0; x < n; x++) {
    for (let y = x + 1; y < n; y++) {
      if (!isJoined(rates, x, y)) continue;
      const difference = values[y].map((value, k) => value - values[x][k]);
      const flow = rows[y].map((value, k) => sub(value, rows[x][k]));
      edges.push({ x, y, bias: log(div(rates[x][y], rates[y][x])), difference, flow });
    }
  }
  return edges;
}

/** a_x − a_1 in the coordinates, a row a point. */
function treeValues(rates: ChainRates): number[][] {
  const n = rates.length;
  const values: number[][] = [new Array<number>(n - 1).fill(0)];
  for (let k = 0; k < n - 1; k++) {
    let y = 0;
    let x = -1;
    while (x < 0 && ++y < n) if (!values[y]) x = rates.findIndex((_, from) => values[from] && isJoined(rates, from, y));
    if (x < 0) throw new ThalwegError('internal', 'expected a connected chain');
    values[y] = values[x].map((value, l) => (l === k ? 1 : value));
  }
  return values;
}

function isJoined(rates: ChainRates, x: number, y: number): boolean {
  return rates[x][y].lo > 0 && rates[y][x].lo > 0;
}
