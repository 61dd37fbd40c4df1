import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import * as r from '../../../src/checker/arithmetic/rounding.js';
import { type BigFloat, big, bigSqrt, compare, minus, over, plus, times } from './big-float.js';
import { neighbour } from './enclosure-checks.js';

const finite = fc.double({ noNaN: true, noDefaultInfinity: true });
const SEED = { seed: 20100815, numRuns: 1500 };
const EXTREMES = [0, 5e-324, -5e-324, 2.2250738585072014e-308, 1, -1, 1 + 2 ** -52, 1 - 2 ** -53, 3, 1e-300, 1e300];
const PAIRS = [...EXTREMES, -1e300, Number.MAX_VALUE, -Number.MAX_VALUE, 134217729, 1 / 3, 2 ** -537, 1e-162].flatMap(
  (a, _, all) => all.map((b) => [a, b] as const),
);

/** Lower and upper bounds lie on their sides of the exact value and are at most one double (two near underflow) from it. */
function expectBracket(low: number, high: number, exact: BigFloat, what: string): void {
  if (low !== -Infinity) expect(compare(big(low), exact), `${what} low ${low}`).toBeLessThanOrEqual(0);
  if (high !== Infinity) expect(compare(exact, big(high)), `${what} high ${high}`).toBeLessThanOrEqual(0);
  expect(r.nextUp(r.nextUp(r.nextUp(low))), `${what}: ${low} and ${high} are neighbours`).toBeGreaterThanOrEqual(high);
}

describe('neighbouring doubles', () => {
  test('nextUp and nextDown are the neighbours', () => {
    for (const x of [1, 2, 1.5, 0.1, 1e300, 1e-300, 2 ** 52, 1e-310, 1.9999999999999998, Math.PI]) {
      expect(r.nextUp(x)).toBe(neighbour(x, 1));
      expect(r.nextDown(x)).toBe(neighbour(x, -1));
      expect(r.nextUp(-x)).toBe(-neighbour(x, -1));
    }
    // Near the smallest normal number the second neighbour is allowed.
    expect(r.nextUp(2 ** -1022)).toBeLessThanOrEqual(neighbour(2 ** -1022, 2));
    expect(r.nextUp(0)).toBe(5e-324);
    expect(r.nextDown(0)).toBe(-5e-324);
    expect(r.nextUp(Number.MAX_VALUE)).toBe(Infinity);
    expect(r.nextDown(Infinity)).toBe(Number.MAX_VALUE);
    expect(r.nextDown(NaN)).toBe(-Infinity);
    expect(r.nextUp(NaN)).toBe(Infinity);
  });

  test('every finite double lies strictly between the two', () => {
    fc.assert(
      fc.property(finite, (x) => r.nextDown(x) < x && x < r.nextUp(x)),
      SEED,
    );
  });
});

describe('directed operations against exact rationals', () => {
  const check = (a: number, b: number) => {
    expectBracket(r.addDown(a, b), r.addUp(a, b), plus(big(a), big(b)), `${a}+${b}`);
    expectBracket(r.subDown(a, b), r.subUp(a, b), minus(big(a), big(b)), `${a}-${b}`);
    expectBracket(r.mulDown(a, b), r.mulUp(a, b), times(big(a), big(b)), `${a}*${b}`);
    if (b !== 0) expectBracket(r.divDown(a, b), r.divUp(a, b), over(big(a), big(b)), `${a}/${b}`);
    const x = Math.abs(a);
    expectBracket(r.sqrtDown(x), r.sqrtUp(x), bigSqrt(big(x)), `sqrt ${x}`);
  };

  test('extreme pairs', () => {
    for (const [a, b] of PAIRS) check(a, b);
  });

  test('random pairs, all exponents', () => {
    fc.assert(fc.property(finite, finite, check), SEED);
  });

  test('random pairs of ordinary size', () => {
    const ordinary = fc.double({ min: -100, max: 100, noNaN: true });
    fc.assert(fc.property(ordinary, ordinary, check), SEED);
  });

  test('results that are doubles come out exactly', () => {
    expect([r.addDown(0.5, 0.25), r.addUp(0.5, 0.25)]).toEqual([0.75, 0.75]);
    expect([r.mulDown(3, 7), r.mulUp(3, 7)]).toEqual([21, 21]);
    expect([r.divDown(21, 7), r.divUp(21, 7)]).toEqual([3, 3]);
    expect([r.sqrtDown(49), r.sqrtUp(49)]).toEqual([7, 7]);
    expect(r.divUp(1, 3)).toBe(neighbour(r.divDown(1, 3), 1));
    expect(r.mulDown(0, Infinity)).toBe(0);
  });

  test('products of positive numbers never get a negative bound', () => {
    expect(r.mulDown(1e-200, 1e-200)).toBe(0);
    expect(r.mulUp(1e-200, 1e-200)).toBe(5e-324);
    expect(r.divDown(1e-200, 1e200)).toBe(0);
    expect(r.mulUp(-1e-200, 1e-200)).toBe(0);
  });
});
