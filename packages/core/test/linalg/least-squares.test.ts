import { describe, expect, it } from 'vitest';
import { leastSquares } from '../../src/linalg/least-squares.js';
import { multiplyReal, realTimesVector, transposeReal } from '../../src/linalg/real-matrix.js';
import { nullSpaceReal } from '../../src/linalg/null-space.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectClose } from './support/expect-close.js';
import { randomMatrix } from './support/inputs.js';

describe('leastSquares', () => {
  for (const [m, n, rank] of [
    [1, 1, 1],
    [6, 4, 4],
    [4, 6, 4],
    [12, 8, 3],
    [8, 12, 5],
    [5, 5, 0],
    [30, 20, 19],
  ]) {
    it(`finds the minimiser of least norm: ${m} × ${n} of rank ${rank}`, () => {
      const random = seededRandom(`least squares ${m} ${n}`);
      const left = randomMatrix(random, m, rank, false).re;
      const a = multiplyReal(left, randomMatrix(random, rank, n, false).re, m, rank, n);
      const b = randomMatrix(random, m, 1, false).re;
      const solution = leastSquares(a, m, n, b);
      expect(solution.rank).toBe(rank);
      const misfit = realTimesVector(a, m, n, solution.x).map((y, i) => y - b[i]);
      expectClose(solution.residual, Math.hypot(...misfit), 1e-13, 'residual');
      const gradient = realTimesVector(transposeReal(a, m, n), n, m, misfit);
      expectAllClose(gradient, new Float64Array(n), 1e-12, 'gradient');
      const { basis, dimension } = nullSpaceReal(a, m, n, 1e-10);
      expect(dimension).toBe(n - rank);
      const inside = realTimesVector(transposeReal(basis, n, dimension), dimension, n, solution.x);
      expectAllClose(inside, new Float64Array(dimension), 1e-12, 'component in the null space');
    });
  }

  it('fits a line through points', () => {
    const design = Float64Array.of(1, 0, 1, 1, 1, 2, 1, 3);
    expectAllClose(leastSquares(design, 4, 2, Float64Array.of(1, 3, 5, 7)).x, [1, 2], 1e-14, 'coefficient');
  });

  it('takes the rank from the tolerance it is given', () => {
    const a = Float64Array.of(1, 0, 0, 1e-6);
    expect(leastSquares(a, 2, 2, Float64Array.of(1, 1)).rank).toBe(2);
    const cut = leastSquares(a, 2, 2, Float64Array.of(1, 1), 1e-5);
    expect(cut.rank).toBe(1);
    expectAllClose(cut.x, [1, 0], 1e-15, 'coefficient');
  });

  it('refuses misshapen input', () => {
    const expected = expect.objectContaining({ code: 'dimension-mismatch' });
    expect(() => leastSquares(new Float64Array(4), 2, 2, new Float64Array(3))).toThrow(expected);
  });
});
