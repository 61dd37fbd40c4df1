import { describe, expect, test } from 'vitest';
import { exp, expm1, phi2 } from '../../../src/checker/arithmetic/interval-exp.js';
import { LN2_HIGH, LN2_LOW, log, log1p, logRatio } from '../../../src/checker/arithmetic/interval-log.js';
import { type Interval, add, isSubset, point } from '../../../src/checker/arithmetic/interval.js';
import { seededRandom } from '../../../src/random.js';
import { type BigFloat, big, bigExp, bigLog, minus, over, plus, times } from './big-float.js';
import { expectEnclosed, neighbour, positiveSamples, relativeWidth } from './enclosure-checks.js';

const random = seededRandom('elementary functions');
const ONE = big(1);

const bigExpm1 = (x: BigFloat) => minus(bigExp(x), ONE);
const bigPhi2 = (x: BigFloat) => over(minus(bigExpm1(x), x), times(x, x));

/** Arguments near zero, ordinary and large, of both signs. */
function realSamples(count: number, top: number): number[] {
  return Array.from({ length: count }, () => {
    const x = Math.exp(Math.log(top) - 40 * random.uniform() ** 2);
    return random.integer(2) === 0 ? x : -x;
  });
}

/** Containment at every sample; returns the largest relative width. */
function worstWidth(
  samples: readonly number[],
  f: (x: Interval) => Interval,
  exact: (x: BigFloat) => BigFloat,
): number {
  let worst = 0;
  for (const x of samples) {
    const y = f(point(x));
    const reference = exact(big(x));
    expectEnclosed(y, reference, `f(${x})`);
    worst = Math.max(worst, relativeWidth(y, reference));
  }
  return worst;
}

describe('logarithm', () => {
  test('the two parts of log 2 enclose it', () => {
    const sum = plus(big(LN2_HIGH), big(LN2_LOW.lo));
    expectEnclosed(LN2_LOW, minus(bigLog(big(2)), big(LN2_HIGH)), 'low part');
    expect(relativeWidth(LN2_LOW, sum)).toBeLessThan(1e-25);
  });

  test('encloses to a few units in the last place', () => {
    const samples = [
      ...positiveSamples(random, 400),
      5e-324,
      1e-310,
      Number.MAX_VALUE,
      2,
      0.5,
      Math.SQRT2,
      Math.SQRT1_2,
    ];
    const close = [1, 2, 3, 1000, 2 ** 40].flatMap((k) => [neighbour(1, k), neighbour(1, -k)]);
    expect(worstWidth([...samples, ...close], log, bigLog)).toBeLessThan(1.5e-15);
    expect(log(point(1))).toEqual({ lo: 0, hi: 0 });
  });

  test('of a ratio is as tight for neighbours and across the whole range', () => {
    const pairs: [number, number][] = [
      [1e300, 1e-300],
      [5e-324, Number.MAX_VALUE],
      [neighbour(1, -1), 1],
      [neighbour(2, -1), 2],
      [1e-310, neighbour(1e-310, 1)],
      [1.9999999, 2.0000001],
    ];
    for (const x of positiveSamples(random, 200)) pairs.push([x, neighbour(x, 1 + random.integer(9))], [x, 1 / x]);
    for (const [x, y] of pairs) {
      const reference = bigLog(over(big(x), big(y)));
      const found = logRatio(x, y);
      expectEnclosed(found, reference, `log(${x}/${y})`);
      if (x !== y) expect(relativeWidth(found, reference), `${x}/${y}`).toBeLessThan(1.5e-15);
    }
  });

  test('log1p keeps its digits near zero', () => {
    const samples = [
      ...realSamples(300, 1e5).filter((x) => x > -1),
      -0.25,
      0.35,
      -0.999999,
      neighbour(0.35, -1),
      5e-324,
    ];
    const width = worstWidth(
      samples.filter((x) => Math.abs(x) > 1e-100),
      log1p,
      (x) => bigLog(plus(ONE, x)),
    );
    expect(width).toBeLessThan(2e-15);
    expect(log1p(point(5e-324)).lo).toBeGreaterThanOrEqual(0);
    expect(() => log1p(point(-1))).toThrow('meets (−1');
  });

  test('domain', () => {
    expect(log({ lo: 0, hi: 1 })).toEqual({ lo: -Infinity, hi: 0 });
    expect(log({ lo: 1, hi: Infinity })).toEqual({ lo: 0, hi: Infinity });
    expect(() => log({ lo: -1, hi: 0 })).toThrow('meets (0');
  });
});

describe('exponential', () => {
  test('encloses to a few units in the last place', () => {
    expect(worstWidth([...realSamples(500, 700), 1, -1, 709.7, -700, 0.34657, 0.34658], exp, bigExp)).toBeLessThan(
      1e-15,
    );
    expect(exp(point(0))).toEqual({ lo: 1, hi: 1 });
  });

  test('over- and underflow are enclosed', () => {
    for (const x of [709.78, 709.79, 710, 711, 5000, -708, -720, -745, -745.2, -746, -747, -5000]) {
      expectEnclosed(exp(point(x)), bigExp(big(x)), `e^${x}`);
    }
    expect(exp(point(-747)).lo).toBe(0);
    expect(exp(point(800)).hi).toBe(Infinity);
    expect(exp({ lo: -Infinity, hi: Infinity })).toEqual({ lo: 0, hi: Infinity });
  });

  test('expm1 and φ₂ keep their digits near zero and for large arguments', () => {
    const samples = [...realSamples(400, 690), 0.5, -0.5, neighbour(0.5, 1), -neighbour(0.5, 1)];
    expect(worstWidth(samples, expm1, bigExpm1)).toBeLessThan(1.6e-15);
    expect(worstWidth(samples, phi2, bigPhi2)).toBeLessThan(3e-15);
    expectEnclosed(phi2(point(0)), big(0.5), 'φ₂(0)');
    expectEnclosed(phi2(point(-1e300)), minus(over(ONE, big(1e300)), big(0)), 'φ₂(−1e300)');
  });
});

test('wide arguments contain the images of their parts', () => {
  for (const f of [exp, expm1, phi2, log1p]) {
    for (let k = 0; k < 200; k++) {
      const lo = 8 * random.uniform() - 0.9;
      const wide = { lo, hi: lo + 3 * random.uniform() };
      const inner = lo + random.uniform() * (wide.hi - wide.lo);
      const y = f(wide);
      const slack = 4e-15 * (Math.abs(y.lo) + Math.abs(y.hi));
      expect(isSubset(f(point(Math.min(inner, wide.hi))), add(y, { lo: -slack, hi: slack }))).toBe(true);
    }
  }
});
