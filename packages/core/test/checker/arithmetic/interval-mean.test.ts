import { describe, expect, test } from 'vitest';
import {
  logarithmicMean,
  logarithmicMeanDifference,
  logarithmicMeanSlope,
} from '../../../src/checker/arithmetic/interval-log-mean.js';
import { enclosedMean, type EnclosedMeanName } from '../../../src/checker/arithmetic/interval-mean.js';
import { type Interval, isSubset, point } from '../../../src/checker/arithmetic/interval.js';
import { operatorMean } from '../../../src/metric/operator-mean.js';
import { seededRandom } from '../../../src/random.js';
import { type BigFloat, big, bigLog, bigSqrt, compare, minus, over, plus, times } from './big-float.js';
import { expectEnclosed, neighbour, positiveSamples, relativeWidth } from './enclosure-checks.js';

/** Promised relative width for arguments that are doubles away from the subnormal range. */
const TIGHTNESS = 8e-15;

const random = seededRandom('means');

function bigMean(x: BigFloat, y: BigFloat): BigFloat {
  return compare(x, y) === 0 ? x : over(minus(x, y), bigLog(over(x, y)));
}

/** ∂Λ/∂x = (r − 1 + y/x)/r², r = log(x/y); 1/2 where they meet. */
function bigSlope(x: BigFloat, y: BigFloat): BigFloat {
  if (compare(x, y) === 0) return big(0.5);
  const r = bigLog(over(x, y));
  return over(plus(minus(r, big(1)), over(y, x)), times(r, r));
}

function bigDifference(x1: BigFloat, x2: BigFloat, y: BigFloat): BigFloat {
  if (compare(x1, x2) === 0) return bigSlope(x1, y);
  return over(minus(bigMean(x1, y), bigMean(x2, y)), minus(x1, x2));
}

/** Triples: independent, with one or two pairs of neighbours, nearly equal, at the two ends of the range of doubles. */
function triples(count: number): [number, number, number][] {
  const base = positiveSamples(random, 3 * count);
  const out: [number, number, number][] = [
    [1e300, 1e-300, 1],
    [1e-300, 1e-299, 1e300],
    [1e300, 1e299, 1e-300],
    [1, 1, 1],
    [1e-290, 1e-290, 1e-290],
    [1, neighbour(1, 1), neighbour(1, 1)],
    [1, neighbour(1, 1), neighbour(1, -1)],
    [2, neighbour(2, -1), neighbour(2, 1)],
    [Math.E, 1, 1],
    [neighbour(Math.E, 1), 1, 1.5],
  ];
  for (let k = 0; k < count; k++) {
    const [x, y, z] = base.slice(3 * k, 3 * k + 3);
    const near = neighbour(x, 1 + random.integer(4));
    const close = x * (1 + 0.6 * (random.uniform() - 0.5));
    out.push(
      [x, y, z],
      [x, near, y],
      [x, y, near],
      [x, close, y],
      [x, near, close],
      [x, x, y],
      [x, y, y],
      [x, near, x],
    );
    out.push([x, close, x * (1 + 0.9 * random.uniform())]);
  }
  return out;
}

const SAMPLES = triples(60);

describe('logarithmic mean', () => {
  test('value: contained and tight', () => {
    for (const [x, y] of SAMPLES) {
      const reference = bigMean(big(x), big(y));
      const found = logarithmicMean(point(x), point(y));
      expectEnclosed(found, reference, `Λ(${x},${y})`);
      expect(relativeWidth(found, reference), `Λ(${x},${y})`).toBeLessThan(TIGHTNESS);
    }
  });

  test('slope: contained and tight', () => {
    for (const [x, y] of SAMPLES) {
      const reference = bigSlope(big(x), big(y));
      const found = logarithmicMeanSlope(point(x), point(y));
      expectEnclosed(found, reference, `∂Λ(${x},${y})`);
      if (found.hi < Infinity) expect(relativeWidth(found, reference), `∂Λ(${x},${y})`).toBeLessThan(TIGHTNESS);
    }
  });

  test('divided difference: contained and tight, however the arguments meet', () => {
    for (const [x1, x2, y] of SAMPLES) {
      const reference = bigDifference(big(x1), big(x2), big(y));
      const found = logarithmicMeanDifference(point(x1), point(x2), point(y));
      const what = `(Λ(${x1},${y})−Λ(${x2},${y}))/(x1−x2)`;
      expectEnclosed(found, reference, what);
      if (found.hi < Infinity) expect(relativeWidth(found, reference), what).toBeLessThan(TIGHTNESS);
    }
  });

  test('subnormal arguments stay enclosed', () => {
    const tiny = [5e-324, 1e-323, 1e-310, neighbour(1e-310, 1), 2.2250738585072014e-308];
    for (const x of tiny) {
      for (const y of [...tiny, 1, 1e300, Number.MAX_VALUE]) {
        expectEnclosed(logarithmicMean(point(x), point(y)), bigMean(big(x), big(y)), `Λ(${x},${y})`);
        for (const z of tiny) {
          const found = logarithmicMeanDifference(point(x), point(y), point(z));
          expectEnclosed(found, bigDifference(big(x), big(y), big(z)), `difference ${x} ${y} ${z}`);
        }
      }
    }
  });

  test('limits at zero and infinity', () => {
    const zero = point(0);
    const half = { lo: 0, hi: Infinity };
    expect(logarithmicMean(zero, point(1))).toEqual({ lo: 0, hi: 0 });
    expect(logarithmicMean(half, point(1))).toEqual(half);
    expect(logarithmicMeanDifference(zero, zero, point(1)).hi).toBe(Infinity);
    expect(logarithmicMeanDifference(point(1), point(2), zero)).toEqual({ lo: 0, hi: 0 });
    // Λ(0,y) = 0: the difference quotient from zero is Λ(x,y)/x.
    expectEnclosed(
      logarithmicMeanDifference(zero, point(2), point(3)),
      over(bigMean(big(2), big(3)), big(2)),
      'from 0',
    );
    expect(logarithmicMeanDifference(half, point(1), point(1)).lo).toBe(0);
  });
});

const NAMES: EnclosedMeanName[] = ['logarithmic', 'arithmetic', 'geometric', 'harmonic', 'left', 'right'];

const EXACT: Record<EnclosedMeanName, (x: BigFloat, y: BigFloat) => BigFloat> = {
  logarithmic: bigMean,
  arithmetic: (x, y) => over(plus(x, y), big(2)),
  geometric: (x, y) => bigSqrt(times(x, y)),
  harmonic: (x, y) => over(times(big(2), times(x, y)), plus(x, y)),
  left: (x) => x,
  right: (_x, y) => y,
};

describe.each(NAMES)('%s mean', (name) => {
  const mean = enclosedMean(name);
  const exact = EXACT[name];

  test('value and differences are contained and tight', () => {
    for (const [x, z, y] of SAMPLES) {
      const value = exact(big(x), big(y));
      const found = mean.value(point(x), point(y));
      expectEnclosed(found, value, `F(${x},${y})`);
      expect(relativeWidth(found, value)).toBeLessThan(TIGHTNESS);
      // The reference is a difference: it must not cancel below its own precision.
      if (x === z || Math.abs(x - z) < 1e-60 * y) continue;
      const gap = minus(big(x), big(z));
      const first = over(minus(exact(big(x), big(y)), exact(big(z), big(y))), gap);
      const second = over(minus(exact(big(y), big(x)), exact(big(y), big(z))), gap);
      const foundFirst = mean.firstDifference(point(x), point(z), point(y));
      const foundSecond = mean.secondDifference(point(y), point(x), point(z));
      expectEnclosed(foundFirst, first, `first difference ${x} ${z} ${y}`);
      expectEnclosed(foundSecond, second, `second difference ${x} ${z} ${y}`);
      if (foundFirst.lo > 1e-290 && foundFirst.hi < Infinity) {
        expect(relativeWidth(foundFirst, first), `${x} ${z} ${y}`).toBeLessThan(TIGHTNESS);
      }
    }
  });

  test('wide intervals: hull of the corners, no wider', () => {
    for (let k = 0; k < 200; k++) {
      const box = (): Interval => {
        const lo = Math.exp(6 * random.uniform() - 3);
        return { lo, hi: lo * (1 + 2 * random.uniform()) };
      };
      const inside = (x: Interval) => x.lo + (x.hi - x.lo) * random.uniform();
      const [x1, x2, y] = [box(), box(), box()];
      const [a, b, c] = [inside(x1), inside(x2), inside(y)];
      const plain = operatorMean(name);
      const pairs: [Interval, number, Interval][] = [
        [mean.value(x1, y), plain.value(a, c), mean.value(point(a), point(c))],
        [
          mean.firstDifference(x1, x2, y),
          plain.firstDifference(a, b, c),
          mean.firstDifference(point(a), point(b), point(c)),
        ],
        [
          mean.secondDifference(y, x1, x2),
          plain.secondDifference(c, a, b),
          mean.secondDifference(point(c), point(a), point(b)),
        ],
      ];
      for (const [wide, value, tight] of pairs) {
        expect(isSubset(tight, wide)).toBe(true);
        expect(Math.abs(value - tight.lo)).toBeLessThanOrEqual(1e-13 * Math.abs(value));
      }
      // Monotone in every argument: the ends are attained at corners.
      const corner = mean.value(point(x1.hi), point(y.hi));
      expect(mean.value(x1, y).hi).toBeLessThanOrEqual(corner.hi * (1 + 1e-15));
      const steep = mean.firstDifference(point(x1.lo), point(x2.lo), point(y.hi));
      expect(mean.firstDifference(x1, x2, y).hi).toBeLessThanOrEqual(steep.hi * (1 + 1e-15));
    }
  });
});
