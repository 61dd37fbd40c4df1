import type { Parameter } from '@thalweg/format';
import { expect, test } from 'vitest';
import { expandRange } from '../../src/sweep/expand-range.js';

const n: Parameter = { name: 'n', type: 'integer', range: [-5, 200_000], default: 2, meaning: 'points' };
const g: Parameter = { name: 'g', type: 'number', range: [-2, 10], default: 1, meaning: 'rate' };
const kind: Parameter = { name: 'kind', type: 'choice', choices: ['a', 'b:c', 'd'], default: 'a', meaning: 'kind' };
const loops: Parameter = { name: 'loops', type: 'boolean', default: false, meaning: 'loops' };

test.each<[Parameter, string, unknown[]]>([
  [n, '2:6', [2, 3, 4, 5, 6]],
  [n, '2:7:2', [2, 4, 6]],
  [n, '6:2:-2', [6, 4, 2]],
  [n, '-1:1', [-1, 0, 1]],
  [n, '3', [3]],
  [n, '2:4,8,3', [2, 3, 4, 8]],
  [g, '0.1:0.5:0.1', [0.1, 0.2, 0.3, 0.4, 0.5]],
  [g, '-0.5:0.5:0.25', [-0.5, -0.25, 0, 0.25, 0.5]],
  [g, '1:2:0.3', [1, 1.3, 1.6, 1.9]],
  [g, '1e-3,2', [0.001, 2]],
  [loops, 'true,false', [true, false]],
])('%j over %s', (parameter, text, values) => {
  expect(expandRange(parameter, text)).toEqual(values);
});

test('a hundred steps of a tenth are the decimals themselves', () => {
  const values = expandRange(g, '0:10:0.1');
  expect(values).toEqual(Array.from({ length: 101 }, (_, k) => Number((k / 10).toFixed(1))));
});

test.each<[Parameter, string, string]>([
  [n, '2:6:0', 'a step other than 0'],
  [n, '6:2', 'a range that its step leads through, got "6:2:1"'],
  [n, '2:3:4:5', 'first:last:step, got "2:3:4:5"'],
  [n, 'a:b', 'a decimal such as 0.1 in a range, got "a"'],
  [n, '2:', 'a decimal such as 0.1 in a range, got ""'],
  [n, '0:3:0.5', 'a whole number from -5 to 200000 for n, got 0.5'],
  [n, '1:150000', 'at most 100000 values, got more'],
  [g, '1:2', 'a step as well, such as g=0.1:2:0.1'],
  [g, '9:11:1', 'a number from -2 to 10 for g, got 11'],
  [kind, 'b', 'one of a, b:c, d for kind'],
  [loops, 'yes', 'true or false for loops'],
])('%j over %s is refused', (parameter, text, says) => {
  expect(() => expandRange(parameter, text)).toThrow(says);
  expect(() => expandRange(parameter, text)).toThrow(expect.objectContaining({ code: 'usage' }));
});
