import type { Generator } from '../generator/generator.js';
import { ratesGenerator } from '../generator/rates-generator.js';
import { requireWhole } from './check-parameter.js';

/** Walk on the cycle of n ≥ 3 points, the given rate to each neighbour; gap = 2 rate (1 − cos 2π/n). */
export function cycle(n: number, rate = 1): Generator {
  requireWhole(n, 3, 1024, 'the number of points');
  return ratesGenerator(
    Array.from({ length: n }, (_, x) =>
      Array.from({ length: n }, (_, y) => ((x - y + n) % n === 1 || (y - x + n) % n === 1 ? rate : 0)),
    ),
  );
}
