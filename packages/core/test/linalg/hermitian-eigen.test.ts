import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  adjoint,
  fromRows,
  hermitianPart,
  kronecker,
  multiply,
  trace,
  zeros,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import { choleskyComplex } from '../../src/linalg/cholesky-complex.js';
import { hermitianEigen, hermitianEigenvalues } from '../../src/linalg/hermitian-eigen.js';
import { svdComplex } from '../../src/linalg/svd-complex.js';
import { symmetricEigenvalues } from '../../src/linalg/symmetric-eigen.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { gradedMatrix, hermitianFamilies, randomMatrix, randomUnitary, withSpectrum } from './support/inputs.js';
import { EIGEN_RATIO, eigenRatio, orthogonalityRatio } from './support/ratios.js';

describe('hermitianEigen', () => {
  for (const n of [0, 1, 2, 3, 4, 8, 16, 33]) {
    const random = seededRandom(`hermitian ${n}`);
    const families = hermitianFamilies(random, n, true);
    // A diagonal unitary makes the real families complex without changing their spectrum.
    const phases = zeros(n);
    for (let k = 0; k < n; k++) {
      phases.re[k * n + k] = Math.cos(k * k);
      phases.im[k * n + k] = Math.sin(k * k);
    }
    for (const [family, real] of Object.entries(families)) {
      it(`decomposes: n = ${n}, ${family}`, () => {
        const a = multiply(multiply(phases, real), adjoint(phases));
        const { values, vectors } = hermitianEigen(a);
        expectBelow(eigenRatio(hermitianPart(a), values, vectors), EIGEN_RATIO, 'residual ratio');
        expectBelow(orthogonalityRatio(vectors), EIGEN_RATIO, 'unitarity ratio');
        for (let k = 1; k < n; k++) expect(values[k]).toBeGreaterThanOrEqual(values[k - 1]);
        const top = Math.max(...values.map(Math.abs), 0);
        expectAllClose(hermitianEigenvalues(a), values, n * 2 ** -48 * top, 'eigenvalue alone');
      });
    }
  }

  it('agrees with the doubled real embedding', () => {
    const random = seededRandom('embedding');
    for (const n of [1, 2, 5, 12, 20]) {
      const a = hermitianPart(randomMatrix(random, n));
      const real = new Float64Array(4 * n * n);
      for (let i = 0; i < 2 * n; i++) {
        for (let j = 0; j < 2 * n; j++) {
          const k = (i % n) * n + (j % n);
          real[i * 2 * n + j] = i < n === j < n ? a.re[k] : (i < n ? -1 : 1) * a.im[k];
        }
      }
      const doubled = symmetricEigenvalues(real, 2 * n);
      const pairs = Array.from(hermitianEigenvalues(a)).flatMap((x) => [x, x]);
      expectAllClose(pairs, doubled, n * 1e-14, `n = ${n}, eigenvalue`);
    }
  });

  it('keeps the digits of small eigenvalues of graded matrices', () => {
    const random = seededRandom('graded');
    for (const n of [4, 8, 16]) {
      for (let trial = 0; trial < 5; trial++) {
        const a = gradedMatrix(random, n);
        const reference = svdComplex(adjoint(choleskyComplex(a)))
          .s.map((x) => x * x)
          .reverse();
        hermitianEigenvalues(a).forEach((value, k) => {
          expectClose(value / reference[k], 1, 1e-8, `n = ${n}, eigenvalue ${k} near ${reference[k]}, ratio`);
        });
      }
    }
  });

  it('scales by the larger of the two parts', () => {
    for (const [re, im] of [
      [1e200, 1e-10],
      [1e-10, 1e200],
      [1e-200, 1e-210],
    ]) {
      const a = hermitianPart(randomMatrix(seededRandom('parts'), 5));
      const mixed = { ...a, re: a.re.map((x) => x * re), im: a.im.map((y) => y * im) };
      const { values, vectors } = hermitianEigen(mixed);
      expectBelow(eigenRatio(mixed, values, vectors), EIGEN_RATIO, `parts ${re} and ${im}, residual ratio`);
      expectBelow(orthogonalityRatio(vectors), EIGEN_RATIO, `parts ${re} and ${im}, unitarity ratio`);
    }
  });

  it('gives real vectors to a real matrix', () => {
    const { vectors } = hermitianEigen(hermitianPart(randomMatrix(seededRandom('real'), 6, 6, false)));
    expect(vectors.im.every((y) => y === 0)).toBe(true);
  });

  it('decomposes the Pauli matrices', () => {
    const y = fromRows(
      [
        [0, 0],
        [0, 0],
      ],
      [
        [0, -1],
        [1, 0],
      ],
    );
    expectAllClose(hermitianEigenvalues(y), [-1, 1], 1e-15, 'eigenvalue of σ_y');
    expectAllClose(hermitianEigenvalues(kronecker(y, y)), [-1, -1, 1, 1], 1e-15, 'eigenvalue of σ_y ⊗ σ_y');
  });

  it('is invariant under unitary conjugation, and its values sum to the trace', () => {
    fc.assert(
      fc.property(fc.integer(), fc.integer({ min: 1, max: 10 }), (seed, n) => {
        const random = seededRandom(seed);
        const spectrum = Array.from({ length: n }, () => Math.round(3 * random.normal())).sort((x, y) => x - y);
        const a = withSpectrum(random, spectrum);
        const u = randomUnitary(random, n);
        expectAllClose(hermitianEigenvalues(a), spectrum, 1e-13 * n, 'eigenvalue');
        const rotated: ComplexMatrix = multiply(multiply(u, a), adjoint(u));
        expectAllClose(hermitianEigenvalues(rotated), spectrum, 1e-13 * n, 'rotated eigenvalue');
        expectClose(
          hermitianEigenvalues(a).reduce((x, y) => x + y, 0),
          trace(a).re,
          1e-13 * n,
          'sum of eigenvalues',
        );
      }),
      { numRuns: 60 },
    );
  });

  it('refuses what it cannot decompose', () => {
    expect(() => hermitianEigen(zeros(2, 3))).toThrow(expect.objectContaining({ code: 'dimension-mismatch' }));
    const bad = [
      fromRows([[1]], [[NaN]]),
      fromRows([[NaN]]),
      fromRows(
        [
          [Infinity, 0],
          [0, 1],
        ],
        [
          [0, 1],
          [-1, 0],
        ],
      ),
    ];
    for (const a of bad) expect(() => hermitianEigen(a)).toThrow(expect.objectContaining({ code: 'not-finite' }));
  });
});
