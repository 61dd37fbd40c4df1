import { describe, expect, test } from 'vitest';
import { complexPointMatrix, entryAt } from '../../../src/checker/arithmetic/interval-matrix.js';
import { contains } from '../../../src/checker/arithmetic/interval.js';
import { rotated, unitaryFrame } from '../../../src/checker/arithmetic/unitary-frame.js';
import {
  type ComplexMatrix,
  fromEntries,
  fromRows,
  hermitianPart,
  identity,
  kronecker,
  scale,
  zeros,
} from '../../../src/linalg/complex-matrix.js';
import { hermitianEigen } from '../../../src/linalg/hermitian-eigen.js';
import { seededRandom } from '../../../src/random.js';
import { big, bigSqrt, minus, plus, times, toNumber } from './big-float.js';
import { bigAdjoint, bigMatrix, bigMultiply, bigPolar, bigSubtract } from './big-matrix.js';
import { expectEnclosed } from './enclosure-checks.js';

const random = seededRandom('unitary frames');

const randomMatrix = (n: number) => fromEntries(n, n, () => [random.normal(), random.normal()]);
const randomUnitary = (n: number) => hermitianEigen(hermitianPart(randomMatrix(n))).vectors;

function expectRotated(u: ComplexMatrix, x: ComplexMatrix): void {
  const found = rotated(unitaryFrame(u), x);
  const polar = bigPolar(bigMatrix(u));
  const exact = bigMultiply(bigAdjoint(polar), bigMultiply(bigMatrix(x), polar));
  const n = x.rows;
  const size = Math.max(...x.re.map(Math.abs), ...x.im.map(Math.abs));
  for (let k = 0; k < n * n; k++) {
    const entry = entryAt(found, Math.floor(k / n), k % n);
    expectEnclosed(entry.re, exact.re[k], `re ${k}`);
    expectEnclosed(entry.im, exact.im[k], `im ${k}`);
    // Two neighbouring doubles, unless the entry is nearly zero.
    expect(entry.re.hi - entry.re.lo).toBeLessThanOrEqual(2 ** -51 * Math.abs(entry.re.lo) + 2 ** -200 * size);
  }
}

describe('rotation into an exactly unitary frame', () => {
  test.each([1, 2, 3, 5])('holds Ũ*XŨ in 700 bits and is as tight as doubles allow, side %d', (n) => {
    const u = n === 1 ? fromRows([[0.6]], [[0.8]]) : randomUnitary(n);
    for (const factor of [1, 1e-150, 1e200]) expectRotated(u, scale(randomMatrix(n), factor));
    const graded = fromEntries(n, n, () => [Math.exp(40 * random.normal()), -Math.exp(40 * random.normal())]);
    expectRotated(u, graded);
  });

  test('the identity stays within reach of itself, though no double of u is exact', () => {
    for (const n of [2, 3, 6]) {
      const found = rotated(unitaryFrame(randomUnitary(n)), identity(n));
      for (let k = 0; k < n * n; k++) {
        const entry = entryAt(found, Math.floor(k / n), k % n);
        const target = k % (n + 1) === 0 ? 1 : 0;
        expect(contains(entry.re, target) && contains(entry.im, 0), `${k}: ${entry.re.lo} ${entry.re.hi}`).toBe(true);
        expect(entry.re.hi - entry.re.lo).toBeLessThan(target === 1 ? 1e-15 : 1e-70);
      }
    }
  });

  test('the distance from u to Ũ is bounded', () => {
    for (const off of [0, 1e-9, 1e-2]) {
      const base = randomUnitary(3);
      const u = fromEntries(3, 3, (i, j) => [base.re[3 * i + j] + off * random.normal(), base.im[3 * i + j]]);
      const gap = bigSubtract(bigPolar(bigMatrix(u)), bigMatrix(u));
      const square = [...gap.re, ...gap.im].reduce((sum, x) => plus(sum, times(x, x)), big(0));
      // ‖·‖₂ ≤ ‖·‖_F ≤ √3 ‖·‖₂.
      const frobenius = toNumber(bigSqrt(square));
      const { distance } = unitaryFrame(u);
      expect(distance).toBeGreaterThanOrEqual(frobenius / Math.sqrt(3));
      expect(distance).toBeLessThan(30 * frobenius + 1e-15);
    }
  });

  test('permutations with phases ±1, ±i rotate exactly', () => {
    const u = fromRows(
      [
        [0, 1, 0],
        [0, 0, 0],
        [-1, 0, 0],
      ],
      [
        [0, 0, 0],
        [0, 0, 1],
        [0, 0, 0],
      ],
    );
    const x = randomMatrix(3);
    const found = rotated(unitaryFrame(u), x);
    expect([...found.re.lo]).toEqual([...found.re.hi]);
    expect([...found.im.lo]).toEqual([...found.im.hi]);
    expectRotated(u, x);
    expect(unitaryFrame(u).distance).toBe(0);
  });

  test('zeros between independent parts of the frame stay exact zeros', () => {
    const u = kronecker(randomUnitary(2), identity(2));
    const x = kronecker(randomMatrix(2), identity(2));
    const found = rotated(unitaryFrame(u), x);
    for (let i = 0; i < 4; i++) {
      for (let j = 0; j < 4; j++) {
        if (i % 2 === j % 2) continue;
        expect(entryAt(found, i, j)).toEqual({ re: { lo: 0, hi: 0 }, im: { lo: 0, hi: 0 } });
      }
    }
    expectRotated(u, x);
  });

  test('the identity frame and the zero matrix', () => {
    const x = randomMatrix(2);
    expect(rotated(unitaryFrame(null), x)).toEqual(complexPointMatrix(x));
    const zero = rotated(unitaryFrame(randomUnitary(2)), zeros(2));
    expect([...zero.re.lo, ...zero.re.hi].every((y) => y === 0)).toBe(true);
  });

  test('a frame that is not nearly unitary, and entries that are not finite, are refused', () => {
    expect(() => unitaryFrame(scale(identity(2), 1.2))).toThrow('nearly unitary');
    expect(() => unitaryFrame(zeros(2))).toThrow('nearly unitary');
    expect(() => unitaryFrame(fromRows([[NaN]]))).toThrow('finite');
    expect(() => rotated(unitaryFrame(identity(1)), fromRows([[Infinity]]))).toThrow('finite');
  });
});

test('the polar factor of the reference is unitary', () => {
  const polar = bigPolar(bigMatrix(randomUnitary(3)));
  const square = bigMultiply(bigAdjoint(polar), polar);
  for (let k = 0; k < 9; k++) {
    expect(Math.abs(toNumber(minus(square.re[k], big(k % 4 === 0 ? 1 : 0))))).toBeLessThan(1e-190);
    expect(Math.abs(toNumber(square.im[k]))).toBeLessThan(1e-190);
  }
});
