import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import * as iv from '../../../src/checker/arithmetic/interval.js';
import { type Interval } from '../../../src/checker/arithmetic/interval.js';
import { big, bigSqrt, minus, over, plus, times } from './big-float.js';
import { expectEnclosed } from './enclosure-checks.js';

const RUNS = { seed: 1966, numRuns: 1000 };
const value = fc.oneof(
  fc.double({ min: -10, max: 10, noNaN: true }),
  fc.integer({ min: -3, max: 3 }),
  fc.double({ min: -1e150, max: 1e150, noNaN: true }),
);
const boxed = fc
  .tuple(value, value, fc.double({ min: 0, max: 1, noNaN: true }), fc.double({ min: 0, max: 1, noNaN: true }))
  .map(([a, b, s, t]) => {
    const box = iv.interval(Math.min(a, b), Math.max(a, b));
    // A point and a smaller interval inside the box.
    const inside = (u: number) => Math.min(box.hi, Math.max(box.lo, box.lo + u * (box.hi - box.lo)));
    return { box, member: inside(s), part: iv.interval(inside(Math.min(s, t)), inside(Math.max(s, t))) };
  });

const BINARY = { add: [iv.add, plus], sub: [iv.sub, minus], mul: [iv.mul, times], div: [iv.div, over] } as const;

describe('intervals', () => {
  test.each(Object.keys(BINARY) as (keyof typeof BINARY)[])(
    '%s contains every result and respects inclusion',
    (name) => {
      const [operation, exact] = BINARY[name];
      fc.assert(
        fc.property(boxed, boxed, (x, y) => {
          const whole = operation(x.box, y.box);
          if (name !== 'div' || y.member !== 0) {
            expectEnclosed(whole, exact(big(x.member), big(y.member)), `${x.member} ${name} ${y.member}`);
          }
          // Nothing is known of a quotient by zero itself.
          const byZero = name === 'div' && iv.magnitude(y.part) === 0;
          if (!byZero) expect(iv.isSubset(operation(x.part, y.part), whole)).toBe(true);
          expect(iv.magnitude(y.box) === 0 || iv.isSubset(whole, operation(iv.hull(x.box, y.part), y.box))).toBe(true);
        }),
        RUNS,
      );
    },
  );

  test('sqr, sqrt, abs and neg contain every result and respect inclusion', () => {
    fc.assert(
      fc.property(boxed, (x) => {
        const m = big(x.member);
        expectEnclosed(iv.sqr(x.box), times(m, m), 'sqr');
        expectEnclosed(iv.abs(x.box), big(Math.abs(x.member)), 'abs');
        expectEnclosed(iv.neg(x.box), big(-x.member), 'neg');
        if (x.member >= 0) expectEnclosed(iv.sqrt(x.box), bigSqrt(m), 'sqrt');
        for (const f of [iv.sqr, iv.abs, iv.neg]) expect(iv.isSubset(f(x.part), f(x.box))).toBe(true);
        expect(iv.sqr(x.box).lo).toBeGreaterThanOrEqual(0);
      }),
      RUNS,
    );
  });

  test('integers stay integers', () => {
    const x: Interval = { lo: -2, hi: 3 };
    expect(iv.mul(x, { lo: -5, hi: 4 })).toEqual({ lo: -15, hi: 12 });
    expect(iv.sqr(x)).toEqual({ lo: 0, hi: 9 });
    expect(iv.sub(x, x)).toEqual({ lo: -5, hi: 5 });
    expect(iv.div(iv.point(6), { lo: 2, hi: 3 })).toEqual({ lo: 2, hi: 3 });
  });

  test('division by an interval that holds zero gives a half-line or everything', () => {
    expect(iv.div({ lo: 1, hi: 2 }, { lo: 0, hi: 4 })).toEqual({ lo: 0.25, hi: Infinity });
    expect(iv.div({ lo: 1, hi: 2 }, { lo: -4, hi: 0 })).toEqual({ lo: -Infinity, hi: -0.25 });
    expect(iv.div({ lo: -2, hi: -1 }, { lo: 0, hi: 4 })).toEqual({ lo: -Infinity, hi: -0.25 });
    expect(iv.div({ lo: 1, hi: 2 }, { lo: -1, hi: 1 })).toEqual(iv.ENTIRE);
    expect(iv.div(iv.ONE, iv.ZERO)).toEqual(iv.ENTIRE);
  });

  test('unbounded intervals', () => {
    const half = { lo: 1, hi: Infinity };
    expect(iv.div(iv.ONE, half)).toEqual({ lo: 0, hi: 1 });
    expect(iv.mul(iv.ZERO, iv.ENTIRE)).toEqual({ lo: 0, hi: 0 });
    expect(iv.sub(half, half)).toEqual(iv.ENTIRE);
    expect(iv.add(iv.point(Number.MAX_VALUE), iv.point(Number.MAX_VALUE))).toEqual({
      lo: Number.MAX_VALUE,
      hi: Infinity,
    });
  });

  test('set operations', () => {
    const x = { lo: 0, hi: 2 };
    expect(iv.hull(x, iv.point(5))).toEqual({ lo: 0, hi: 5 });
    expect(iv.intersection(x, { lo: 1, hi: 5 })).toEqual({ lo: 1, hi: 2 });
    expect(iv.intersection(x, { lo: 3, hi: 5 })).toBeNull();
    expect(iv.contains(x, 2)).toBe(true);
    expect(iv.contains(x, 2.0000000000000004)).toBe(false);
    expect([iv.width(x), iv.magnitude({ lo: -3, hi: 2 }), iv.mignitude({ lo: -3, hi: 2 })]).toEqual([2, 3, 0]);
    expect(iv.mignitude({ lo: -3, hi: -2 })).toBe(2);
  });

  test('bad ends are refused', () => {
    expect(() => iv.interval(1, 0)).toThrow('expected interval ends');
    expect(() => iv.interval(NaN, 0)).toThrow('expected interval ends');
    expect(() => iv.point(Infinity)).toThrow('finite');
    expect(() => iv.sqrt({ lo: -2, hi: -1 })).toThrow('meets [0');
    expect(iv.sqrt({ lo: -1, hi: 4 })).toEqual({ lo: 0, hi: 2 });
  });
});
