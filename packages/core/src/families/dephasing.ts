import { blockAlgebra } from '../algebra/block-algebra.js';
import { expectationGenerator } from '../generator/expectation-generator.js';
import type { Generator } from '../generator/generator.js';
import { requireWhole } from './check-parameter.js';

/** L(A) = rate (diag(A) − A) on M_n, 1 ≤ n ≤ 32. Not primitive: the fixed points are the diagonal matrices. */
export function dephasing(n: number, rate = 1): Generator {
  requireWhole(n, 1, 32, 'the dimension');
  return expectationGenerator({ algebra: blockAlgebra([n]), onto: { diagonal: true }, rate });
}
