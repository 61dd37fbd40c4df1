import { describe, expect, it } from 'vitest';
import {
  basisElement,
  blockAlgebra,
  fromCoordinates,
  isCommutative,
  offBlockResidual,
  projectToAlgebra,
  sameAlgebra,
  toCoordinates,
} from '../../src/algebra/block-algebra.js';
import { blockEigen } from '../../src/algebra/block-eigen.js';
import {
  diagonal,
  frobeniusNorm,
  fromEntries,
  fromRows,
  hermitianPart,
  hermiticityResidual,
  identity,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

describe('blockAlgebra', () => {
  it('lists sizes, offsets and blocks', () => {
    const algebra = blockAlgebra([2, 1, 3]);
    expect(algebra).toMatchObject({ size: 6, dimension: 14, offsets: [0, 2, 3] });
    expect([...algebra.blockOf]).toEqual([0, 0, 1, 2, 2, 2]);
    expect(isCommutative(algebra)).toBe(false);
    expect(isCommutative(blockAlgebra([1, 1]))).toBe(true);
    expect(sameAlgebra(algebra, blockAlgebra([2, 1, 3]))).toBe(true);
    expect(sameAlgebra(algebra, blockAlgebra([1, 2, 3]))).toBe(false);
  });

  it('refuses sizes that are no positive whole numbers', () => {
    for (const blocks of [[], [0], [1.5], [-2], [NaN]]) {
      expectError(() => blockAlgebra(blocks), 'dimension-mismatch', /positive whole numbers, got \[/, '/algebra');
    }
  });

  it('has an orthonormal Hermitian basis, and coordinates that invert it', () => {
    const algebra = blockAlgebra([2, 3]);
    const basis = Array.from({ length: algebra.dimension }, (_, k) => basisElement(algebra, k));
    basis.forEach((a, i) => {
      expect(hermiticityResidual(a)).toBe(0);
      expect(offBlockResidual(algebra, a)).toBe(0);
      basis.forEach((b, j) => expectClose(innerProduct(a, b).re, i === j ? 1 : 0, 1e-15, `<${i},${j}>`));
    });
    const random = seededRandom('coordinates');
    const a = projectToAlgebra(algebra, hermitianPart(randomMatrix(random, 5)));
    expectBelow(frobeniusNorm(subtract(fromCoordinates(algebra, toCoordinates(algebra, a)), a)), 1e-14, 'round trip');
  });

  it('takes the coordinates of the Hermitian part', () => {
    const algebra = blockAlgebra([3]);
    const a = randomMatrix(seededRandom('Hermitian part'), 3);
    expectAllClose(toCoordinates(algebra, a), toCoordinates(algebra, hermitianPart(a)), 1e-15);
  });

  it('measures what lies outside the blocks', () => {
    const a = fromRows([[1, 3], [4, 1]], [[0, 4], [0, 0]]); // prettier-ignore
    expect(offBlockResidual(blockAlgebra([1, 1]), a)).toBe(5);
    expect(offBlockResidual(blockAlgebra([2]), a)).toBe(0);
  });
});

describe('blockEigen', () => {
  it('diagonalises block by block', () => {
    const algebra = blockAlgebra([2, 1, 3]);
    const a = projectToAlgebra(algebra, hermitianPart(randomMatrix(seededRandom('blocks'), 6)));
    const { values, vectors, exact } = blockEigen(algebra, a);
    expect(exact).toBe(false);
    expect(offBlockResidual(algebra, vectors)).toBe(0);
    expectBelow(frobeniusNorm(subtract(multiplyAdjointFirst(vectors, vectors), identity(6))), 1e-14, 'U*U − 1');
    const rebuilt = multiplyAdjointSecond(multiply(vectors, diagonal(values)), vectors);
    expectBelow(frobeniusNorm(subtract(rebuilt, a)), 1e-13, 'UΛU* − A');
  });

  it('leaves an exactly diagonal matrix alone, whatever its order', () => {
    const { values, vectors, exact } = blockEigen(blockAlgebra([3]), diagonal([0.5, 1e-30, 0.2]));
    expect([...values]).toEqual([0.5, 1e-30, 0.2]);
    expect(exact).toBe(true);
    expectBelow(frobeniusNorm(subtract(vectors, identity(3))), Number.MIN_VALUE, 'U − 1');
  });

  it('keeps a diagonal block exact beside one that is not', () => {
    const a = fromEntries(3, 3, (i, j) => [i === j ? [0.5, 0.3, 1e-20][i] : i < 2 && j < 2 ? 0.1 : 0, 0]);
    const { values, exact } = blockEigen(blockAlgebra([2, 1]), a);
    expect(exact).toBe(false);
    expect(values[2]).toBe(1e-20);
  });
});
