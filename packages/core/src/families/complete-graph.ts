import type { Generator } from '../generator/generator.js';
import { ratesGenerator } from '../generator/rates-generator.js';
import { requireWhole } from './check-parameter.js';

/** Walk that jumps from any of n points to any other with the given rate, 1/n when left out; n ≤ 256. Then gap = 1 and be = ½ + 1/n. */
export function completeGraph(n: number, rate = 1 / n): Generator {
  requireWhole(n, 2, 256, 'the number of points');
  return ratesGenerator(Array.from({ length: n }, (_, x) => Array.from({ length: n }, (_, y) => (x === y ? 0 : rate))));
}
