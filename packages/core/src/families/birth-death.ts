import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import { ratesGenerator } from '../generator/rates-generator.js';
import { requireWhole } from './check-parameter.js';

/** Chain on 0…n−1 with rates births[x] for x→x+1 and deaths[x] for x+1→x, each of length n−1. Reversible when all are positive. */
export function birthDeath(births: readonly number[], deaths: readonly number[]): Generator {
  if (births.length !== deaths.length || births.length === 0) {
    throw new ThalwegError(
      'usage',
      `expected as many births as deaths, at least one, got ${births.length} and ${deaths.length}`,
    );
  }
  const n = births.length + 1;
  return ratesGenerator(
    Array.from({ length: n }, (_, x) =>
      Array.from({ length: n }, (_, y) => (y === x + 1 ? births[x] : x === y + 1 ? deaths[y] : 0)),
    ),
  );
}

/** Walk on the path of n points with the given rate along every edge; gap = 2 rate (1 − cos π/n). */
export function path(n: number, rate = 1): Generator {
  requireWhole(n, 2, 1024, 'the number of points');
  const rates = new Array<number>(n - 1).fill(rate);
  return birthDeath(rates, rates);
}
