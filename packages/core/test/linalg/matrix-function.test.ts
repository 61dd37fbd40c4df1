import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { diagonal, fromRows, identity, kronecker, multiply, scale, zeros } from '../../src/linalg/complex-matrix.js';
import { hermitianExp, hermitianLog, hermitianPower, hermitianSqrt } from '../../src/linalg/matrix-function.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow } from './support/expect-close.js';
import { randomMatrix, wellConditioned, withSpectrum } from './support/inputs.js';
import { differenceRatio, EIGEN_RATIO } from './support/ratios.js';

describe('functions of Hermitian matrices', () => {
  it('obey their algebra', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer({ min: 0, max: 8 }), fc.boolean(), (seed, n, complex) => {
        const a = wellConditioned(seededRandom(seed), n, complex);
        const root = hermitianSqrt(a);
        expectBelow(differenceRatio(a, multiply(root, root)), EIGEN_RATIO, 'square of the root');
        expectBelow(differenceRatio(a, hermitianExp(hermitianLog(a))), EIGEN_RATIO, 'exponential of the logarithm');
        expectBelow(differenceRatio(identity(n), multiply(hermitianPower(a, -1), a)), EIGEN_RATIO, 'inverse');
        const split = multiply(hermitianPower(a, 0.3), hermitianPower(a, 0.7));
        expectBelow(differenceRatio(a, split), EIGEN_RATIO, 'sum of exponents');
        expectBelow(differenceRatio(root, hermitianPower(a, 0.5)), EIGEN_RATIO, 'power one half');
        expect(Array.from(root.im)).toEqual(
          Array.from(root.im, (_, k) => -root.im[(k % n) * n + Math.floor(k / n)] + 0),
        );
      }),
      { numRuns: 40 },
    );
  });

  it('turn tensor sums into tensor products', () => {
    const random = seededRandom('tensor');
    const a = wellConditioned(random, 3);
    const b = wellConditioned(random, 2);
    const small = [scale(a, 0.1), scale(b, 0.1)];
    const sum = { ...zeros(6), re: kronecker(small[0], identity(2)).re, im: kronecker(small[0], identity(2)).im };
    const other = kronecker(identity(3), small[1]);
    sum.re.forEach((_, k) => {
      sum.re[k] += other.re[k];
      sum.im[k] += other.im[k];
    });
    const product = kronecker(hermitianExp(small[0]), hermitianExp(small[1]));
    expectBelow(differenceRatio(product, hermitianExp(sum)), EIGEN_RATIO, 'exponential of a tensor sum');
  });

  it('act on diagonal matrices entry by entry', () => {
    const d = diagonal([4, 0.25, 1e-12]);
    expectAllClose(hermitianLog(d).re, diagonal([Math.log(4), Math.log(0.25), Math.log(1e-12)]).re, 1e-14, 'logarithm');
    expectAllClose(hermitianSqrt(d).re, diagonal([2, 0.5, 1e-6]).re, 1e-16, 'root');
    expectAllClose(hermitianPower(d, 2).re, diagonal([16, 0.0625, 1e-24]).re, 1e-14, 'square');
  });

  it('take the root of semidefinite matrices, and of nothing below', () => {
    const random = seededRandom('semidefinite');
    for (const n of [2, 5, 12]) {
      const g = withSpectrum(random, [3, ...Array<number>(n - 1).fill(0)]);
      const root = hermitianSqrt(g);
      expectBelow(differenceRatio(g, multiply(root, root)), EIGEN_RATIO, 'square of the root');
    }
    expect(() => hermitianSqrt(diagonal([1, -1e-10]))).toThrow(
      expect.objectContaining({ code: 'not-positive-definite' }),
    );
    expect(Array.from(hermitianSqrt(zeros(2)).re)).toEqual([0, 0, 0, 0]);
  });

  it('refuse a logarithm or a power that does not exist', () => {
    const failure = { code: 'not-positive-definite', details: { smallestEigenvalue: -1 } };
    for (const f of [hermitianLog, (a: Parameters<typeof hermitianLog>[0]) => hermitianPower(a, 0.5)]) {
      expect(() =>
        f(
          fromRows([
            [0, 1],
            [1, 0],
          ]),
        ),
      ).toThrow(expect.objectContaining({ code: failure.code }));
      expect(() => f(diagonal([1, -1]))).toThrow(expect.objectContaining(failure));
      expect(() => f(diagonal([1, 0]))).toThrow(expect.objectContaining({ code: failure.code }));
    }
    expect(() => hermitianExp(randomMatrix(seededRandom('flat'), 2, 3))).toThrow(
      expect.objectContaining({ code: 'dimension-mismatch' }),
    );
  });
});
