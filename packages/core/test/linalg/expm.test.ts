import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { frobeniusNorm, hermitianPart, scale } from '../../src/linalg/complex-matrix.js';
import { expmAction } from '../../src/linalg/expm-action.js';
import { expmReal } from '../../src/linalg/expm-real.js';
import { hermitianEigen } from '../../src/linalg/hermitian-eigen.js';
import { matrixFunction } from '../../src/linalg/matrix-function.js';
import { identityReal, multiplyReal, oneNormReal, realTimesVector } from '../../src/linalg/real-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { randomMatrix } from './support/inputs.js';
import { asMatrix, differenceRatio, SOLVE_RATIO } from './support/ratios.js';

describe('expmReal', () => {
  it('agrees with the spectral exponential of symmetric matrices', () => {
    const random = seededRandom('symmetric exponential');
    for (const n of [0, 1, 2, 7, 20]) {
      for (const size of [1e-12, 1e-3, 1, 30]) {
        const plain = hermitianPart(randomMatrix(random, n, n, false));
        const a = scale(plain, size / Math.max(frobeniusNorm(plain), 1));
        const expected = matrixFunction(hermitianEigen(a), Math.exp);
        const ratio = differenceRatio(expected, asMatrix(expmReal(a.re, n), n));
        expectBelow(ratio, SOLVE_RATIO * Math.max(1, size), `n = ${n}, norm ${size}, ratio`);
      }
    }
  });

  it('finds exponentials known in closed form', () => {
    for (const t of [0, 1e-9, 0.3, 3, 50]) {
      const rotation = expmReal(Float64Array.of(0, -t, t, 0), 2);
      const expected = [Math.cos(t), -Math.sin(t), Math.sin(t), Math.cos(t)];
      expectAllClose(rotation, expected, 1e-15 * (1 + t), `rotation by ${t}, entry`);
    }
    const jordan = expmReal(Float64Array.of(0, 1, 0, 0, 0, 1, 0, 0, 0), 3);
    expectAllClose(jordan, [1, 1, 0.5, 0, 1, 1, 0, 0, 1], 1e-16, 'nilpotent, entry');
    // Moler & Van Loan (1978): −49, 24, −64, 31 has eigenvalues −1 and −17 and defeats the plain series.
    const a = expmReal(Float64Array.of(-49, 24, -64, 31), 2);
    const [x, y] = [Math.exp(-1), Math.exp(-17)];
    expectAllClose(a, [-2 * x + 3 * y, 1.5 * (x - y), -4 * (x - y), 3 * x - 2 * y], 1e-13, 'stiff, entry');
  });

  it('satisfies e^a e^{−a} = 1 and e^{2a} = e^a e^a', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer({ min: 1, max: 8 }), (seed, n) => {
        const a = randomMatrix(seededRandom(seed), n, n, false).re;
        const e = expmReal(a, n);
        const inverse = expmReal(
          a.map((x) => -x),
          n,
        );
        const unit = multiplyReal(e, inverse, n, n, n);
        const size = oneNormReal(e, n, n) * oneNormReal(inverse, n, n);
        expectAllClose(unit, identityReal(n), 1e-14 * size, 'product with the inverse, entry');
        const square = multiplyReal(e, e, n, n, n);
        const double = expmReal(
          a.map((x) => 2 * x),
          n,
        );
        expectAllClose(double, square, 1e-13 * oneNormReal(e, n, n) ** 2, 'doubled, entry');
      }),
      { numRuns: 40 },
    );
  });

  it('keeps a stochastic semigroup stochastic', () => {
    const n = 12;
    const q = randomMatrix(seededRandom('rates'), n, n, false).re.map(Math.abs);
    for (let i = 0; i < n; i++) {
      q[i * n + i] = 0;
      q[i * n + i] = -q.subarray(i * n, (i + 1) * n).reduce((x, y) => x + y, 0);
    }
    for (const t of [0.01, 1, 100]) {
      const p = expmReal(
        q.map((x) => t * x),
        n,
      );
      for (let i = 0; i < n; i++) {
        const row = p.subarray(i * n, (i + 1) * n);
        expectClose(
          row.reduce((x, y) => x + y, 0),
          1,
          1e-13 * (1 + t),
          `t = ${t}, sum of row ${i}`,
        );
        for (const x of row) expect(x).toBeGreaterThanOrEqual(0);
      }
    }
  });

  it('refuses what is not finite, also when it overflows', () => {
    for (const x of [NaN, Infinity, 1000]) {
      expect(() => expmReal(Float64Array.of(x), 1)).toThrow(expect.objectContaining({ code: 'not-finite' }));
    }
  });
});

describe('expmAction', () => {
  it('agrees with the dense exponential', () => {
    const random = seededRandom('action');
    for (const n of [1, 3, 10]) {
      const a = randomMatrix(random, n, n, false);
      const x = randomMatrix(random, n, 1, false).re;
      for (const t of [0, 1e-8, 0.1, 1, -1, 3]) {
        const product = (y: Float64Array): Float64Array => realTimesVector(a.re, n, n, y);
        const actual = expmAction(product, t, x, frobeniusNorm(a));
        const expected = realTimesVector(
          expmReal(
            a.re.map((y) => t * y),
            n,
          ),
          n,
          n,
          x,
        );
        const size = Math.max(...expected.map(Math.abs), ...x.map(Math.abs));
        expectAllClose(
          actual,
          expected,
          2e-14 * (1 + Math.abs(t) * frobeniusNorm(a)) * size,
          `n = ${n}, t = ${t}, entry`,
        );
      }
    }
  });

  it('holds its accuracy over many steps', () => {
    const rotate = (y: Float64Array): Float64Array => Float64Array.of(-3 * y[1], 3 * y[0]);
    expectAllClose(expmAction(rotate, 100, Float64Array.of(1, 0), 3), [Math.cos(300), Math.sin(300)], 1e-13, 'entry');
    const decay = (y: Float64Array): Float64Array => Float64Array.of(-40 * y[0], -y[1]);
    const [fast, slow] = expmAction(decay, 1, Float64Array.of(1, 1), 40);
    expectClose(fast / Math.exp(-40), 1, 1e-12, 'fast component, ratio');
    expectClose(slow / Math.exp(-1), 1, 1e-14, 'slow component, ratio');
  });

  it('returns a copy at time zero, and does no work for it', () => {
    const x = Float64Array.of(1, 2);
    const result = expmAction(() => expect.unreachable('no product is needed'), 0, x, 5);
    expect(result).toEqual(x);
    expect(result).not.toBe(x);
  });

  it('refuses a bound that is none', () => {
    const same = (y: Float64Array): Float64Array => y.slice();
    for (const bound of [-1, NaN, Infinity]) {
      expect(() => expmAction(same, 1, Float64Array.of(1), bound)).toThrow(expect.objectContaining({ code: 'usage' }));
    }
    expect(() => expmAction(same, 1, Float64Array.of(NaN), 1)).toThrow(expect.objectContaining({ code: 'not-finite' }));
  });
});
