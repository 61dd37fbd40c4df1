import { exampleDocument } from '../../../../packages/format/test/support/example-files.js';
import { parseExample } from '@thalweg/format';
import { expect, test } from 'vitest';
import { settingsPoint } from '../../src/input/read-model.js';
import { sweepPoints } from '../../src/sweep/sweep-points.js';

const document = parseExample(JSON.stringify(exampleDocument()));
const setting = (text: string) => {
  const [name = '', value = ''] = text.split('=');
  return { name, text: value };
};

test('all combinations, the last parameter fastest, the rest as set or by default', () => {
  const points = sweepPoints(document, { over: ['n=2:3', 'g=0.5:1:0.5'].map(setting), set: [setting('kind=ring')] });
  expect(points).toEqual([
    { n: 2, g: 0.5, kind: 'ring', loops: false },
    { n: 2, g: 1, kind: 'ring', loops: false },
    { n: 3, g: 0.5, kind: 'ring', loops: false },
    { n: 3, g: 1, kind: 'ring', loops: false },
  ]);
});

test.each<[string[], string[], string]>([
  [['m=2:3'], [], '--over: expected one of the parameters n, g, kind, loops, got "m"'],
  [['n=2:3', 'n=4'], [], '--over: expected each parameter once, got "n" in --over as well'],
  [['n=2:3'], ['n=4'], '--over: expected each parameter once, got "n" in --set as well'],
  [['n=2:9'], [], '--over: expected a whole number from 2 to 6 for n, got 7'],
  [['n=2:6', 'g=0:2:0.00003'], [], '--over: expected at most 100000 points, got 333335'],
  [['n=2'], ['g=3'], '--set: expected a number from 0 to 2 for g, got 3'],
])('over %j with %j is refused', (over, set, says) => {
  expect(() => sweepPoints(document, { over: over.map(setting), set: set.map(setting) })).toThrow(says);
});

test('a parameter is set once', () => {
  expect(() => settingsPoint(document, ['n=3', 'n=4'].map(setting))).toThrow('each parameter once, got "n" again');
});
