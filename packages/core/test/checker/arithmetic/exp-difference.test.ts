import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { expDifference } from '../../../src/checker/arithmetic/exp-difference.js';
import { phi2 } from '../../../src/checker/arithmetic/interval-exp.js';
import { type Interval, isSubset, point } from '../../../src/checker/arithmetic/interval.js';
import { logarithmicMean } from '../../../src/checker/arithmetic/interval-log-mean.js';
import { rationalFromDouble } from '../../../src/checker/arithmetic/rational.js';
import { log } from '../../../src/checker/arithmetic/interval-log.js';

const BITS = 400n;
const ONE = 1n << BITS;

/** x·2^BITS for an x that is a multiple of 2^-40. */
function fixed(x: number): bigint {
  return BigInt(x * 2 ** 40) << (BITS - 40n);
}

/** exp[x_0,…,x_k] in fixed point, by the power series about zero: Σ h_j(x)/(j+k)!, good to far more than a double. */
function reference(x: readonly number[]): bigint {
  const terms = 300;
  const h = new Array<bigint>(terms).fill(0n);
  h[0] = ONE;
  for (const y of x.map(fixed)) {
    for (let j = 1; j < terms; j++) h[j] += (y * h[j - 1]) >> BITS;
  }
  let factorial = 1n;
  for (let i = 2n; i < BigInt(x.length); i++) factorial *= i;
  let sum = 0n;
  for (let j = 0; j < terms; j++) {
    sum += h[j] / factorial;
    factorial *= BigInt(j + x.length);
  }
  return sum;
}

function expectAround({ lo, hi }: Interval, value: bigint): void {
  const slack = 1n << 60n; // the reference's own error, below 2^-340
  const low = rationalFromDouble(lo);
  const high = rationalFromDouble(hi);
  expect(low.numerator * ONE <= (value + slack) * low.denominator, `${lo} is above the value`).toBe(true);
  expect(high.numerator * ONE >= (value - slack) * high.denominator, `${hi} is below the value`).toBe(true);
}

const grid = (range: number): fc.Arbitrary<number> =>
  fc.integer({ min: -range * 2 ** 20, max: range * 2 ** 20 }).map((n) => n / 2 ** 20);

describe('divided differences of exp', () => {
  it.each([1, 2, 8, 30])('contain the power series in 400 bits, arguments up to %i', (range) => {
    fc.assert(
      fc.property(fc.array(grid(range), { minLength: 1, maxLength: 5 }), (x) => {
        const enclosure = expDifference(x.map(point));
        expectAround(enclosure, reference(x));
        expect(enclosure.hi - enclosure.lo).toBeLessThanOrEqual(1e-10 * enclosure.hi);
      }),
      { numRuns: 200 },
    );
  });

  it('contain it where arguments repeat or nearly do', () => {
    fc.assert(
      fc.property(grid(20), fc.array(fc.integer({ min: 0, max: 3 }), { minLength: 2, maxLength: 5 }), (x, steps) => {
        const args = steps.map((n) => x + n * 2 ** -30);
        expectAround(expDifference(args.map(point)), reference(args));
      }),
      { numRuns: 200 },
    );
  });

  it('of intervals contain those of points in them', () => {
    fc.assert(
      fc.property(
        fc.array(fc.tuple(grid(40), grid(40), fc.double({ min: 0, max: 1, noNaN: true })), {
          minLength: 1,
          maxLength: 4,
        }),
        (parts) => {
          const boxes = parts.map(([x, y]) => ({ lo: Math.min(x, y), hi: Math.max(x, y) }));
          const inside = parts.map(([x, y, t]) => Math.min(Math.max(x, y), Math.min(x, y) + t * Math.abs(x - y)));
          expect(isSubset(expDifference(inside.map(point)), widened(expDifference(boxes)))).toBe(true);
        },
      ),
    );
  });

  it('agree with φ₂ and the logarithmic mean', () => {
    for (const z of [-700, -30, -1, -1e-9, 0, 1e-5, 0.7, 12, 600]) {
      expect(overlap(expDifference([point(0), point(0), point(z)]), phi2(point(z)))).toBe(true);
    }
    for (const [x, y] of [
      [1, 1],
      [1, 2],
      [1e-200, 3],
      [5, 5.0000001],
    ]) {
      const mean = expDifference([log(point(x)), log(point(y))]);
      expect(overlap(mean, logarithmicMean(point(x), point(y)))).toBe(true);
    }
  });

  it('have the limits of infinite arguments', () => {
    expect(expDifference([point(0), { lo: -Infinity, hi: -1 }]).lo).toBe(0);
    expect(expDifference([point(0), { lo: 1, hi: Infinity }]).hi).toBe(Infinity);
  });
});

/** A unit of the last place wider, for ends of points are not always monotone in their last bit. */
function widened({ lo, hi }: Interval): Interval {
  return { lo: lo * (1 - 1e-10), hi: hi * (1 + 1e-10) };
}

function overlap(x: Interval, y: Interval): boolean {
  return x.lo <= y.hi && y.lo <= x.hi;
}
