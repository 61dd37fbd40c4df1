import { EigenvalueDecomposition, Matrix } from 'ml-matrix';
import { describe, expect, it } from 'vitest';
import { diagonal, frobeniusNorm } from '../../src/linalg/complex-matrix.js';
import { eigenvaluesGeneral } from '../../src/linalg/general-eigenvalues.js';
import { symmetricEigenvalues } from '../../src/linalg/symmetric-eigen.js';
import { solveReal } from '../../src/linalg/lu-real.js';
import { multiplyReal, transposeReal } from '../../src/linalg/real-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectClose } from './support/expect-close.js';
import { grading, hermitianFamilies, randomMatrix, randomUnitary } from './support/inputs.js';

describe('eigenvaluesGeneral', () => {
  for (const n of [0, 1, 2, 3, 8, 25]) {
    for (const [family, a] of Object.entries(hermitianFamilies(seededRandom(`general ${n}`), n, false))) {
      it(`agrees with the symmetric solver: n = ${n}, ${family}`, () => {
        const { re, im } = eigenvaluesGeneral(a.re, n);
        const tolerance = n * 2 ** -48 * frobeniusNorm(a);
        expectAllClose(re, symmetricEigenvalues(a.re, n), tolerance, 'real part');
        // Rounding may split a double eigenvalue into a pair, but not far.
        expectAllClose(im, new Float64Array(n), tolerance, 'imaginary part');
      });
    }
  }

  it('agrees with ml-matrix on random matrices', () => {
    const random = seededRandom('general reference');
    for (const n of [2, 5, 16, 40]) {
      const a = randomMatrix(random, n, n, false).re;
      const rows = Array.from({ length: n }, (_, i) => Array.from(a.subarray(i * n, (i + 1) * n)));
      const reference = new EigenvalueDecomposition(new Matrix(rows));
      const order = reference.realEigenvalues
        .map((x, k) => [x, reference.imaginaryEigenvalues[k]])
        .sort((p, q) => p[0] - q[0] || Math.abs(p[1]) - Math.abs(q[1]) || q[1] - p[1]);
      const { re, im } = eigenvaluesGeneral(a, n);
      // A pair must not be torn apart by the last bit of its real parts.
      for (let k = 0; k < n; k++) if (im[k] > 0) expect([re[k + 1], im[k + 1]]).toEqual([re[k], -im[k]]);
      expectAllClose(
        re,
        order.map((p) => p[0]),
        1e-11,
        `n = ${n}, real part`,
      );
      expectAllClose(
        im.map(Math.abs),
        order.map((p) => Math.abs(p[1])),
        1e-11,
        `n = ${n}, imaginary part`,
      );
    }
  });

  it('finds roots of unity from the cyclic shift', () => {
    for (const n of [2, 3, 4, 5, 8, 17]) {
      const shift = new Float64Array(n * n);
      for (let i = 0; i < n; i++) shift[i * n + ((i + 1) % n)] = 1;
      const { re, im } = eigenvaluesGeneral(shift, n);
      for (let k = 0; k < n; k++) {
        const nearest = Math.min(
          ...Array.from({ length: n }, (_, j) =>
            Math.hypot(re[k] - Math.cos((2 * Math.PI * j) / n), im[k] - Math.sin((2 * Math.PI * j) / n)),
          ),
        );
        expectClose(nearest, 0, 1e-14, `n = ${n}, distance of eigenvalue ${k} from a root`);
      }
      expectClose(
        re.reduce((x, y) => x + y, 0),
        0,
        1e-14,
        `n = ${n}, trace`,
      );
      expectClose(
        re.reduce((x, y, k) => x + y * y - im[k] * im[k], 0),
        n === 2 ? 2 : 0,
        2e-14,
        `n = ${n}, trace of the square`,
      );
    }
  });

  it('finds a prescribed spectrum behind an orthogonal similarity', () => {
    const random = seededRandom('prescribed');
    // Rotation blocks (a, b) with eigenvalues a ± ib, and real ones, made non-normal by an upper triangle.
    const blocks = [
      [-3, 2],
      [-1, 0.5],
      [0.25, 4],
    ];
    const n = 9;
    const t = new Float64Array(n * n);
    for (let i = 0; i < n; i++) for (let j = i + 1; j < n; j++) t[i * n + j] = random.normal();
    blocks.forEach(([a, b], k) => t.set([a, b], 2 * k * n + 2 * k));
    blocks.forEach(([a, b], k) => t.set([-b, a], (2 * k + 1) * n + 2 * k));
    [-2, 1, 5].forEach((x, k) => (t[(6 + k) * (n + 1)] = x));
    const q = randomUnitary(random, n, false).re;
    const a = multiplyReal(multiplyReal(q, t, n, n, n), transposeReal(q, n, n), n, n, n);
    const { re, im } = eigenvaluesGeneral(a, n);
    expectAllClose(re, [-3, -3, -2, -1, -1, 0.25, 0.25, 1, 5], 1e-13, 'real part');
    expectAllClose(im, [2, -2, 0, 0.5, -0.5, 4, -4, 0, 0], 1e-13, 'imaginary part');
  });

  it('is not disturbed by a diagonal similarity over twelve decades', () => {
    const random = seededRandom('balance');
    const n = 8;
    const a = randomMatrix(random, n, n, false).re;
    const d = grading(n).map((x) => 2 ** Math.round(Math.log2(x)));
    const graded = a.map((x, k) => (x * d[Math.floor(k / n)]) / d[k % n]);
    const plain = eigenvaluesGeneral(a, n);
    const scaled = eigenvaluesGeneral(graded, n);
    expectAllClose(scaled.re, plain.re, 1e-13, 'real part');
    expectAllClose(scaled.im, plain.im, 1e-13, 'imaginary part');
  });

  it('handles defective and triangular matrices', () => {
    const n = 6;
    const jordan = new Float64Array(n * n);
    for (let i = 0; i < n; i++) jordan.set(i < n - 1 ? [2, 1] : [2], i * n + i);
    expectAllClose(eigenvaluesGeneral(jordan, n).re, new Float64Array(n).fill(2), 0, 'eigenvalue of a Jordan block');
    const random = seededRandom('similar');
    const p = randomMatrix(random, 5, 5, false).re;
    const spectrum = diagonal([-1, 0, 0, 2, 7]).re;
    const a = solveReal(p, 5, multiplyReal(spectrum, p, 5, 5, 5), 5);
    expectAllClose(eigenvaluesGeneral(a, 5).re, [-1, 0, 0, 2, 7], 1e-11, 'eigenvalue of a diagonalisable matrix');
  });

  it('refuses what it cannot treat', () => {
    expect(() => eigenvaluesGeneral(Float64Array.of(NaN), 1)).toThrow(expect.objectContaining({ code: 'not-finite' }));
    expect(() => eigenvaluesGeneral(new Float64Array(3), 2)).toThrow(
      expect.objectContaining({ code: 'dimension-mismatch' }),
    );
    const a = randomMatrix(seededRandom('kept'), 5, 5, false);
    const before = a.re.slice();
    eigenvaluesGeneral(a.re, 5);
    expect(a.re).toEqual(before);
  });
});
