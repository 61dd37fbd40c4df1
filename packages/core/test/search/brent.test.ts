import { describe, expect, it } from 'vitest';
import { minimiseScalar } from '../../src/search/brent.js';

describe('minimiseScalar', () => {
  it('finds smooth minima to the square root of rounding in few evaluations', () => {
    const result = minimiseScalar((x) => Math.cosh(x - 0.3), -5, 5, 1e-8);
    expect(Math.abs(result.x - 0.3)).toBeLessThan(1e-7);
    expect(Math.abs(result.value - 1)).toBeLessThan(1e-14);
    expect(result.evaluations).toBeLessThan(30);
  });

  it('finds kinks and badly scaled minima', () => {
    expect(Math.abs(minimiseScalar((x) => Math.abs(x - Math.SQRT1_2), 0, 1, 1e-12).x - Math.SQRT1_2)).toBeLessThan(
      1e-11,
    );
    expect(Math.abs(minimiseScalar((x) => 1e12 * (x - 2) ** 4, -1e3, 1e3, 1e-9).x - 2)).toBeLessThan(1e-3);
  });

  it('approaches an end point where the function is monotone', () => {
    const result = minimiseScalar((x) => x, 2, 3, 1e-10);
    expect(result.x).toBeGreaterThan(2);
    expect(result.x - 2).toBeLessThan(1e-9);
  });

  it('treats NaN and +∞ as worse than any value', () => {
    const result = minimiseScalar((x) => (x < 1 ? NaN : (x - 1.5) ** 2), 0, 4, 1e-9);
    expect(Math.abs(result.x - 1.5)).toBeLessThan(1e-7);
  });

  it('accepts a single point and refuses a reversed interval', () => {
    expect(minimiseScalar((x) => x * x, 2, 2, 1e-9)).toMatchObject({ x: 2, value: 4 });
    expect(() => minimiseScalar((x) => x, 1, 0, 1e-9)).toThrowError(/lower ≤ upper/);
  });
});
