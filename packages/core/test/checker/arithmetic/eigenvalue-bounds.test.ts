import { describe, expect, test } from 'vitest';
import { encloseEigenvalues } from '../../../src/checker/arithmetic/eigenvalue-enclosure.js';
import { decideSemidefinite } from '../../../src/checker/arithmetic/exact-semidefinite.js';
import {
  type GaussianMatrix,
  gaussianFromMatrix,
  gaussianIdentity,
  scaleGaussianMatrix,
  subtractGaussianMatrix,
} from '../../../src/checker/arithmetic/gaussian-matrix.js';
import { gaussian } from '../../../src/checker/arithmetic/gaussian-rational.js';
import { complexPointMatrix, widenComplexMatrix } from '../../../src/checker/arithmetic/interval-matrix.js';
import { rationalFromDouble } from '../../../src/checker/arithmetic/rational.js';
import {
  isPositiveDefinite,
  smallestEigenvalueBound,
} from '../../../src/checker/arithmetic/smallest-eigenvalue-bound.js';
import {
  type ComplexMatrix,
  add,
  fromEntries,
  fromRows,
  hermitianPart,
  identity,
  scale,
  zeros,
} from '../../../src/linalg/complex-matrix.js';
import { hermitianEigen } from '../../../src/linalg/hermitian-eigen.js';
import { seededRandom } from '../../../src/random.js';
import { randomHermitian, withSpectrum } from './known-spectra.js';

const random = seededRandom('spectral enclosures');
const U = 2 ** -53;

const exactShift = (a: ComplexMatrix, s: number): GaussianMatrix =>
  subtractGaussianMatrix(
    gaussianFromMatrix(a),
    scaleGaussianMatrix(gaussianIdentity(a.rows), gaussian(rationalFromDouble(s))),
  );

describe('lower bound of the smallest eigenvalue', () => {
  test.each([true, false])('is a bound by exact arithmetic, and near the best (real: %s)', (real) => {
    for (const n of [1, 2, 3, 6, 10]) {
      const a = randomHermitian(random, n, real);
      const bound = smallestEigenvalueBound(complexPointMatrix(a));
      const slack = 40 * (n + 2) * U * n * 4;
      expect(decideSemidefinite(exactShift(a, bound)).semidefinite, `n=${n} bound ${bound}`).toBe(true);
      expect(decideSemidefinite(exactShift(a, bound + slack)).semidefinite, `n=${n} tightness`).toBe(false);
    }
  });

  test('known spectra: clustered, graded, singular, negative', () => {
    const spectra = [
      [1, 1, 1, 1],
      [0, 0, 0, 1],
      [3, 3, 3, 3, 3, 3, 3, 2],
      [1, 2 ** 20, 2 ** 40, 2 ** 40],
      [-7, 1, 2, 9, 4, 4, 4, 4],
      Array.from({ length: 32 }, (_, k) => k + 1),
    ];
    for (const d of spectra) {
      for (const real of [true, false]) {
        const n = d.length;
        const bound = smallestEigenvalueBound(complexPointMatrix(withSpectrum(d, real)));
        const trace = d.reduce((sum, x) => sum + Math.abs(x), 0);
        expect(bound).toBeLessThanOrEqual(Math.min(...d));
        expect(bound, `${d} ${bound}`).toBeGreaterThan(Math.min(...d) - 30 * (2 * n + 1) * U * trace * 2);
      }
    }
  });

  test('intervals: every member is bounded', () => {
    const d = [1, 2, 3, 4, 5, 6, 7, 8];
    const a = withSpectrum(d, false);
    const radius = 1e-3;
    const bound = smallestEigenvalueBound(widenComplexMatrix(complexPointMatrix(a), radius));
    // The worst perturbation, all entries of modulus radius·√2 against the lowest eigenvector, moves by 8·√2·radius.
    expect(bound).toBeLessThan(1 - 8 * radius * 0.99);
    expect(bound).toBeGreaterThan(1 - 8 * Math.SQRT2 * radius * 1.001);
  });

  test('scales, and empty or unbounded matrices', () => {
    const a = withSpectrum([1, 2, 3, 4], true);
    for (const c of [1e-300, 1e-150, 1e150, 1e300]) {
      const bound = smallestEigenvalueBound(complexPointMatrix(scale(a, c)));
      expect(bound / c).toBeLessThanOrEqual(1 + 1e-15);
      expect(bound / c).toBeGreaterThan(1 - 1e-12);
    }
    expect(smallestEigenvalueBound(complexPointMatrix(zeros(0)))).toBe(Infinity);
    expect(smallestEigenvalueBound(complexPointMatrix(zeros(3)))).toBe(0);
    const wide = complexPointMatrix(identity(2));
    wide.re.hi[0] = Infinity;
    expect(smallestEigenvalueBound(wide)).toBe(-Infinity);
    expect(() =>
      smallestEigenvalueBound(
        complexPointMatrix(
          fromRows([
            [1, 2],
            [3, 1],
          ]),
        ),
      ),
    ).toThrow('Hermitian');
    expect(() => smallestEigenvalueBound(complexPointMatrix(fromRows([[1, 2]])))).toThrow('square');
  });

  test('positive definiteness by one factorisation', () => {
    const a = complexPointMatrix(withSpectrum([1, 2, 3, 4], false));
    expect(isPositiveDefinite(a)).toBe(true);
    expect(isPositiveDefinite(widenComplexMatrix(a, 0.1))).toBe(true);
    expect(isPositiveDefinite(widenComplexMatrix(a, 0.3))).toBe(false);
    expect(isPositiveDefinite(complexPointMatrix(withSpectrum([0, 1, 1, 1], true)))).toBe(false);
    expect(isPositiveDefinite(complexPointMatrix(withSpectrum([-1, 1, 1, 1], true)))).toBe(false);
    expect(isPositiveDefinite(complexPointMatrix(withSpectrum([1, 2 ** 40, 1, 1], true)))).toBe(true);
  });
});

describe('enclosures of all eigenvalues', () => {
  test('hold the exact spectrum, tightly', () => {
    for (const d of [
      [5, -3, 5, 0],
      [1, 1, 1, 1],
      Array.from({ length: 16 }, (_, k) => ((k * 7) % 5) - 2),
      [0, 0, 0, 0],
    ]) {
      for (const real of [true, false]) {
        const found = encloseEigenvalues(complexPointMatrix(withSpectrum(d, real)));
        const expected = [...d].sort((x, y) => x - y);
        expect(found.length).toBe(d.length);
        found.forEach((x, k) => {
          expect(x.lo <= expected[k] && expected[k] <= x.hi, `${x.lo} ${expected[k]} ${x.hi}`).toBe(true);
          expect(x.hi - x.lo).toBeLessThan(3e-12);
        });
      }
    }
  });

  test('hold the spectra of the members of an interval matrix', () => {
    const a = randomHermitian(random, 5, false);
    const found = encloseEigenvalues(widenComplexMatrix(complexPointMatrix(a), 1e-6));
    for (let trial = 0; trial < 20; trial++) {
      const member = add(
        a,
        hermitianPart(fromEntries(5, 5, () => [1e-6 * (2 * random.uniform() - 1), 1e-6 * (2 * random.uniform() - 1)])),
      );
      hermitianEigen(member).values.forEach((x, k) => {
        expect(found[k].lo).toBeLessThanOrEqual(x);
        expect(found[k].hi).toBeGreaterThanOrEqual(x);
      });
    }
    expect(Math.max(...found.map((x) => x.hi - x.lo))).toBeLessThan(4e-5);
  });

  test('the smallest and largest are bounds by exact arithmetic', () => {
    for (const n of [2, 5, 9]) {
      const a = randomHermitian(random, n, false);
      const found = encloseEigenvalues(complexPointMatrix(a));
      expect(decideSemidefinite(exactShift(a, found[0].lo)).semidefinite).toBe(true);
      expect(decideSemidefinite(exactShift(a, found[0].hi + 1e-300)).semidefinite).toBe(false);
      expect(decideSemidefinite(exactShift(scale(a, -1), -found[n - 1].hi)).semidefinite).toBe(true);
      expect(Math.max(...found.map((x) => x.hi - x.lo))).toBeLessThan(2000 * n * n * U);
    }
    expect(encloseEigenvalues(complexPointMatrix(zeros(0)))).toEqual([]);
  });
});
