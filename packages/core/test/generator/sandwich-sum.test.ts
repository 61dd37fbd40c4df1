import { describe, expect, it } from 'vitest';
import { sandwichSum } from '../../src/generator/sandwich-sum.js';
import {
  type ComplexMatrix,
  addScaledInto,
  diagonal,
  fromEntries,
  frobeniusNorm,
  hermitianPart,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  scale,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { randomMatrix, shuffle } from '../linalg/support/inputs.js';
import { expectBelow } from '../linalg/support/expect-close.js';

const N = 7;
const random = seededRandom('sandwich sum');

/** Σ XAX* + AY + Y*A with dense products. */
function plain(factors: readonly ComplexMatrix[], drift: ComplexMatrix | null, a: ComplexMatrix): ComplexMatrix {
  const out = zeros(N);
  for (const x of factors) addScaledInto(out, multiplyAdjointSecond(multiply(x, a), x), 1);
  if (drift) addScaledInto(addScaledInto(out, multiply(a, drift), 1), multiplyAdjointFirst(drift, a), 1);
  return out;
}

/** Some rows of a permutation matrix with given values, the others empty. */
function monomial(rows: number, value: () => [number, number]): ComplexMatrix {
  const columns = shuffle(
    random,
    Array.from({ length: N }, (_, j) => j),
  );
  return fromEntries(N, N, (i, j) => (i < rows && j === columns[i] ? value() : [0, 0]));
}

const complex = (): [number, number] => [random.normal(), random.normal()];
const CASES: [string, ComplexMatrix[], ComplexMatrix | null][] = [
  ['nothing', [], null],
  ['a real permutation', [monomial(N, () => [random.normal(), 0])], null],
  ['an imaginary one, whose phase drops out', [monomial(N, () => [0, random.normal()])], null],
  ['six permutations, four of them together', Array.from({ length: 6 }, (_, k) => monomial(N, () => (k % 2 === 0 ? [random.normal(), 0] : [0, random.normal()]))), null],
  ['complex monomials with empty rows', [monomial(3, complex), monomial(N, complex), monomial(1, complex)], null],
  ['diagonal matrices, real and complex', [diagonal([1, -1, 2, 0, 1, 1, 3]), fromEntries(N, N, (i, j) => (i === j ? complex() : [0, 0]))], null],
  ['a diagonal drift alone', [], fromEntries(N, N, (i, j) => (i === j && i !== 2 ? complex() : [0, 0]))],
  ['a full drift', [], randomMatrix(random, N)],
  ['dense matrices', [randomMatrix(random, N), randomMatrix(random, N)], null],
  ['two entries in one column', [fromEntries(N, N, (i, j) => (j === 2 && i < 2 ? complex() : [0, 0]))], null],
  ['all together', [monomial(N, complex), diagonal([1, 2, 3, 4, 5, 6, 7]), randomMatrix(random, N), scale(monomial(4, complex), 0, 1)], randomMatrix(random, N)],
]; // prettier-ignore

describe.each(CASES)('the sum of sandwiches: %s', (_, factors, drift) => {
  const sum = sandwichSum(N, factors.map(sparseFromDense), drift && sparseFromDense(drift));

  it('is its formula, on matrices that are not Hermitian too, whatever stood in the result', () => {
    const a = randomMatrix(random, N);
    const out = randomMatrix(random, N);
    sum(a, out);
    const expected = plain(factors, drift, a);
    expectBelow(frobeniusNorm(subtract(out, expected)), 1e-13 * (1 + frobeniusNorm(expected)), 'difference');
  });

  it('has the right upper triangle when only that is asked for', () => {
    const a = hermitianPart(randomMatrix(random, N));
    const out = randomMatrix(random, N);
    sum(a, out, true);
    const difference = subtract(out, plain(factors, drift, a));
    const upper = fromEntries(N, N, (i, j) => (i <= j ? [difference.re[i * N + j], difference.im[i * N + j]] : [0, 0]));
    expectBelow(frobeniusNorm(upper), 1e-12, 'difference above the diagonal');
  });
});

it('a monomial takes the short way: below the diagonal nothing is computed for it', () => {
  const swap = sparseFromDense(fromEntries(2, 2, (i, j) => [i === j ? 0 : 1, 0]));
  const sum = sandwichSum(2, [swap], null);
  const a = fromEntries(2, 2, (i, j) => [i === j ? 1 + i : 3, i - j]);
  const out = zeros(2);
  sum(a, out, true);
  expect([...out.re]).toEqual([2, 3, 0, 1]);
  expect(denseFromSparse(swap).re[2]).toBe(1);
});
