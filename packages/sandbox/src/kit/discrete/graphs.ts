import { requireFinite, requireList, requireWhole } from '../require.js';

/** Points of a chain at most. */
const MOST_POINTS = 1024;

/** Rates of a walk: row x, column y holds the rate x → y; the diagonal is 0. */
export type Rates = number[][];

/** Walk on the cycle of n ≥ 3 points, the given rate along each edge in both directions. */
export function cycleGraph(n: number, rate = 1): Rates {
  requireWhole(n, 3, MOST_POINTS, 'the number of points');
  return rates(n, rate, (x, y) => (x - y + n) % n === 1 || (y - x + n) % n === 1);
}

/** Walk on the path of n ≥ 2 points. */
export function pathGraph(n: number, rate = 1): Rates {
  requireWhole(n, 2, MOST_POINTS, 'the number of points');
  return rates(n, rate, (x, y) => Math.abs(x - y) === 1);
}

/** Walk on the complete graph of n ≥ 2 points. */
export function completeGraph(n: number, rate = 1): Rates {
  requireWhole(n, 2, MOST_POINTS, 'the number of points');
  return rates(n, rate, (x, y) => x !== y);
}

/** Walk on {0,1}^d; points are numbers whose binary digits are the coordinates. */
export function hypercubeGraph(d: number, rate = 1): Rates {
  requireWhole(d, 1, 10, 'the dimension');
  return rates(2 ** d, rate, (x, y) => x !== y && ((x ^ y) & ((x ^ y) - 1)) === 0);
}

/** Walk on the grid of the given side lengths, neighbours at distance 1; the last coordinate runs fastest. */
export function gridGraph(sides: readonly number[], rate = 1): Rates {
  requireList(sides, 'the sides');
  for (const side of sides) requireWhole(side, 1, MOST_POINTS, 'a side');
  const n = sides.reduce((product, side) => product * side, 1);
  requireWhole(n, 2, MOST_POINTS, 'the number of points');
  const points = Array.from({ length: n }, (_, x) => coordinates(x, sides));
  return rates(n, rate, (x, y) => points[x].reduce((sum, c, k) => sum + Math.abs(c - points[y][k]), 0) === 1);
}

/** Walk along the edges [x, y] or [x, y, rate] of a graph on n points, in both directions. */
export function edgeGraph(n: number, edges: readonly (readonly number[])[]): Rates {
  requireWhole(n, 2, MOST_POINTS, 'the number of points');
  const result = rates(n, 0, () => false);
  for (const [x, y, rate = 1] of edges) {
    requireWhole(x, 0, n - 1, 'an end of an edge');
    requireWhole(y, 0, n - 1, 'an end of an edge');
    if (x === y) throw new RangeError(`expected edges between two points, got one from ${x} to itself`);
    requireFinite(rate, 'the rate of an edge');
    result[x][y] += rate;
    result[y][x] += rate;
  }
  return result;
}

/** Chain on 0…n−1 with rates births[x] for x → x+1 and deaths[x] for x+1 → x, each of length n−1. */
export function birthDeathChain(births: readonly number[], deaths: readonly number[]): Rates {
  requireList(births, 'the births');
  requireList(deaths, 'the deaths');
  if (births.length !== deaths.length) {
    throw new RangeError(`expected as many deaths as births, got ${births.length} and ${deaths.length}`);
  }
  const n = births.length + 1;
  requireWhole(n, 2, MOST_POINTS, 'the number of points');
  const result = rates(n, 0, () => false);
  births.forEach((rate, x) => {
    requireFinite(rate, `birth ${x}`);
    requireFinite(deaths[x], `death ${x}`);
    result[x][x + 1] = rate;
    result[x + 1][x] = deaths[x];
  });
  return result;
}

function rates(n: number, rate: number, isEdge: (x: number, y: number) => boolean): Rates {
  requireFinite(rate, 'the rate');
  return Array.from({ length: n }, (_, x) => Array.from({ length: n }, (_, y) => (isEdge(x, y) ? rate : 0)));
}

function coordinates(point: number, sides: readonly number[]): number[] {
  const result = new Array<number>(sides.length);
  let rest = point;
  for (let k = sides.length - 1; k >= 0; k--) {
    result[k] = rest % sides[k];
    rest = Math.floor(rest / sides[k]);
  }
  return result;
}
