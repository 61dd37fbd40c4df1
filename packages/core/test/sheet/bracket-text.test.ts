import { describe, expect, it } from 'vitest';
import fc from 'fast-check';
import type { End } from '../../src/sheet/bracket.js';
import { bracketText } from '../../src/sheet/bracket-text.js';
import { EPSILON } from '../../src/tolerances.js';

function end(value: number, margin?: number): End {
  return { value, grade: 'certified', by: 'given', ...(margin === undefined ? {} : { margin }) };
}

/** The number a text shows, and the unit of its last digit. */
function shown(text: string | null): { value: number; unit: number; digits: number } {
  const plain = (text ?? '').replace('−', '-');
  expect(plain).toMatch(/^-?\d+(\.\d+)?$/);
  const decimals = plain.split('.')[1]?.length ?? 0;
  const digits = plain.replace(/[-.]/g, '').replace(/^0+/, '').length;
  return { value: Number(plain), unit: 10 ** -decimals, digits };
}

/** Where rounding reaches the next power of ten, it is written with one more zero. */
function isPowerOfTen(x: number): boolean {
  return /^10*$/.test(String(Math.abs(x)));
}

/** Rates from tiny to large, of both signs. */
const rate = fc
  .tuple(fc.double({ min: -1, max: 1, noNaN: true }), fc.integer({ min: -9, max: 6 }))
  .map(([x, e]) => x * 10 ** e);
const relativeMargin = fc.oneof(fc.constant(undefined), fc.constant(0), fc.integer({ min: -16, max: -3 }).map((e) => 10 ** e)); // prettier-ignore

describe('an open bracket', () => {
  it('is never shown narrower than it is, save within the margins', () => {
    fc.assert(
      fc.property(rate, rate, relativeMargin, relativeMargin, (x, y, a, b) => {
        const [low, high] = [Math.min(x, y), Math.max(x, y)];
        const [lowMargin, highMargin] = [(a ?? 0) * Math.abs(low), (b ?? 0) * Math.abs(high)];
        const text = bracketText(end(low, a && lowMargin), end(high, b && highMargin), false);
        const [lower, upper] = [shown(text.lower), shown(text.upper)];
        expect(lower.value).toBeLessThanOrEqual(low + 2 * lowMargin + 4 * EPSILON * Math.abs(low));
        expect(upper.value).toBeGreaterThanOrEqual(high - 2 * highMargin - 4 * EPSILON * Math.abs(high));
        expect(lower.value).toBeLessThanOrEqual(upper.value);
      }),
      { numRuns: 2000 },
    );
  });

  it('is shown to within a unit of its last digit, with at most seven significant digits', () => {
    fc.assert(
      fc.property(rate, relativeMargin, (x, a) => {
        const text = bracketText(end(x, a && a * Math.abs(x)), end(x, a && a * Math.abs(x)), false);
        for (const found of [shown(text.lower), shown(text.upper)]) {
          expect(Math.abs(found.value - x)).toBeLessThan(found.unit * (1 + 1e-9));
          expect(found.digits).toBeLessThanOrEqual(isPowerOfTen(found.value) ? 8 : 7);
        }
      }),
      { numRuns: 2000 },
    );
  });

  it('rounds the lower end down and the upper end up', () => {
    expect(bracketText(end(0.12345678), end(0.12345678), false)).toEqual({ lower: '0.123456', upper: '0.123457' });
    expect(bracketText(end(-0.12345678), end(-0.12345678), false)).toEqual({ lower: '−0.123457', upper: '−0.123456' });
    expect(bracketText(end(12.3456789), end(1234.56789), false)).toEqual({ lower: '12.34567', upper: '1234.568' });
  });

  it('shows a decimal that its error cannot tell it from', () => {
    expect(bracketText(end(0.75 - 2e-13, 1e-13), end(2 + 1e-12, 1e-12), false)).toEqual({
      lower: '0.750000',
      upper: '2.000000',
    });
    expect(bracketText(end(0.75 - 3e-13, 1e-13), end(2 + 3e-12, 1e-12), false)).toEqual({
      lower: '0.749999',
      upper: '2.000001',
    });
    expect(bracketText(end(0.1 + 0.2), end(0.1 + 0.2), false)).toEqual({ lower: '0.300000', upper: '0.300000' });
  });
});

describe('a closed bracket', () => {
  it('shows one number, within a unit of its last digit of both ends, with at most ten significant digits', () => {
    fc.assert(
      fc.property(rate, fc.integer({ min: -17, max: -8 }), fc.boolean(), (x, e, swapped) => {
        // The order of a sheet is asserted up to rounding, so the ends may come swapped by a little.
        const width = Math.abs(x) * 10 ** e * (swapped ? -0.1 : 1);
        const text = bracketText(end(x), end(x + width), true);
        expect(text.lower).toBe(text.upper);
        const { value, unit, digits } = shown(text.lower);
        expect(Math.abs(value - x)).toBeLessThanOrEqual(unit * (1 + 1e-9));
        expect(Math.abs(value - (x + width))).toBeLessThanOrEqual(unit * (1 + 1e-9));
        expect(unit).toBeGreaterThanOrEqual(Math.abs(width) / 2);
        expect(digits).toBeLessThanOrEqual(isPowerOfTen(value) ? 11 : 10);
      }),
      { numRuns: 2000 },
    );
  });

  it('drops the digits on which the ends disagree', () => {
    expect(bracketText(end(0.6111111108), end(0.6111111114), true).lower).toBe('0.611111111');
    expect(bracketText(end(1), end(1), true).lower).toBe('1.000000000');
    expect(bracketText(end(-1e-16), end(1e-16), true).lower).toBe('0.000000000');
    expect(bracketText(end(-Infinity), end(-Infinity), true)).toEqual({ lower: '−∞', upper: '−∞' });
  });
});

describe('what is not a number', () => {
  it('is left out where an end is missing, and a sign where it is unbounded', () => {
    expect(bracketText(null, end(1), false)).toEqual({ lower: null, upper: '1.000000' });
    expect(bracketText(end(-Infinity), end(Infinity), false)).toEqual({ lower: '−∞', upper: '∞' });
    expect(bracketText({ value: null }, { value: null }, false)).toEqual({ lower: '−∞', upper: '∞' });
    expect(bracketText(end(-Infinity), end(Infinity), false, { lower: '-inf', upper: 'inf' })).toEqual({
      lower: '-inf',
      upper: 'inf',
    });
  });

  it('has no minus zero', () => {
    expect(bracketText(end(-0), end(-1e-9), false)).toEqual({ lower: '0.000000', upper: '0.000000' });
  });
});
