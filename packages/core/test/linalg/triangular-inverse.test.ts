import { describe, it } from 'vitest';
import { svdComplex } from '../../src/linalg/svd-complex.js';
import { inverseNorm } from '../../src/linalg/triangular-inverse.js';
import { seededRandom } from '../../src/random.js';
import { expectClose } from './support/expect-close.js';
import { randomMatrix } from './support/inputs.js';

describe('inverseNorm', () => {
  it('agrees with the singular values', () => {
    const random = seededRandom('inverse norm');
    for (const n of [1, 2, 3, 9]) {
      for (const complex of [false, true]) {
        const r = randomMatrix(random, n, n, complex);
        for (let i = 0; i < n; i++) for (let j = 0; j < i; j++) r.re[i * n + j] = r.im[i * n + j] = 0;
        const expected = Math.sqrt(svdComplex(r).s.reduce((sum, x) => sum + 1 / (x * x), 0));
        expectClose(inverseNorm(r) / expected, 1, 1e-9, `n = ${n}, ratio`);
      }
    }
  });
});
