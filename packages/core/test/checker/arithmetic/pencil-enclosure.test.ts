import { describe, expect, test } from 'vitest';
import { complexPointMatrix, widenComplexMatrix } from '../../../src/checker/arithmetic/interval-matrix.js';
import { encloseSmallestPencil } from '../../../src/checker/arithmetic/pencil-enclosure.js';
import {
  type ComplexMatrix,
  add,
  adjoint,
  diagonal,
  fromEntries,
  hermitianPart,
  identity,
  multiply,
} from '../../../src/linalg/complex-matrix.js';
import { hermitianPencil } from '../../../src/linalg/hermitian-pencil.js';
import { seededRandom } from '../../../src/random.js';
import { randomHermitian, withSpectrum } from './known-spectra.js';

const random = seededRandom('pencils');

describe('smallest generalised eigenvalue', () => {
  /** Whole unit triangular matrix: its congruences are exact. */
  const shear = (n: number, real: boolean) =>
    fromEntries(n, n, (i, j) =>
      i === j ? [1, 0] : i < j ? [random.integer(5) - 2, real ? 0 : random.integer(3) - 1] : [0, 0],
    );

  test('holds the exact value for congruent whole pencils', () => {
    for (const d of [[2], [5, 3], [1, 4, 4, 9], [-3, 0, 2, 2, 7]]) {
      for (const real of [true, false]) {
        const x = shear(d.length, real);
        const a = multiply(multiply(adjoint(x), diagonal(d)), x);
        const b = multiply(adjoint(x), x);
        const found = encloseSmallestPencil(complexPointMatrix(a), complexPointMatrix(b));
        expect(found.lo).toBeLessThanOrEqual(Math.min(...d));
        expect(found.hi).toBeGreaterThanOrEqual(Math.min(...d));
        expect(found.hi - found.lo, `${d}`).toBeLessThan(1e-9);
      }
    }
  });

  test('holds the values of the members of interval pencils', () => {
    const [a, b] = [randomHermitian(random, 4, false), withSpectrum([1, 2, 3, 4], false)];
    const wide = (m: ComplexMatrix) => widenComplexMatrix(complexPointMatrix(m), 1e-7);
    const found = encloseSmallestPencil(wide(a), wide(b));
    const exact = encloseSmallestPencil(complexPointMatrix(a), complexPointMatrix(b));
    expect(found.lo).toBeLessThanOrEqual(exact.lo);
    expect(found.hi).toBeGreaterThanOrEqual(exact.hi);
    expect(exact.hi - exact.lo).toBeLessThan(1e-12);
    expect(found.hi - found.lo).toBeLessThan(1e-4);
    const noise = () => hermitianPart(fromEntries(4, 4, () => [1e-7 * (2 * random.uniform() - 1), 0]));
    let [lowest, highest] = [Infinity, -Infinity];
    for (let trial = 0; trial < 50; trial++) {
      const value = hermitianPencil(add(a, noise()), add(b, noise())).values[0];
      [lowest, highest] = [Math.min(lowest, value), Math.max(highest, value)];
    }
    expect(lowest).toBeGreaterThan(found.lo);
    expect(highest).toBeLessThan(found.hi);
    // The members really move the eigenvalue, both ways.
    expect(exact.lo - lowest).toBeGreaterThan(1e-9);
    expect(highest - exact.hi).toBeGreaterThan(1e-9);
  });

  test('a matrix B that is not definite is refused', () => {
    const a = complexPointMatrix(identity(4));
    for (const d of [
      [0, 1, 1, 1],
      [-1, 1, 1, 1],
    ]) {
      expect(() => encloseSmallestPencil(a, complexPointMatrix(withSpectrum(d, true)))).toThrow('positive definite');
    }
    expect(() => encloseSmallestPencil(a, complexPointMatrix(identity(3)))).toThrow('one side');
  });
});
