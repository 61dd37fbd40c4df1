import { kron } from '../matrix/products.js';
import { matrix, type Matrix, type MatrixLike } from '../matrix/matrix.js';
import { identity } from '../matrix/special.js';
import { requireWhole } from '../require.js';

const MOST_SITES = 12;

/** 1 ⊗ … ⊗ a ⊗ … ⊗ 1 on n systems of the size of a, with a on site k = 0…n−1. */
export function site(n: number, k: number, a: MatrixLike): Matrix {
  return sites(n, [[k, a]]);
}

/** The same with several operators [k, a] on different sites, all of one size: `sites(3, [[0, x], [2, x]])` is x ⊗ 1 ⊗ x. */
export function sites(n: number, operators: readonly (readonly [number, MatrixLike])[]): Matrix {
  requireWhole(n, 1, MOST_SITES, 'the number of systems');
  const factors = new Array<Matrix | null>(n).fill(null);
  let size = 0;
  for (const [k, a] of operators) {
    requireWhole(k, 0, n - 1, 'a site');
    if (factors[k] !== null) throw new RangeError(`expected one operator on site ${k}, got another`);
    const operator = matrix(a);
    const [rows, columns] = operator.shape;
    size ||= rows;
    if (rows !== size || columns !== size) {
      throw new RangeError(`expected operators of shape ${size} × ${size}, got ${rows} × ${columns} on site ${k}`);
    }
    factors[k] = operator;
  }
  if (size === 0) throw new TypeError('expected at least one operator, got none');
  const one = identity(size);
  return kron(...factors.map((factor) => factor ?? one));
}
