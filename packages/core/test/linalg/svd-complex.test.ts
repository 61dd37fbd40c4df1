import { Matrix, SingularValueDecomposition } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import {
  adjoint,
  diagonal,
  multiply,
  multiplyAdjointFirst,
  scale,
  zeros,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../src/linalg/hermitian-eigen.js';
import { svdComplex } from '../../src/linalg/svd-complex.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { grading, randomMatrix, randomUnitary, shuffle } from './support/inputs.js';
import { differenceRatio, EIGEN_RATIO, orthogonalityRatio } from './support/ratios.js';

describe('svdComplex', () => {
  for (const [m, n] of [
    [0, 0],
    [0, 4],
    [1, 1],
    [3, 3],
    [9, 4],
    [4, 9],
    [24, 24],
    [50, 20],
  ]) {
    for (const [family, a] of Object.entries(matrices(seededRandom(`svd ${m} ${n}`), m, n))) {
      it(`decomposes: ${m} × ${n}, ${family}`, () => {
        const { u, s, v } = svdComplex(a);
        const k = Math.min(m, n);
        expect([u.rows, u.cols, s.length, v.rows, v.cols]).toEqual([m, k, k, n, k]);
        for (let i = 0; i < k; i++) expect(s[i] >= 0 && (i === 0 || s[i] <= s[i - 1])).toBe(true);
        expectBelow(orthogonalityRatio(u), EIGEN_RATIO, 'orthogonality ratio of u');
        expectBelow(orthogonalityRatio(v), EIGEN_RATIO, 'orthogonality ratio of v');
        expectBelow(differenceRatio(a, multiply(multiply(u, diagonal(s)), adjoint(v))), EIGEN_RATIO, 'residual ratio');
      });
    }
  }

  it('agrees with ml-matrix and with the eigenvalues of A*A', () => {
    const a = randomMatrix(seededRandom('reference'), 12, 7, false);
    const rows = Array.from({ length: 12 }, (_, i) => Array.from(a.re.subarray(i * 7, (i + 1) * 7)));
    const { s } = svdComplex(a);
    expectAllClose(s, new SingularValueDecomposition(new Matrix(rows)).diagonal, 1e-13, 'singular value');
    const squares = hermitianEigenvalues(multiplyAdjointFirst(a, a)).reverse();
    expectAllClose(
      s.map((x) => x * x),
      squares,
      1e-12,
      'squared singular value',
    );
  });

  it('has relative accuracy for graded columns', () => {
    // U D with orthonormal U has the singular values D exactly, to the rounding of its entries.
    const random = seededRandom('relative');
    const d = shuffle(random, grading(10));
    const { s } = svdComplex(multiply(randomUnitary(random, 10), diagonal(d)));
    grading(10).forEach((expected, k) => expectClose(s[k] / expected, 1, 1e-14, `singular value ${k}, ratio`));
  });

  it('drops what underflows beside the largest', () => {
    expectAllClose(svdComplex(diagonal([1, 1e-8, 1e-200, 0])).s, [1, 1e-8, 0, 0], 1e-23, 'singular value');
  });

  it('refuses entries that are not finite', () => {
    expect(() => svdComplex({ ...zeros(1), re: Float64Array.of(NaN) })).toThrow(
      expect.objectContaining({ code: 'not-finite' }),
    );
  });
});

function matrices(random: Random, m: number, n: number): Record<string, ComplexMatrix> {
  const k = Math.min(m, n);
  const plain = randomMatrix(random, m, n);
  const low = multiply(randomMatrix(random, m, Math.ceil(k / 3)), randomMatrix(random, Math.ceil(k / 3), n));
  const between = (s: readonly number[]): ComplexMatrix => {
    const left = randomUnitary(random, m);
    const middle = zeros(m, n);
    s.forEach((x, i) => (middle.re[i * n + i] = x));
    return multiply(multiply(left, middle), randomUnitary(random, n));
  };
  return {
    'random normal': plain,
    zero: zeros(m, n),
    'low rank': low,
    'all singular values equal': between(Array<number>(k).fill(2)),
    'clustered singular values': between(Array.from({ length: k }, (_, i) => 1 + i * 1e-14)),
    'graded singular values': between(grading(k)),
    'near-singular': between(Array.from({ length: k }, (_, i) => (i === 0 ? 1e-16 : 1))),
    'scaled by 1e-200': scale(plain, 1e-200),
    'scaled by 1e200': scale(plain, 1e200),
  };
}
