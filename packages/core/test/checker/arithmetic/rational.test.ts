import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { RATIONAL_DIGITS } from '../../../src/checker/arithmetic/limits.js';
import { intervalFromRational, nearestRational } from '../../../src/checker/arithmetic/rational-rounding.js';
import { parseRational, printRational } from '../../../src/checker/arithmetic/rational-text.js';
import * as q from '../../../src/checker/arithmetic/rational.js';
import { type Rational, rational } from '../../../src/checker/arithmetic/rational.js';
import { neighbour } from './enclosure-checks.js';

const RUNS = { seed: 1637, numRuns: 500 };
const whole = fc.oneof(fc.bigInt({ min: -50n, max: 50n }), fc.bigInt({ min: -(10n ** 40n), max: 10n ** 40n }));
const number = fc
  .tuple(
    whole,
    whole.filter((d) => d !== 0n),
  )
  .map(([p, d]) => rational(p, d));

/** Equal as fractions and in lowest terms. */
function expectRational(found: Rational, p: bigint, d: bigint): void {
  expect(found.numerator * d).toBe(p * found.denominator);
  expect(found.denominator > 0n).toBe(true);
  let [x, y] = [found.numerator < 0n ? -found.numerator : found.numerator, found.denominator];
  while (y !== 0n) [x, y] = [y, x % y];
  expect(x).toBe(1n);
}

describe('rational numbers', () => {
  test('field operations, in lowest terms', () => {
    fc.assert(
      fc.property(number, number, (a, b) => {
        const [n, d, m, e] = [a.numerator, a.denominator, b.numerator, b.denominator];
        expectRational(q.addRational(a, b), n * e + m * d, d * e);
        expectRational(q.subtractRational(a, b), n * e - m * d, d * e);
        expectRational(q.multiplyRational(a, b), n * m, d * e);
        if (m !== 0n) expectRational(q.divideRational(a, b), n * e, d * m);
        expect(q.compareRational(a, b)).toBe(q.signRational(q.subtractRational(a, b)));
        expect(q.compareRational(q.negateRational(a), q.negateRational(b))).toBe(q.compareRational(b, a));
      }),
      RUNS,
    );
    expect(rational(6n, -4n)).toEqual({ numerator: -3n, denominator: 2n });
    expect(rational(0n, -7n)).toEqual(q.RATIONAL_ZERO);
    expect(() => rational(1n, 0n)).toThrow('denominator other than 0');
    expect(() => q.divideRational(q.RATIONAL_ONE, q.RATIONAL_ZERO)).toThrow('denominator other than 0');
    expect([q.gcd(0n, -12n), q.gcd(2n ** 80n, 6n), q.lcm(4n, 6n)]).toEqual([12n, 2n, 12n]);
  });

  test('doubles convert exactly and come back as points', () => {
    for (const x of [0, 1, -0.5, 0.1, 5e-324, -1e-310, Number.MAX_VALUE, 2 ** -1022, 1e22, Math.PI]) {
      const exact = q.rationalFromDouble(x);
      expectRational(exact, exact.numerator, exact.denominator);
      expect(intervalFromRational(exact)).toEqual({ lo: x, hi: x });
    }
    expect(q.rationalFromDouble(0.1)).toEqual(rational(3602879701896397n, 2n ** 55n));
    expect(q.rationalFromDouble(5e-324)).toEqual(rational(1n, 2n ** 1074n));
    expect(() => q.rationalFromDouble(NaN)).toThrow('finite');
  });

  test('the enclosing interval is two neighbouring doubles around the number', () => {
    fc.assert(
      fc.property(number, fc.integer({ min: -900, max: 850 }), (a, shift) => {
        const x =
          shift < 0
            ? rational(a.numerator, a.denominator << BigInt(-shift))
            : rational(a.numerator << BigInt(shift), a.denominator);
        const { lo, hi } = intervalFromRational(x);
        expect(q.compareRational(q.rationalFromDouble(lo), x)).toBeLessThanOrEqual(0);
        expect(q.compareRational(x, q.rationalFromDouble(hi))).toBeLessThanOrEqual(0);
        if (lo !== hi) expect(lo < 0 ? neighbour(-hi, 1) : neighbour(lo, 1)).toBe(lo < 0 ? -lo : hi);
      }),
      RUNS,
    );
    const huge = rational(10n ** 400n);
    expect(intervalFromRational(huge)).toEqual({ lo: Number.MAX_VALUE, hi: Infinity });
    expect(intervalFromRational(q.negateRational(huge))).toEqual({ lo: -Infinity, hi: -Number.MAX_VALUE });
    expect(intervalFromRational(rational(1n, 10n ** 400n))).toEqual({ lo: 0, hi: 5e-324 });
    expect(intervalFromRational(rational(-1n, 10n ** 400n))).toEqual({ lo: -5e-324, hi: 0 });
  });
});

describe('nearest rational with a bounded denominator', () => {
  /** The best by trying every denominator. */
  function bruteForce(x: Rational, limit: bigint): Rational {
    let best = rational(0n);
    let error: Rational | null = null;
    for (let d = 1n; d <= limit; d++) {
      const floor = (x.numerator * d) / x.denominator;
      for (const p of [floor - 1n, floor, floor + 1n]) {
        const candidate = rational(p, d);
        const difference = q.subtractRational(candidate, x);
        const distance = q.signRational(difference) < 0 ? q.negateRational(difference) : difference;
        if (error === null || q.compareRational(distance, error) < 0) [best, error] = [candidate, distance];
      }
    }
    return best;
  }

  test('agrees with trying every denominator', () => {
    const small = fc
      .tuple(fc.bigInt({ min: -3000n, max: 3000n }), fc.bigInt({ min: 1n, max: 3000n }))
      .map(([p, d]) => rational(p, d));
    fc.assert(
      fc.property(small, fc.bigInt({ min: 1n, max: 40n }), (x, limit) => {
        const found = nearestRational(x, limit);
        const best = bruteForce(x, limit);
        expect(found.denominator <= limit).toBe(true);
        const [a, b] = [q.subtractRational(found, x), q.subtractRational(best, x)];
        expect(q.compareRational(a, b) === 0 || q.compareRational(a, q.negateRational(b)) === 0).toBe(true);
        expect(found.denominator).toBe(best.denominator);
      }),
      RUNS,
    );
  });

  test('recovers fractions from their doubles', () => {
    expect(printRational(nearestRational(11 / 18, 1000n))).toBe('11/18');
    expect(printRational(nearestRational(-7 / 12, 1000n))).toBe('-7/12');
    expect(printRational(nearestRational(Math.PI, 1000n))).toBe('355/113');
    expect(printRational(nearestRational(0.25, 1n))).toBe('0');
    // A tie goes to the smaller denominator.
    expect(printRational(nearestRational(0.25, 2n))).toBe('0');
    expect(printRational(nearestRational(0.75, 2n))).toBe('1');
    expect(nearestRational(3, 1n)).toEqual(rational(3n));
    expect(() => nearestRational(1, 0n)).toThrow('at least 1');
  });
});

describe('text', () => {
  test('prints and reads back', () => {
    fc.assert(
      fc.property(number, (a) => {
        expect(parseRational(printRational(a))).toEqual(a);
      }),
      RUNS,
    );
    expect(parseRational('-6/4')).toEqual(rational(-3n, 2n));
    expect(printRational(rational(4n, 2n))).toBe('2');
  });

  test.each(['', '1.5', '1/', '/2', '1/-2', '+1', ' 1', '1 ', '0x10', '1e3', '1/2/3', '−1'])('refuses %j', (text) => {
    expect(() => parseRational(text)).toThrow('expected a rational number');
  });

  test('refuses a zero denominator and too many digits, quickly', () => {
    expect(() => parseRational('1/0', '/value')).toThrow(
      expect.objectContaining({ code: 'wrong-schema', pointer: '/value' }),
    );
    const long = '9'.repeat(RATIONAL_DIGITS + 1);
    expect(() => parseRational(long)).toThrow(expect.objectContaining({ code: 'too-large' }));
    expect(() => parseRational(`1/${long}`)).toThrow(expect.objectContaining({ code: 'too-large' }));
    expect(() => parseRational('7'.repeat(10_000_000))).toThrow(expect.objectContaining({ code: 'too-large' }));
    expect(parseRational(long.slice(1)).denominator).toBe(1n);
  });
});
