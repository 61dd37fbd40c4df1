import { describe, expect, test } from 'vitest';
import * as cx from '../../../src/checker/arithmetic/complex-interval.js';
import * as im from '../../../src/checker/arithmetic/interval-matrix.js';
import { type ComplexIntervalMatrix, type IntervalMatrix } from '../../../src/checker/arithmetic/interval-matrix.js';
import {
  multiplyComplexMatrix,
  multiplyIntervalMatrix,
  multiplyTightly,
} from '../../../src/checker/arithmetic/interval-product.js';
import { isSubset } from '../../../src/checker/arithmetic/interval.js';
import {
  type Rational,
  RATIONAL_ZERO,
  addRational,
  compareRational,
  multiplyRational,
  negateRational,
  rationalFromDouble,
} from '../../../src/checker/arithmetic/rational.js';
import { fromEntries, fromRows } from '../../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../../src/random.js';

const random = seededRandom('interval products');

/** A random interval matrix and a random real matrix inside it; graded entries, some exact zeros, some points. */
function boxed(rows: number, cols: number, thickness: number, grade: number) {
  const member = new Float64Array(rows * cols);
  const box = im.intervalZeros(rows, cols);
  for (let k = 0; k < member.length; k++) {
    const kind = random.integer(6);
    member[k] = kind === 0 ? 0 : random.normal() * Math.exp(grade * random.normal());
    const thick = kind < 2 ? 0 : thickness * Math.abs(member[k]);
    box.lo[k] = member[k] - thick * random.uniform();
    box.hi[k] = member[k] + thick * random.uniform();
  }
  return { member, box };
}

const dot = (a: Float64Array, b: Float64Array, n: number, cols: number, i: number, j: number): Rational => {
  let sum = RATIONAL_ZERO;
  for (let k = 0; k < n; k++) {
    sum = addRational(sum, multiplyRational(rationalFromDouble(a[i * n + k]), rationalFromDouble(b[k * cols + j])));
  }
  return sum;
};

const inside = (m: IntervalMatrix, k: number, x: Rational): boolean =>
  compareRational(rationalFromDouble(m.lo[k]), x) <= 0 && compareRational(x, rationalFromDouble(m.hi[k])) <= 0;

function complexBox(n: number, thickness: number, grade: number) {
  const [x, y] = [boxed(n, n, thickness, grade), boxed(n, n, thickness, grade)];
  const matrix: ComplexIntervalMatrix = { rows: n, cols: n, re: x.box, im: y.box };
  return { matrix, re: x.member, im: y.member };
}

describe('products of interval matrices', () => {
  test.each([
    [0, 0],
    [1e-12, 0],
    [0.3, 0],
    [0, 30],
    [1e-3, 150],
  ])('contain the exact products (thickness %d, grading e^%d)', (thickness, grade) => {
    for (const [m, n, p] of [
      [1, 1, 1],
      [3, 5, 2],
      [7, 6, 7],
    ]) {
      const a = boxed(m, n, thickness, grade);
      const b = boxed(n, p, thickness, grade);
      const product = multiplyIntervalMatrix(a.box, b.box);
      for (let i = 0; i < m; i++) {
        for (let j = 0; j < p; j++) {
          if (!Number.isFinite(product.lo[i * p + j])) continue;
          expect(inside(product, i * p + j, dot(a.member, b.member, n, p, i, j))).toBe(true);
        }
      }
    }
  });

  test.each([multiplyComplexMatrix, multiplyTightly])('complex: %o contains the exact products', (multiply) => {
    for (const [n, thickness, grade] of [
      [1, 0, 0],
      [4, 0, 20],
      [5, 1e-10, 1],
      [3, 0.5, 1],
    ]) {
      const a = complexBox(n, thickness, grade);
      const b = complexBox(n, thickness, grade);
      const product = multiply(a.matrix, b.matrix);
      for (let i = 0; i < n; i++) {
        for (let j = 0; j < n; j++) {
          const part = (x: Float64Array, y: Float64Array) => dot(x, y, n, n, i, j);
          const re = addRational(part(a.re, b.re), negateRational(part(a.im, b.im)));
          expect(inside(product.re, i * n + j, re)).toBe(true);
          expect(inside(product.im, i * n + j, addRational(part(a.re, b.im), part(a.im, b.re)))).toBe(true);
        }
      }
    }
  });

  test('are tight: within a few n·2^-53·|A||B| for points', () => {
    const n = 60;
    const a = Float64Array.from({ length: n * n }, () => random.normal());
    const b = Float64Array.from({ length: n * n }, () => random.normal());
    const product = multiplyIntervalMatrix(im.pointMatrix(a, n), im.pointMatrix(b, n));
    let worst = 0;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        let size = 0;
        for (let k = 0; k < n; k++) size += Math.abs(a[i * n + k] * b[k * n + j]);
        worst = Math.max(worst, (product.hi[i * n + j] - product.lo[i * n + j]) / (n * 2 ** -53 * size));
      }
    }
    expect(worst).toBeLessThan(2.3);
  });

  test('tight products of structured matrices are points, and zeros stay zeros', () => {
    const x = im.complexPointMatrix(
      fromRows(
        [
          [0, 1],
          [1, 0],
        ],
        [
          [0, -2],
          [2, 0],
        ],
      ),
    );
    const square = multiplyTightly(x, x);
    // (1−2i)(1+2i) = 5 on the diagonal.
    for (const part of [square.re.lo, square.re.hi]) expect([...part]).toEqual([5, 0, 0, 5]);
    for (const part of [square.im.lo, square.im.hi]) expect(part.every((v) => v === 0)).toBe(true);
    const zero = multiplyIntervalMatrix(im.intervalZeros(3, 2), im.pointMatrix(Float64Array.of(1, 2, 3, 4), 2));
    expect([...zero.lo, ...zero.hi].every((v) => v === 0)).toBe(true);
  });

  test('underflowing products are covered', () => {
    const tiny = im.pointMatrix(Float64Array.of(1e-200), 1);
    const product = multiplyIntervalMatrix(tiny, tiny);
    expect(product.lo[0]).toBeLessThanOrEqual(0);
    expect(product.hi[0]).toBeGreaterThan(0);
  });

  test('unbounded entries make unbounded products', () => {
    const wide = { rows: 1, cols: 1, lo: Float64Array.of(-Infinity), hi: Float64Array.of(1) };
    const product = multiplyIntervalMatrix(wide, im.pointMatrix(Float64Array.of(2), 1));
    expect([product.lo[0], product.hi[0]]).toEqual([-Infinity, Infinity]);
    const huge = im.pointMatrix(Float64Array.of(1e300), 1);
    expect(multiplyIntervalMatrix(huge, huge).hi[0]).toBe(Infinity);
  });

  test('bad shapes and entries are refused', () => {
    expect(() => multiplyIntervalMatrix(im.intervalZeros(2, 3), im.intervalZeros(2, 3))).toThrow('inner sides');
    expect(() => im.pointMatrix(Float64Array.of(1, NaN), 1, 2)).toThrow('finite');
    expect(() => im.pointMatrix(Float64Array.of(1), 2)).toThrow('expected 4 entries');
    expect(() => im.addIntervalMatrix(im.intervalZeros(2), im.intervalZeros(3))).toThrow('one shape');
  });
});

describe('entrywise operations', () => {
  const a = im.complexPointMatrix(fromEntries(3, 3, (i, j) => [i - j, i + 2 * j]));
  const b = im.complexPointMatrix(fromEntries(3, 3, (i, j) => [i * j, 1 - i]));

  test('agree with complex intervals entry by entry', () => {
    const factor = { lo: -1, hi: 2 };
    const cases: [ComplexIntervalMatrix, (i: number, j: number) => cx.ComplexInterval][] = [
      [im.addComplexMatrix(a, b), (i, j) => cx.addComplex(im.entryAt(a, i, j), im.entryAt(b, i, j))],
      [im.subComplexMatrix(a, b), (i, j) => cx.subComplex(im.entryAt(a, i, j), im.entryAt(b, i, j))],
      [im.scaleComplexMatrix(a, factor), (i, j) => cx.scaleComplex(im.entryAt(a, i, j), factor)],
      [im.adjointComplexMatrix(a), (i, j) => cx.conjugateComplex(im.entryAt(a, j, i))],
    ];
    for (const [matrix, entry] of cases) {
      for (let i = 0; i < 3; i++) for (let j = 0; j < 3; j++) expect(im.entryAt(matrix, i, j)).toEqual(entry(i, j));
    }
    const widened = im.widenComplexMatrix(a, 0.5);
    expect(widened.re.lo[1]).toBe(a.re.lo[1] - 0.5);
    expect(widened.im.hi[1]).toBe(a.im.hi[1] + 0.5);
  });

  test('rectangles: products and moduli contain those of their points', () => {
    for (let k = 0; k < 300; k++) {
      const side = () => {
        const x = random.normal();
        return { lo: x - random.uniform(), hi: x + random.uniform() };
      };
      const x = { re: side(), im: side() };
      const y = { re: side(), im: side() };
      const pick = (s: { lo: number; hi: number }) => Math.min(s.hi, s.lo + random.integer(3) * 0.5 * (s.hi - s.lo));
      const [a0, a1, b0, b1] = [pick(x.re), pick(x.im), pick(y.re), pick(y.im)];
      const p = cx.mulComplex(cx.complexPoint(a0, a1), cx.complexPoint(b0, b1));
      const whole = cx.mulComplex(x, y);
      expect(isSubset(p.re, whole.re) && isSubset(p.im, whole.im)).toBe(true);
      expect(isSubset(cx.squaredModulus(cx.complexPoint(a0, a1)), cx.squaredModulus(x))).toBe(true);
    }
    expect(cx.containsComplex(cx.complexPoint(1, 2), 1, 2)).toBe(true);
    expect(cx.containsComplex(cx.complexPoint(1, 2), 1, 2.1)).toBe(false);
  });
});
