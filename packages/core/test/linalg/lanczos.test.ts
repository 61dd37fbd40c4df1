import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lanczosSmallest } from '../../src/linalg/lanczos.js';
import { symmetricEigen } from '../../src/linalg/symmetric-eigen.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { hermitianFamilies } from './support/inputs.js';

type Apply = (x: Float64Array, y: Float64Array) => void;

const request = { tolerance: 1e-12, maxMatvecs: 20000 };

describe('lanczosSmallest', () => {
  for (const n of [1, 2, 7, 45, 90]) {
    for (const [family, a] of Object.entries(hermitianFamilies(seededRandom(`lanczos ${n}`), n, false))) {
      if (family.startsWith('scaled')) continue;
      it(`agrees with the dense solver: n = ${n}, ${family}`, () => {
        const count = Math.min(n, 4);
        const found = lanczosSmallest({
          ...request,
          dimension: n,
          apply: dense(a.re, n),
          count,
          random: seededRandom(1),
        });
        const { values } = symmetricEigen(a.re, n);
        const scale = Math.max(Math.abs(values[0]), Math.abs(values[n - 1]), 1e-300);
        expectAllClose(found.values, values.slice(0, count), 1e-11 * scale, 'eigenvalue');
        checkPairs(dense(a.re, n), found, 2e-12 * scale);
      });
    }
  }

  it('counts every copy of a multiple eigenvalue, in any unit', () => {
    for (const unit of [1, 1e-6, 1e6]) {
      // Walk on the 8-cube: 0 once, 2 eight times, 4 twenty-eight times.
      const cube: Apply = (x, y) => {
        for (let i = 0; i < 256; i++) {
          let sum = 8 * x[i];
          for (let bit = 1; bit < 256; bit *= 2) sum -= x[i ^ bit];
          y[i] = unit * sum;
        }
      };
      const found = lanczosSmallest({ ...request, dimension: 256, apply: cube, count: 11, random: seededRandom(2) });
      const expected = [0, 2, 2, 2, 2, 2, 2, 2, 2, 4, 4].map((x) => x * unit);
      expectAllClose(found.values, expected, 1e-10 * unit, `unit ${unit}, eigenvalue`);
      checkPairs(cube, found, 1e-10 * unit);
    }
  });

  it('leaves deflated vectors out, in any basis of their span', () => {
    const n = 120;
    const cycle: Apply = (x, y) => {
      for (let i = 0; i < n; i++) y[i] = 2 * x[i] - x[(i + 1) % n] - x[(i + n - 1) % n];
    };
    const exact = (k: number): number => 2 - 2 * Math.cos((2 * Math.PI * k) / n);
    const wave = Float64Array.from({ length: n }, (_, i) => 1 + Math.cos((2 * Math.PI * i) / n));
    const deflate = [new Float64Array(n).fill(3), wave, wave];
    const found = lanczosSmallest({
      ...request,
      dimension: n,
      apply: cycle,
      count: 3,
      deflate,
      random: seededRandom(3),
    });
    expectAllClose(found.values, [exact(1), exact(2), exact(2)], 1e-11, 'eigenvalue');
    for (const v of found.vectors) {
      for (const d of deflate) expectClose(dot(v, d), 0, 1e-10, 'overlap with a deflated vector');
    }
  });

  it('resolves the bottom of a long chain', () => {
    const n = 600;
    const chain: Apply = (x, y) => {
      for (let i = 0; i < n; i++) y[i] = 2 * x[i] - (i > 0 ? x[i - 1] : 0) - (i < n - 1 ? x[i + 1] : 0);
    };
    const found = lanczosSmallest({ ...request, dimension: n, apply: chain, count: 2, random: seededRandom(4) });
    const exact = [1, 2].map((k) => 4 * Math.sin((k * Math.PI) / (2 * n + 2)) ** 2);
    expectAllClose(found.values, exact, 1e-13, 'eigenvalue');
    checkPairs(chain, found, 5e-12);
    // Far more products than the subspace holds: the restarts were used.
    expect(found.matvecs).toBeGreaterThan(200);
    expect(found.matvecs).toBeLessThan(4000);
  });

  it('is unchanged by a shift of the operator', () => {
    fc.assert(
      fc.property(
        fc.integer(),
        fc.integer({ min: 3, max: 60 }),
        fc.double({ min: -5, max: 5, noNaN: true }),
        (seed, n, shift) => {
          const random = seededRandom(seed);
          const d = Float64Array.from({ length: n }, () => random.normal());
          const apply =
            (s: number): Apply =>
            (x, y) =>
              x.forEach((value, i) => (y[i] = (d[i] + s) * value));
          const run = (s: number): Float64Array =>
            lanczosSmallest({ ...request, dimension: n, apply: apply(s), count: 2, random: seededRandom(seed) }).values;
          const plain = d.slice().sort();
          expectAllClose(run(shift), [plain[0] + shift, plain[1] + shift], 1e-10, 'shifted eigenvalue');
        },
      ),
      { numRuns: 30 },
    );
  });

  it('gives the same doubles from the same seed', () => {
    const a = hermitianFamilies(seededRandom('same'), 40, false)['random normal'].re;
    const run = (): unknown =>
      lanczosSmallest({ ...request, dimension: 40, apply: dense(a, 40), count: 3, random: seededRandom(9) });
    expect(run()).toEqual(run());
  });

  it('says when it did not converge, and refuses impossible counts', () => {
    const n = 400;
    const apply: Apply = (x, y) => x.forEach((value, i) => (y[i] = (i * value) / n));
    const base = { dimension: n, apply, random: seededRandom(5), tolerance: 1e-12 };
    expect(() => lanczosSmallest({ ...base, count: 2, maxMatvecs: 60 })).toThrow(
      expect.objectContaining({ code: 'no-convergence' }),
    );
    for (const count of [-1, 1.5, n + 1]) {
      expect(() => lanczosSmallest({ ...base, count, maxMatvecs: 60 })).toThrow(
        expect.objectContaining({ code: 'usage' }),
      );
    }
    const none = lanczosSmallest({ ...base, count: 0, maxMatvecs: 0 });
    expect([none.values.length, none.vectors.length, none.matvecs]).toEqual([0, 0, 0]);
  });
});

function dense(a: Float64Array, n: number): Apply {
  return (x, y) => {
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let j = 0; j < n; j++) sum += a[i * n + j] * x[j];
      y[i] = sum;
    }
  };
}

function dot(x: Float64Array, y: Float64Array): number {
  return x.reduce((sum, value, i) => sum + value * y[i], 0);
}

/** Orthonormal vectors whose residuals are as reported and at most the tolerance. */
function checkPairs(apply: Apply, found: ReturnType<typeof lanczosSmallest>, tolerance: number): void {
  const { values, vectors, residuals } = found;
  vectors.forEach((v, j) => {
    const y = new Float64Array(v.length);
    apply(v, y);
    const residual = Math.sqrt(y.reduce((sum, value, i) => sum + (value - values[j] * v[i]) ** 2, 0));
    expectBelow(residual, tolerance, `residual ${j}`);
    expectClose(residuals[j], residual, tolerance / 100, `reported residual ${j}`);
    vectors.forEach((w, k) => expectClose(dot(v, w), j === k ? 1 : 0, 1e-12, `product of vectors ${j} and ${k}`));
  });
}
