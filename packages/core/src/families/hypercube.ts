import type { Generator } from '../generator/generator.js';
import { ratesGenerator } from '../generator/rates-generator.js';
import { requireWhole } from './check-parameter.js';

/** Random walk on {0,1}^d with the given rate along every edge, d ≤ 9; ge = 2 rate (Erbar & Maas, Arch. Ration. Mech. Anal. 206 (2012)). */
export function hypercube(d: number, rate = 1): Generator {
  requireWhole(d, 1, 9, 'the dimension');
  const n = 2 ** d;
  const oneBit = (x: number): boolean => x > 0 && (x & (x - 1)) === 0;
  return ratesGenerator(
    Array.from({ length: n }, (_, x) => Array.from({ length: n }, (_, y) => (oneBit(x ^ y) ? rate : 0))),
  );
}
