import { expect, test } from 'vitest';
import { unitOf, unitsOf, unitsText } from '../../src/render/units.js';
import { end, row, UNBOUNDED } from './support/sheets.js';

const gap = (value: number) => row('gap', end(value, 'a problem'), end(value, 'a problem'));

test('ordinary rates are printed as they are', () => {
  for (const value of [0.01, 0.7, 20, 999_999, 0]) {
    const units = unitsOf([gap(value), row('cbe', UNBOUNDED, UNBOUNDED)]);
    expect(units).toEqual({ rate: 1, time: 1, length: 1 });
    expect(unitsText(units)).toBeNull();
  }
});

test('slow and fast ones in a power of ten, times in its inverse, lengths in the root of that', () => {
  expect(unitsOf([gap(2e-9)])).toEqual({ rate: 1e-8, time: 1e8, length: 1e4 });
  expect(unitsOf([gap(0.005)])).toEqual({ rate: 1e-2, time: 1e2, length: 10 });
  expect(unitsOf([gap(-3e9)])).toEqual({ rate: 1e10, time: 1e-10, length: 1e-5 });
  const units = unitsOf([row('mixing', end(5e8, 'a time'), null), row('diameter', null, end(3e4, 'a length'))]);
  expect(units).toEqual({ rate: 1e-8, time: 1e8, length: 1e4 });
  expect(unitsText(units)).toBe('rates in units of 10^−8, times of 10^8, lengths of 10^4');
  expect((['gap', 'mixing', 'diameter'] as const).map((id) => unitOf({ id }, units))).toEqual([1e-8, 1e8, 1e4]);
});
