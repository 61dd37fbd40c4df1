import { expect, test } from 'vitest';
import {
  readClaim,
  readConstant,
  readConstantList,
  readDuration,
  readName,
  readWholeNumber,
} from '../../src/verbs/option-values.js';

test.each([
  ['90', 90_000],
  ['90s', 90_000],
  ['5m', 300_000],
  ['5min', 300_000],
  ['1.5h', 5_400_000],
  ['0.25', 250],
])('duration %s', (text, milliseconds) => {
  expect(readDuration('--time-limit', text)).toBe(milliseconds);
});

test.each(['', '0', '-1', '5d', 'm', '1e9', 'NaN', '99999999'])('no duration "%s"', (text) => {
  expect(() => readDuration('--time-limit', text)).toThrow(
    `--time-limit: expected a time above 0 such as 90s, 5m or 1h, got "${text}"`,
  );
});

test('whole numbers keep to their range', () => {
  expect(readWholeNumber('--threads', '8', 1, 256)).toBe(8);
  for (const text of ['0', '257', '1.5', '-1', '', '0x10', '9007199254740993']) {
    expect(() => readWholeNumber('--threads', text, 1, 256), text).toThrow(
      `--threads: expected a whole number from 1 to 256, got "${text}"`,
    );
  }
});

test('constants with and without a mean', () => {
  expect(readConstant('--only', 'cge')).toEqual({ id: 'cge', mean: null });
  expect(readConstant('--only', 'ge:left')).toEqual({ id: 'ge', mean: 'left' });
  expect(() => readConstant('--only', 'cge:left')).toThrow('only ge takes an operator mean');
  expect(() => readConstant('--only', 'ge:lefft')).toThrow('did you mean "left"?');
  expect(() => readConstant('--only', 'ge:left:x')).toThrow('expected a constant such as');
});

test('a list keeps its order and drops repetitions', () => {
  expect(readConstantList('--only', 'mlsi, gap,ge:left,gap')).toEqual([
    { id: 'mlsi', mean: null },
    { id: 'gap', mean: null },
    { id: 'ge', mean: 'left' },
  ]);
  expect(() => readConstantList('--only', 'gap,,ge')).toThrow('got ""');
});

test('a mistyped name gets a suggestion, a strange one the list', () => {
  expect(() => readName('constant', 'mlis', ['gap', 'mlsi'])).toThrow(
    'constant: expected one of gap, mlsi, got "mlis"; did you mean "mlsi"?',
  );
  expect(() => readName('constant', 'entropy', ['gap', 'mlsi'])).toThrow(/got "entropy"$/);
});

test.each<[string, string, string | null, number]>([
  ['cge=0.5', 'cge', null, 0.5],
  ['ge:left=11/18', 'ge', 'left', 11 / 18],
  ['gap=-1e-3', 'gap', null, -0.001],
  ['mlsi=.5', 'mlsi', null, 0.5],
  ['gap = 2', 'gap', null, 2],
])('claim %s', (text, id, mean, bound) => {
  expect(readClaim('at-least', text)).toEqual({ constant: { id, mean }, relation: 'at-least', bound });
});

test.each([
  ['cge', 'expected a constant and a value such as cge=0.5, got "cge"'],
  ['=1', 'expected a constant and a value'],
  ['cge=', 'expected a finite number such as 0.5 or 11/18, got ""'],
  ['cge=Infinity', 'expected a finite number'],
  ['cge=1/0', 'expected a finite number'],
  ['cge=1e999', 'expected a finite number'],
  ['cgee=1', 'did you mean "cge"?'],
])('no claim "%s"', (text, message) => {
  expect(() => readClaim('at-most', text)).toThrow(`--at-most: ${message.startsWith('did') ? '' : message}`);
  expect(() => readClaim('at-most', text)).toThrow(message);
});
