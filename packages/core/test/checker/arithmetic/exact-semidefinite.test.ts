import { describe, expect, test } from 'vitest';
import { decideSemidefinite } from '../../../src/checker/arithmetic/exact-semidefinite.js';
import * as g from '../../../src/checker/arithmetic/gaussian-matrix.js';
import { type GaussianMatrix } from '../../../src/checker/arithmetic/gaussian-matrix.js';
import {
  GAUSSIAN_ZERO,
  divideGaussian,
  equalGaussian,
  gaussian,
  multiplyGaussian,
  negateGaussian,
} from '../../../src/checker/arithmetic/gaussian-rational.js';
import { RATIONAL_ONE, multiplyRational, rational, signRational } from '../../../src/checker/arithmetic/rational.js';
import { fromRows } from '../../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../../src/linalg/hermitian-eigen.js';
import { type Random, seededRandom } from '../../../src/random.js';
import { intervalFromRational } from '../../../src/checker/arithmetic/rational-rounding.js';

const entry = (random: Random, top = 9) =>
  gaussian(
    rational(BigInt(random.integer(2 * top + 1) - top), BigInt(1 + random.integer(6))),
    rational(BigInt(random.integer(2 * top + 1) - top), BigInt(1 + random.integer(6))),
  );

const randomMatrix = (random: Random, rows: number, cols: number) =>
  g.gaussianFromEntries(rows, cols, () => entry(random));

const gram = (b: GaussianMatrix) => g.multiplyGaussianMatrix(b, g.adjointGaussianMatrix(b));

const shifted = (a: GaussianMatrix, shift: ReturnType<typeof rational>) =>
  g.addGaussianMatrix(a, g.scaleGaussianMatrix(g.gaussianIdentity(a.rows), gaussian(shift)));

/** Determinant by expansion over rational Gaussian elimination with row exchange: an independent path. */
function determinant(a: GaussianMatrix) {
  const n = a.rows;
  const m = a.entries.slice();
  let det = gaussian(RATIONAL_ONE);
  for (let k = 0; k < n; k++) {
    let p = k;
    while (p < n && equalGaussian(m[p * n + k], GAUSSIAN_ZERO)) p++;
    if (p === n) return GAUSSIAN_ZERO;
    if (p !== k) {
      for (let j = 0; j < n; j++) [m[p * n + j], m[k * n + j]] = [m[k * n + j], m[p * n + j]];
      det = negateGaussian(det);
    }
    det = multiplyGaussian(det, m[k * n + k]);
    for (let i = k + 1; i < n; i++) {
      const factor = divideGaussian(m[i * n + k], m[k * n + k]);
      for (let j = k; j < n; j++) {
        const product = multiplyGaussian(factor, m[k * n + j]);
        m[i * n + j] = { re: sub(m[i * n + j].re, product.re), im: sub(m[i * n + j].im, product.im) };
      }
    }
  }
  return det;
}

const sub = (x: ReturnType<typeof rational>, y: ReturnType<typeof rational>) =>
  rational(x.numerator * y.denominator - y.numerator * x.denominator, x.denominator * y.denominator);

function toDoubles(a: GaussianMatrix) {
  const part = (key: 're' | 'im') =>
    Array.from({ length: a.rows }, (_, i) =>
      Array.from({ length: a.cols }, (_, j) => intervalFromRational(a.entries[i * a.cols + j][key]).lo),
    );
  return fromRows(part('re'), part('im'));
}

describe('exact LDL*', () => {
  test('Gram matrices are semidefinite of the right rank, positive pivots, right determinant', () => {
    const random = seededRandom('gram');
    for (const [n, rank] of [
      [1, 1],
      [3, 3],
      [4, 2],
      [6, 5],
      [8, 8],
      [9, 4],
      [5, 0],
    ]) {
      const a = gram(rank === 0 ? g.gaussianZeros(n, 1) : randomMatrix(random, n, rank));
      const verdict = decideSemidefinite(a);
      if (!verdict.semidefinite) throw new Error('expected a semidefinite matrix');
      expect(verdict.pivots.length).toBe(rank);
      expect(new Set(verdict.order).size).toBe(rank);
      expect(verdict.pivots.every((d) => signRational(d) > 0)).toBe(true);
      if (rank === n) {
        const product = verdict.pivots.reduce(multiplyRational, RATIONAL_ONE);
        expect(determinant(a)).toEqual(gaussian(product));
      }
    }
  });

  test('pivots are ratios of principal minors in the stated order', () => {
    const a = gram(randomMatrix(seededRandom('minors'), 6, 4));
    const verdict = decideSemidefinite(a);
    if (!verdict.semidefinite) throw new Error('expected a semidefinite matrix');
    let product = RATIONAL_ONE;
    verdict.pivots.forEach((pivot, k) => {
      product = multiplyRational(product, pivot);
      const rows = verdict.order.slice(0, k + 1);
      const minor = g.gaussianFromEntries(k + 1, k + 1, (i, j) => a.entries[rows[i] * 6 + rows[j]]);
      expect(determinant(minor)).toEqual(gaussian(product));
    });
  });

  test('a shift by 10^-40 below a singular matrix is seen', () => {
    const a = gram(randomMatrix(seededRandom('shift'), 5, 3));
    const tiny = rational(1n, 10n ** 40n);
    expect(decideSemidefinite(shifted(a, tiny))).toMatchObject({ semidefinite: true });
    expect(decideSemidefinite(shifted(a, rational(-1n, 10n ** 40n)))).toMatchObject({ semidefinite: false });
  });

  test('agrees with floating-point eigenvalues on random Hermitian matrices', () => {
    const random = seededRandom('signs');
    let positive = 0;
    for (let trial = 0; trial < 40; trial++) {
      const n = 2 + random.integer(4);
      const b = randomMatrix(random, n, n);
      const a = shifted(
        g.scaleGaussianMatrix(g.addGaussianMatrix(b, g.adjointGaussianMatrix(b)), gaussian(rational(1n, 2n))),
        rational(BigInt(random.integer(40))),
      );
      const smallest = hermitianEigenvalues(toDoubles(a))[0];
      expect(Math.abs(smallest)).toBeGreaterThan(1e-9);
      const verdict = decideSemidefinite(a);
      expect(verdict.semidefinite, `smallest eigenvalue ${smallest}`).toBe(smallest > 0);
      if (verdict.semidefinite) positive++;
    }
    expect(positive).toBeGreaterThan(5);
    expect(positive).toBeLessThan(35);
  });

  test('zero pivots need zero rows', () => {
    const rows = (re: number[][]) => g.gaussianFromMatrix(fromRows(re));
    expect(
      decideSemidefinite(
        rows([
          [0, 1],
          [1, 0],
        ]),
      ),
    ).toEqual({ semidefinite: false, index: 0 });
    expect(
      decideSemidefinite(
        rows([
          [0, 1],
          [1, 5],
        ]),
      ),
    ).toMatchObject({ semidefinite: false, index: 0 });
    expect(
      decideSemidefinite(
        rows([
          [1, 1],
          [1, 1],
        ]),
      ),
    ).toMatchObject({ semidefinite: true, order: [0] });
    expect(
      decideSemidefinite(
        rows([
          [1, 0, 0],
          [0, 0, 0],
          [0, 0, 2],
        ]),
      ),
    ).toMatchObject({ semidefinite: true, order: [0, 2] });
    expect(
      decideSemidefinite(
        rows([
          [1, 2],
          [2, 3],
        ]),
      ),
    ).toMatchObject({ semidefinite: false, index: 1 });
    expect(decideSemidefinite(rows([[-1]]))).toEqual({ semidefinite: false, index: 0 });
    expect(decideSemidefinite(g.gaussianZeros(0))).toEqual({ semidefinite: true, order: [], pivots: [] });
  });

  test('an identity block with rational coupling is eliminated without growth', () => {
    // [P C; C* 1] with P = CC*: singular of rank n.
    const c = randomMatrix(seededRandom('schur'), 4, 30);
    const p = gram(c);
    const a = g.gaussianFromEntries(34, 34, (i, j) => {
      if (i < 4 && j < 4) return p.entries[i * 4 + j];
      if (i < 4) return c.entries[i * 30 + j - 4];
      if (j < 4) return g.adjointGaussianMatrix(c).entries[(i - 4) * 4 + j];
      return gaussian(i === j ? RATIONAL_ONE : rational(0n));
    });
    const verdict = decideSemidefinite(a);
    expect(verdict.semidefinite && verdict.pivots).toHaveLength(30);
    expect(verdict.semidefinite && verdict.pivots.every((d) => d.denominator === 1n)).toBe(true);
  });

  test('products and adjoints obey (AB)* = B*A* and distribute over sums, exactly', () => {
    const random = seededRandom('matrix laws');
    const [a, b, c] = [randomMatrix(random, 3, 4), randomMatrix(random, 4, 2), randomMatrix(random, 4, 2)];
    const ab = g.multiplyGaussianMatrix(a, b);
    const swapped = g.multiplyGaussianMatrix(g.adjointGaussianMatrix(b), g.adjointGaussianMatrix(a));
    expect(g.equalGaussianMatrix(g.adjointGaussianMatrix(ab), swapped)).toBe(true);
    const difference = g.multiplyGaussianMatrix(a, g.subtractGaussianMatrix(b, c));
    const termwise = g.subtractGaussianMatrix(ab, g.multiplyGaussianMatrix(a, c));
    expect(g.equalGaussianMatrix(difference, termwise)).toBe(true);
    expect(g.equalGaussianMatrix(ab, g.multiplyGaussianMatrix(a, c))).toBe(false);
  });

  test('a matrix that is not Hermitian is refused', () => {
    expect(() =>
      decideSemidefinite(
        g.gaussianFromMatrix(
          fromRows([
            [1, 2],
            [3, 1],
          ]),
        ),
      ),
    ).toThrow('Hermitian');
    expect(() => decideSemidefinite(g.gaussianFromMatrix(fromRows([[1]], [[1]])))).toThrow('Hermitian');
    expect(() => g.gaussianMatrix(2, 2, [])).toThrow('expected 4 entries');
    expect(() => g.multiplyGaussianMatrix(g.gaussianZeros(2), g.gaussianZeros(3))).toThrow('inner sides');
    expect(() => g.addGaussianMatrix(g.gaussianZeros(2), g.gaussianZeros(3))).toThrow('one shape');
  });
});
