import { expect, test } from 'vitest';
import { remainingTime } from '../../src/sweep/remaining-time.js';

test.each([
  [0, 10, 5000, ''],
  [10, 0, 5000, ''],
  [5, 5, 5000, 'about 5 s left'],
  [1, 99, 2000, 'about 4 min left'],
  [1, 9999, 2000, 'about 6 h left'],
])('%d done, %d left, %d ms: %s', (done, left, milliseconds, text) => {
  expect(remainingTime(done, left, milliseconds)).toBe(text);
});
