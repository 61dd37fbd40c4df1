import { expect } from 'vitest';

/** Fails with actual, expected, delta and tolerance unless |actual − expected| ≤ tolerance. */
export function expectClose(actual: number, expected: number, tolerance: number, what = 'value'): void {
  const delta = Math.abs(actual - expected);
  const report = `${what}: actual ${actual}, expected ${expected}, delta ${delta}, tolerance ${tolerance}`;
  expect(delta <= tolerance, report).toBe(true);
}

/** `expectClose` entry by entry. */
export function expectAllClose(
  actual: ArrayLike<number>,
  expected: ArrayLike<number>,
  tolerance: number,
  what = 'entry',
): void {
  expect(actual.length, `${what}: number of entries`).toBe(expected.length);
  Array.from(actual).forEach((x, k) => expectClose(x, expected[k] ?? NaN, tolerance, `${what} ${k}`));
}

/** Fails with the figure unless 0 ≤ actual < bound; NaN fails. */
export function expectBelow(actual: number, bound: number, what: string): void {
  expect(actual >= 0 && actual < bound, `${what}: actual ${actual}, expected below ${bound}`).toBe(true);
}
