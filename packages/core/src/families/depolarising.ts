import { blockAlgebra } from '../algebra/block-algebra.js';
import { expectationGenerator } from '../generator/expectation-generator.js';
import type { Generator } from '../generator/generator.js';
import { requireWhole } from './check-parameter.js';

/** L(A) = rate (Tr(A)/n · 1 − A) on M_n, 1 ≤ n ≤ 32. Gap = rate; complete gradient bound for n=2 is ¾ rate. */
export function depolarising(n: number, rate = 1): Generator {
  requireWhole(n, 1, 32, 'the dimension');
  return expectationGenerator({ algebra: blockAlgebra([n]), onto: { scalars: true }, rate });
}
