import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { fromEntries, multiply, zeros } from '../../src/linalg/complex-matrix.js';
import { multiplyPacked, multiplyRows } from '../../src/linalg/complex-multiply.js';
import { seededRandom } from '../../src/random.js';
import { randomMatrix } from './support/inputs.js';

const side = fc.integer({ min: 0, max: 17 });

describe('the two paths of a complex product', () => {
  it('give the same doubles', () => {
    fc.assert(
      fc.property(fc.integer(), side, side, side, (seed, rows, inner, cols) => {
        const random = seededRandom(seed);
        const a = fromEntries(rows, inner, () =>
          random.uniform() < 0.3 ? [0, 0] : [random.normal(), random.normal()],
        );
        const b = randomMatrix(random, inner, cols);
        const [plain, packed] = [zeros(rows, cols), zeros(rows, cols)];
        multiplyRows(plain, a, b);
        multiplyPacked(packed, a, b);
        expect(packed.re).toEqual(plain.re);
        expect(packed.im).toEqual(plain.im);
        expect(multiply(a, b)).toEqual(plain);
      }),
    );
  });
});
