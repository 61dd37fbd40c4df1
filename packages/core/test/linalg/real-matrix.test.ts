import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  identityReal,
  multiplyReal,
  oneNormReal,
  realTimesVector,
  transposeReal,
} from '../../src/linalg/real-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose } from './support/expect-close.js';
import { randomMatrix } from './support/inputs.js';

const side = fc.integer({ min: 0, max: 13 });

describe('multiplyReal', () => {
  it('agrees with the definition at every shape', () => {
    fc.assert(
      fc.property(fc.integer(), side, side, side, (seed, rows, inner, cols) => {
        const random = seededRandom(seed);
        const a = randomMatrix(random, rows, inner, false).re;
        const b = randomMatrix(random, inner, cols, false).re;
        const expected = new Float64Array(rows * cols);
        for (let i = 0; i < rows; i++) {
          for (let j = 0; j < cols; j++) {
            for (let k = 0; k < inner; k++) expected[i * cols + j] += a[i * inner + k] * b[k * cols + j];
          }
        }
        expect(multiplyReal(a, b, rows, inner, cols)).toEqual(expected);
      }),
    );
  });

  it('refuses shapes that do not fit', () => {
    const mismatch = expect.objectContaining({ code: 'dimension-mismatch' });
    expect(() => multiplyReal(new Float64Array(4), new Float64Array(4), 2, 3, 2)).toThrow(mismatch);
    expect(() => realTimesVector(new Float64Array(4), 2, 2, new Float64Array(3))).toThrow(mismatch);
    expect(() => transposeReal(new Float64Array(4), 2, 3)).toThrow(mismatch);
  });
});

describe('small real operations', () => {
  it('transpose, apply and measure', () => {
    const a = Float64Array.of(1, -2, 3, 4, 5, -6);
    expect(transposeReal(a, 2, 3)).toEqual(Float64Array.of(1, 4, -2, 5, 3, -6));
    expect(realTimesVector(a, 2, 3, Float64Array.of(1, 1, 2))).toEqual(Float64Array.of(5, -3));
    expect(oneNormReal(a, 2, 3)).toBe(9);
    expect(oneNormReal(new Float64Array(0), 0, 0)).toBe(0);
    expectAllClose(multiplyReal(identityReal(2), a, 2, 2, 3), a, 0, 'product with the identity');
  });
});
