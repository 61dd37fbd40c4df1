import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { adjoint } from '../../src/linalg/complex-matrix.js';
import { choleskyComplex } from '../../src/linalg/cholesky-complex.js';
import { svdComplex } from '../../src/linalg/svd-complex.js';
import {
  symmetricEigen,
  symmetricEigenInto,
  symmetricEigenvalues,
  symmetricWork,
} from '../../src/linalg/symmetric-eigen.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { gradedMatrix, hermitianFamilies, randomMatrix, withSpectrum } from './support/inputs.js';
import { asMatrix, EIGEN_RATIO, eigenRatio, orthogonalityRatio } from './support/ratios.js';

describe('symmetricEigen', () => {
  for (const n of [0, 1, 2, 3, 4, 5, 8, 16, 24, 65]) {
    for (const [family, a] of Object.entries(hermitianFamilies(seededRandom(`symmetric ${n}`), n, false))) {
      it(`decomposes: n = ${n}, ${family}`, () => {
        const { values, vectors } = symmetricEigen(a.re, n);
        const v = asMatrix(vectors, n);
        expectBelow(eigenRatio(a, values, v), EIGEN_RATIO, 'residual ratio');
        expectBelow(orthogonalityRatio(v), EIGEN_RATIO, 'orthogonality ratio');
        for (let k = 1; k < n; k++) expect(values[k]).toBeGreaterThanOrEqual(values[k - 1]);
        const top = Math.max(...a.re.map(Math.abs), 0);
        expectAllClose(symmetricEigenvalues(a.re, n), values, n * n * 2 ** -50 * top, 'eigenvalue alone');
      });
    }
  }

  it('agrees with ml-matrix', () => {
    const random = seededRandom('reference');
    for (const n of [2, 7, 20, 40]) {
      const a = withSpectrum(
        random,
        Array.from({ length: n }, () => random.normal()),
        false,
      );
      const rows = Array.from({ length: n }, (_, i) => Array.from(a.re.subarray(i * n, (i + 1) * n)));
      const reference = new EigenvalueDecomposition(new Matrix(rows), { assumeSymmetric: true }).realEigenvalues;
      expectAllClose(
        symmetricEigenvalues(a.re, n),
        reference.sort((x, y) => x - y),
        n * 2 ** -49,
        `n = ${n}, eigenvalue`,
      );
    }
  });

  it('finds spectra known in closed form', () => {
    const n = 30;
    const path = new Float64Array(n * n);
    for (let i = 0; i < n; i++) {
      path[i * n + i] = 2;
      if (i > 0) path[i * n + i - 1] = path[(i - 1) * n + i] = -1;
    }
    const expected = Array.from({ length: n }, (_, k) => 4 * Math.sin(((k + 1) * Math.PI) / (2 * n + 2)) ** 2);
    expectAllClose(symmetricEigenvalues(path, n), expected, 1e-14, 'path eigenvalue');
    // Walk on the 5-cube: eigenvalues −5, −3, … with binomial multiplicities.
    const cube = Float64Array.from({ length: 1024 }, (_, p) => (isPowerOfTwo((p >> 5) ^ (p & 31)) ? 1 : 0));
    const levels = [1, 5, 10, 10, 5, 1].flatMap((count, k) => Array<number>(count).fill(2 * k - 5));
    expectAllClose(symmetricEigenvalues(cube, 32), levels, 2e-14, 'cube eigenvalue');
    // Wilkinson's W21+: its two largest eigenvalues agree to fourteen digits.
    const w = new Float64Array(441);
    for (let i = 0; i < 21; i++) {
      w[i * 22] = Math.abs(i - 10);
      if (i > 0) w[i * 21 + i - 1] = w[(i - 1) * 21 + i] = 1;
    }
    const top = symmetricEigenvalues(w, 21).slice(19);
    expectAllClose(top, [10.746194182903322, 10.746194182903393], 2e-14, 'W21+ eigenvalue');
  });

  it('keeps the digits of small eigenvalues of graded matrices', () => {
    // The reference is one-sided Jacobi on the Cholesky factor, which has high relative accuracy (Demmel & Veselić 1992).
    const random = seededRandom('graded');
    for (const n of [4, 8, 16, 32]) {
      for (let trial = 0; trial < 5; trial++) {
        const a = gradedMatrix(random, n, false);
        const reference = svdComplex(adjoint(choleskyComplex(a)))
          .s.map((x) => x * x)
          .reverse();
        symmetricEigenvalues(a.re, n).forEach((value, k) => {
          expectClose(value / reference[k], 1, 1e-8, `n = ${n}, eigenvalue ${k} near ${reference[k]}, ratio`);
        });
      }
    }
  });

  it('takes the symmetric part and leaves its input alone', () => {
    const a = randomMatrix(seededRandom('part'), 6, 6, false).re;
    const before = a.slice();
    const symmetric = a.map((x, k) => (x + a[(k % 6) * 6 + Math.floor(k / 6)]) / 2);
    expectAllClose(symmetricEigenvalues(a, 6), symmetricEigenvalues(symmetric, 6), 1e-14, 'eigenvalue');
    expect(a).toEqual(before);
  });

  it('gives the same doubles from reused buffers', () => {
    const random = seededRandom('buffers');
    const n = 9;
    const work = symmetricWork(n);
    const values = new Float64Array(n);
    const vectors = new Float64Array(n * n);
    for (let trial = 0; trial < 4; trial++) {
      const a = randomMatrix(random, n, n, false).re;
      symmetricEigenInto(a, n, values, vectors, work);
      expect({ values, vectors }).toEqual(symmetricEigen(a, n));
    }
  });

  it('refuses what it cannot decompose', () => {
    expect(() => symmetricEigen(Float64Array.of(1, NaN, NaN, 1), 2)).toThrow(
      expect.objectContaining({ code: 'not-finite' }),
    );
    expect(() => symmetricEigen(Float64Array.of(Infinity), 1)).toThrow(expect.objectContaining({ code: 'not-finite' }));
    expect(() => symmetricEigen(new Float64Array(5), 2)).toThrow(
      expect.objectContaining({ code: 'dimension-mismatch' }),
    );
  });
});

function isPowerOfTwo(x: number): boolean {
  return x > 0 && (x & (x - 1)) === 0;
}
