import { describe, expect, it } from 'vitest';
import { frobeniusNorm, multiply, scale, subtract } from '../../src/linalg/complex-matrix.js';
import {
  smallestWork,
  smallestOfAll,
  symmetricSmallest,
  symmetricSmallestInto,
} from '../../src/linalg/symmetric-smallest.js';
import { symmetricEigenvalues } from '../../src/linalg/symmetric-eigen.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow, expectClose } from './support/expect-close.js';
import { hermitianFamilies, randomMatrix } from './support/inputs.js';
import { asMatrix, EIGEN_RATIO } from './support/ratios.js';

describe('symmetricSmallest', () => {
  for (const n of [1, 2, 3, 4, 8, 15, 16, 24, 50]) {
    for (const [family, a] of Object.entries(hermitianFamilies(seededRandom(`smallest ${n}`), n, false))) {
      it(`finds the lowest pair: n = ${n}, ${family}`, () => {
        const { value, vector } = symmetricSmallest(a.re, n);
        expect(symmetricSmallestInto(a.re, n, null, smallestWork(n))).toBe(value);
        const norm = frobeniusNorm(a);
        const x = asMatrix(vector, n, 1);
        expectClose(value, symmetricEigenvalues(a.re, n)[0], 4 * n * 2 ** -52 * norm, 'value');
        expectClose(frobeniusNorm(x), 1, n * 2 ** -51, 'length of the vector');
        const residual = frobeniusNorm(subtract(multiply(a, x), scale(x, value)));
        expectBelow(norm > 0 ? residual / norm / (n * 2 ** -52) : residual, EIGEN_RATIO, 'residual ratio');
      });
    }
  }

  it('gives the same doubles from reused buffers, with and without a vector', () => {
    const random = seededRandom('buffers');
    const work = smallestWork(7);
    const vector = new Float64Array(7);
    for (let trial = 0; trial < 4; trial++) {
      const a = randomMatrix(random, 7, 7, false).re;
      const value = symmetricSmallestInto(a, 7, vector, work);
      expect({ value, vector }).toEqual(symmetricSmallest(a, 7));
      expect(symmetricSmallestInto(a, 7, null, work)).toBe(value);
    }
  });

  it('agrees with the plain way it falls back on', () => {
    const a = hermitianFamilies(seededRandom('plain way'), 12, false)['random normal'];
    const { value, vector } = symmetricSmallest(a.re, 12);
    const plain = new Float64Array(12);
    expectClose(smallestOfAll(a.re, 12, plain), value, 1e-13, 'value');
    expectClose(Math.abs(plain.reduce((sum, x, i) => sum + x * vector[i], 0)), 1, 1e-13, 'overlap of the vectors');
  });

  it('refuses entries that are not finite', () => {
    expect(() => symmetricSmallest(Float64Array.of(NaN), 1)).toThrow(expect.objectContaining({ code: 'not-finite' }));
  });
});
