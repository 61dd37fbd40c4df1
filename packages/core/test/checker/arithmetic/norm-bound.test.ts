import { describe, expect, test } from 'vitest';
import { complexPointMatrix } from '../../../src/checker/arithmetic/interval-matrix.js';
import { nonNegativeNormBound, normBound } from '../../../src/checker/arithmetic/norm-bound.js';
import { encloseUnitarityDefect } from '../../../src/checker/arithmetic/unitarity-defect.js';
import { fromRows, scale } from '../../../src/linalg/complex-matrix.js';
import { hermitianEigen } from '../../../src/linalg/hermitian-eigen.js';
import { seededRandom } from '../../../src/random.js';
import { FOURIER4, randomHermitian } from './known-spectra.js';

const random = seededRandom('norms');
const U = 2 ** -53;

describe('norms', () => {
  test('Collatz bound of a non-negative matrix is nearly its norm', () => {
    const path = Float64Array.of(0, 1, 0, 1, 0, 1, 0, 1, 0);
    expect(nonNegativeNormBound(path, 3)).toBeGreaterThanOrEqual(Math.SQRT2);
    expect(nonNegativeNormBound(path, 3)).toBeLessThan(1.5);
    expect(nonNegativeNormBound(new Float64Array(4), 2)).toBe(0);
    expect(nonNegativeNormBound(Float64Array.of(1, NaN, NaN, 1), 2)).toBe(Infinity);
  });

  test('norm bound of any matrix', () => {
    const a = fromRows(
      [
        [0, 3],
        [0, 0],
      ],
      [
        [0, 4],
        [0, 0],
      ],
    );
    expect(normBound(complexPointMatrix(a))).toBe(5);
  });

  test('unitarity: exact for signed permutations, between its bounds elsewhere', () => {
    const exact = encloseUnitarityDefect(
      fromRows(
        [
          [0, 1],
          [0, 0],
        ],
        [
          [0, 0],
          [-1, 0],
        ],
      ),
    );
    expect(exact).toEqual({ lo: 0, hi: 0 });
    // (1+t)·unitary: ‖U*U − 1‖ = 2t + t² exactly, t = 2^-10.
    const t = 2 ** -10;
    const stretched = encloseUnitarityDefect(scale(FOURIER4, 0.5 * (1 + t)));
    expect(stretched.lo).toBeLessThanOrEqual(2 * t + t * t);
    expect(stretched.hi).toBeGreaterThanOrEqual(2 * t + t * t);
    expect(stretched.hi - stretched.lo).toBeLessThan(1e-15);
    for (const n of [3, 8, 50]) {
      const defect = encloseUnitarityDefect(hermitianEigen(randomHermitian(random, n, false)).vectors);
      expect(defect.hi).toBeGreaterThan(0);
      expect(defect.hi, `n=${n}`).toBeLessThan(40 * n * n * U);
    }
  });
});
