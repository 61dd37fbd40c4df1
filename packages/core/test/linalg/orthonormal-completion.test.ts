import { describe, expect, it } from 'vitest';
import { fromEntries, identity, multiplyAdjointFirst, zeros } from '../../src/linalg/complex-matrix.js';
import { completeOrthonormal } from '../../src/linalg/orthonormal-completion.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow } from './support/expect-close.js';
import { randomUnitary } from './support/inputs.js';
import { differenceRatio, orthogonalityRatio, SOLVE_RATIO } from './support/ratios.js';

describe('completeOrthonormal', () => {
  it('adds columns to a part of a unitary and keeps the others', () => {
    for (const [n, given] of [
      [1, 0],
      [2, 1],
      [6, 3],
      [20, 19],
      [20, 1],
    ]) {
      const u = randomUnitary(seededRandom(`completion ${n} ${given}`), n);
      const q = fromEntries(n, n, (i, j) => (j < given ? [u.re[i * n + j], u.im[i * n + j]] : [7, 7]));
      completeOrthonormal(q, given);
      expectBelow(orthogonalityRatio(q), SOLVE_RATIO, `n = ${n}, given ${given}, ratio`);
      for (let i = 0; i < n; i++) for (let j = 0; j < given; j++) expect(q.re[i * n + j]).toBe(u.re[i * n + j]);
    }
  });

  it('handles tall matrices and nothing at all', () => {
    const tall = zeros(5, 2);
    completeOrthonormal(tall, 0);
    expectBelow(differenceRatio(identity(2), multiplyAdjointFirst(tall, tall)), SOLVE_RATIO, 'ratio');
    const empty = zeros(0);
    completeOrthonormal(empty, 0);
    expect(empty).toEqual(zeros(0));
  });
});
