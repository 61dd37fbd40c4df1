import { expect, test } from 'vitest';
import { suggest } from '../src/suggest.js';

const VERBS = ['inspect', 'constants', 'check', 'witness', 'verify', 'completion'];

test.each([
  ['constnts', 'constants'],
  ['cosntants', 'constants'],
  ['chekc', 'check'],
  ['Inspect', 'inspect'],
  ['verfy', 'verify'],
  ['witnes', 'witness'],
])('suggests for %s', (mistyped, expected) => {
  expect(suggest(mistyped, VERBS)).toBe(expected);
});

test.each(['publish', 'xyz', '', 'zzzzzzzzz'])('suggests nothing for "%s"', (mistyped) => {
  expect(suggest(mistyped, VERBS)).toBeNull();
});

test('a swap of neighbours counts once', () => {
  expect(suggest('eg', ['ge', 'cge', 'be'])).toBe('ge');
});
