import { describe, expect, test } from 'vitest';
import { listNumber, minus, scaleOf, shortNumber } from '../../src/render/number-text.js';

describe('numbers in a list', () => {
  test.each([
    [0.5, 1, '0.500000'],
    [-0.5, 1, '−0.500000'],
    [12.345678912, 20, '12.34568'],
    [0.25, 20, '0.25000'],
    [-1e-13, 1, '0'],
    [3e-9, 1, '3.0e−9'],
    [2e9, 8e9, '2.000000e9'],
    [0, 8e9, '0'],
    [5.5e-5, 5.5e-5, '5.500000e−5'],
  ])('%d among others of size %d', (value, scale, text) => {
    expect(listNumber(value, scale)).toBe(text);
  });

  test('a larger rounding can be asked for', () => {
    expect(listNumber(3e-10, 1, 1e-9)).toBe('0');
  });

  test('the scale is the largest modulus', () => {
    expect(scaleOf([1, -3, 2])).toBe(3);
    expect(scaleOf([])).toBe(0);
  });
});

test.each([
  [0, '0'],
  [0.3502, '0.350'],
  [-1, '−1.00'],
  [1.26e-17, '1.3e−17'],
  [123456, '1.2e5'],
])('a residual of %d', (value, text) => {
  expect(shortNumber(value)).toBe(text);
});

test('true minus signs everywhere', () => {
  expect(minus('-1e-5')).toBe('−1e−5');
});
