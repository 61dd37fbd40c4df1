import { describe, expect, it } from 'vitest';
import { blockAlgebra, offBlockResidual } from '../../src/algebra/block-algebra.js';
import { type AlgebraDecomposition, decomposeAlgebra, reduceToBlocks } from '../../src/algebra/decompose-algebra.js';
import {
  type ComplexMatrix,
  add,
  adjoint,
  directSum,
  frobeniusNorm,
  identity,
  kronecker,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  scale,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { type Random, seededRandom } from '../../src/random.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix, randomUnitary } from '../linalg/support/inputs.js';
import { expectBelow } from '../linalg/support/expect-close.js';

/** Random matrices that span ⊕ M_n ⊗ 1_m, rotated by u; as many as the dimension. */
function hiddenAlgebra(
  parts: readonly (readonly [number, number])[],
  u: ComplexMatrix,
  random: Random,
): ComplexMatrix[] {
  const dimension = parts.reduce((sum, [n]) => sum + n * n, 0);
  return Array.from({ length: dimension }, () => {
    const a = directSum(parts.map(([n, m]) => kronecker(randomMatrix(random, n), identity(m))));
    return multiplyAdjointSecond(multiply(u, a), u);
  });
}

/** W*W = 1, products and adjoints are respected, central projections are the units of the blocks. */
function expectIsomorphism(found: AlgebraDecomposition, spanning: readonly ComplexMatrix[]): void {
  const { isometry, blocks, centralProjections } = found;
  const algebra = blockAlgebra(blocks);
  expectBelow(
    frobeniusNorm(subtract(multiplyAdjointFirst(isometry, isometry), identity(algebra.size))),
    1e-12,
    'W*W − 1',
  );
  const reduce = (a: ComplexMatrix) => reduceToBlocks(found, a);
  const [a, b] = [spanning[0], spanning[spanning.length - 1]];
  const scaleAB = frobeniusNorm(a) * frobeniusNorm(b);
  expect(offBlockResidual(algebra, multiplyAdjointFirst(isometry, multiply(a, isometry)))).toBeLessThan(
    1e-10 * frobeniusNorm(a),
  );
  expectBelow(
    frobeniusNorm(subtract(reduce(multiply(a, b)), multiply(reduce(a), reduce(b)))),
    1e-10 * scaleAB,
    'product',
  );
  expectBelow(frobeniusNorm(subtract(reduce(adjoint(a)), adjoint(reduce(a)))), 1e-10 * frobeniusNorm(a), 'adjoint');
  let sum = zeros(isometry.rows);
  centralProjections.forEach((p, k) => {
    sum = add(sum, p);
    expectBelow(frobeniusNorm(subtract(multiply(p, p), p)), 1e-10, `projection ${k}`);
    expectBelow(frobeniusNorm(subtract(multiply(p, a), multiply(a, p))), 1e-10 * frobeniusNorm(a), `centre ${k}`);
  });
  expectBelow(frobeniusNorm(subtract(sum, identity(isometry.rows))), 1e-10, 'sum of the central projections');
}

const PARTS: [number, number][][] = [
  [[1, 1]],
  [[1, 3]],
  [[3, 1]],
  [[2, 2]],
  [
    [1, 1],
    [1, 1],
  ],
  [
    [1, 2],
    [2, 1],
  ],
  [
    [1, 1],
    [1, 3],
    [2, 2],
  ],
  [
    [2, 1],
    [2, 1],
  ],
  [[1, 1], [2, 3], [3, 1]], // prettier-ignore
];

describe('decomposeAlgebra', () => {
  for (const parts of PARTS) {
    const name = parts.map(([n, m]) => `${n}⊗1_${m}`).join(' ⊕ ');
    it(`finds ${name} in a random basis`, () => {
      const random = seededRandom(name);
      const side = parts.reduce((sum, [n, m]) => sum + n * m, 0);
      const spanning = hiddenAlgebra(parts, randomUnitary(random, side), random);
      const found = decomposeAlgebra(spanning);
      expect(found.blocks.map((n, b) => [n, found.multiplicities[b]])).toEqual(parts);
      expectIsomorphism(found, spanning);
    });
  }

  it('does not mind a redundant span, and gives the same twice', () => {
    const random = seededRandom('redundant');
    const base = hiddenAlgebra([[1, 1], [2, 1]], randomUnitary(random, 3), random); // prettier-ignore
    const spanning = [...base, ...base.map((a, k) => add(a, scale(base[(k + 1) % base.length], 0, 2)))];
    const found = decomposeAlgebra(spanning);
    expect(found.blocks).toEqual([1, 2]);
    expect(decomposeAlgebra(spanning)).toEqual(found);
  });

  it('refuses a span that is no algebra', () => {
    const random = seededRandom('no algebra');
    const expected = /span a \*-algebra with identity, got a span of dimension/;
    expectError(() => decomposeAlgebra([identity(3), randomMatrix(random, 3)]), 'not-an-algebra', expected);
    const a = randomMatrix(random, 4);
    expectError(
      () => decomposeAlgebra([identity(4), add(a, adjoint(a)), kronecker(randomMatrix(random, 2), identity(2))]),
      'not-an-algebra',
      expected,
    );
  });
});
