import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  diagonal,
  frobeniusNorm,
  identity,
  multiply,
  multiplyAdjointFirst,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import {
  pencilWork,
  smallestPencilWork,
  symmetricPencil,
  symmetricPencilInto,
  symmetricPencilSmallest,
  symmetricPencilSmallestInto,
} from '../../src/linalg/symmetric-pencil.js';
import { symmetricEigenvalues } from '../../src/linalg/symmetric-eigen.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { hermitianFamilies, randomMatrix, shuffle, wellConditioned } from './support/inputs.js';
import { asMatrix, EIGEN_RATIO } from './support/ratios.js';

describe('symmetricPencil', () => {
  for (const n of [0, 1, 2, 5, 16, 24]) {
    const random = seededRandom(`pencil ${n}`);
    const b = wellConditioned(random, n, false);
    for (const [family, a] of Object.entries(hermitianFamilies(random, n, false))) {
      it(`solves a x = λ b x: n = ${n}, ${family}`, () => {
        const { values, vectors } = symmetricPencil(a.re, b.re, n);
        const x = asMatrix(vectors, n);
        const left = multiply(a, x);
        const residual = frobeniusNorm(subtract(left, multiply(multiply(b, x), diagonal(values))));
        const size = frobeniusNorm(a) * frobeniusNorm(x) * n * 2 ** -52;
        expectBelow(size > 0 ? residual / size : residual, EIGEN_RATIO, 'residual ratio');
        const gram = multiplyAdjointFirst(x, multiply(b, x));
        const defect = frobeniusNorm(subtract(gram, identity(n)));
        expectBelow(n > 0 ? defect / (n * 2 ** -52) : defect, EIGEN_RATIO, 'b-orthonormality ratio');
      });
    }
  }

  it('is unchanged by grading both matrices over twelve decades', () => {
    const random = seededRandom('graded pencil');
    for (const n of [4, 8, 16, 24]) {
      const a = randomSymmetric(random, n);
      const b = wellConditioned(random, n, false).re;
      const powers = Array.from({ length: n }, (_, k) => 2 ** Math.round((-40 * k) / (n - 1)));
      const d = shuffle(random, powers);
      const grade = (m: Float64Array): Float64Array => m.map((x, k) => x * d[Math.floor(k / n)] * d[k % n]);
      const { values } = symmetricPencil(a, b, n);
      expectAllClose(symmetricPencil(grade(a), grade(b), n).values, values, 1e-14, `n = ${n}, eigenvalue`);
      expectClose(symmetricPencilSmallest(grade(a), grade(b), n).value, values[0], 1e-14, `n = ${n}, smallest`);
    }
  });

  it('follows shifts, scalings and exchanges of the two matrices', () => {
    const numbers = fc.record({
      seed: fc.integer(),
      n: fc.integer({ min: 1, max: 9 }),
      t: fc.double({ min: -3, max: 3, noNaN: true }),
    });
    fc.assert(
      fc.property(numbers, ({ seed, n, t }) => {
        const random = seededRandom(seed);
        const a = wellConditioned(random, n, false).re;
        const b = wellConditioned(random, n, false).re;
        const values = symmetricPencil(a, b, n).values;
        const top = values[n - 1];
        const shifted = symmetricPencil(
          a.map((x, k) => x + t * b[k]),
          b,
          n,
        ).values;
        expectAllClose(
          shifted,
          values.map((x) => x + t),
          1e-12 * (top + 3),
          'shifted eigenvalue',
        );
        const exchanged = symmetricPencil(b, a, n)
          .values.map((x) => 1 / x)
          .reverse();
        expectAllClose(exchanged, values, 1e-12 * top, 'exchanged eigenvalue');
      }),
      { numRuns: 50 },
    );
  });

  it('reduces to the plain problem for b = 1', () => {
    const a = randomSymmetric(seededRandom('plain'), 11);
    expectAllClose(symmetricPencil(a, identity(11).re, 11).values, symmetricEigenvalues(a, 11), 1e-14, 'eigenvalue');
  });

  it('names the pivot at which b fails to be positive definite', () => {
    const expected = expect.objectContaining({ code: 'not-positive-definite', details: { pivot: 1, size: 2 } });
    const b = Float64Array.of(1, 2, 2, 1);
    expect(() => symmetricPencil(identity(2).re, b, 2)).toThrow(expected);
    expect(() => symmetricPencilSmallest(identity(2).re, b, 2)).toThrow(expected);
    const zero = new Float64Array(1);
    const first = expect.objectContaining({ details: { pivot: 0, size: 1 } });
    expect(() => symmetricPencil(zero, zero, 1)).toThrow(first);
    expect(() => symmetricPencilSmallest(zero, zero, 1)).toThrow(first);
    const work = smallestPencilWork(2);
    expect(symmetricPencilSmallestInto(identity(2).re, b, 2, null, work)).toBeNaN();
    expect(symmetricPencilInto(identity(2).re, b, 2, new Float64Array(2), null, work)).toBe(1);
  });

  it('refuses entries that are not finite', () => {
    const expected = expect.objectContaining({ code: 'not-finite' });
    expect(() => symmetricPencil(Float64Array.of(NaN), Float64Array.of(1), 1)).toThrow(expected);
    expect(() => symmetricPencilSmallest(Float64Array.of(1), Float64Array.of(NaN), 1)).toThrow(expected);
  });
});

describe('symmetricPencilSmallest', () => {
  it('agrees with the full solution, from fresh and from reused buffers', () => {
    const random = seededRandom('smallest pencil');
    for (const n of [1, 2, 3, 8, 24]) {
      const work = smallestPencilWork(n);
      const all = pencilWork(n);
      const vector = new Float64Array(n);
      const values = new Float64Array(n);
      for (let trial = 0; trial < 5; trial++) {
        const a = randomSymmetric(random, n);
        const b = wellConditioned(random, n, false);
        const value = symmetricPencilSmallestInto(a, b.re, n, vector, work);
        expect({ value, vector }).toEqual(symmetricPencilSmallest(a, b.re, n));
        expect(symmetricPencilInto(a, b.re, n, values, null, all)).toBe(-1);
        expectClose(value, values[0], 1e-14 * n, `n = ${n}, value`);
        const x = asMatrix(vector, n, 1);
        expectClose(multiplyAdjointFirst(x, multiply(b, x)).re[0], 1, 1e-13, `n = ${n}, xᵀbx`);
        expectClose(multiplyAdjointFirst(x, multiply(asMatrix(a, n), x)).re[0], value, 1e-13, `n = ${n}, xᵀax`);
      }
    }
  });
});

function randomSymmetric(random: Random, n: number): Float64Array {
  const g = randomMatrix(random, n, n, false).re;
  return g.map((x, k) => x + g[(k % n) * n + Math.floor(k / n)]);
}
