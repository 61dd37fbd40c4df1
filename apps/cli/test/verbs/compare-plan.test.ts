import { expect, test } from 'vitest';
import { planCompare } from '../../src/verbs/compare/plan.js';

const machine = { processors: 2 };

test('a comparison is planned with its pairs', () => {
  expect(planCompare({ model: 'm.json' }, machine)).toMatchObject({ model: 'm.json', pairs: 8, output: null, seed: 1 });
  expect(planCompare({ model: 'm.json', pairs: '20', seed: '7' }, machine)).toMatchObject({ pairs: 20, seed: 7 });
  expect(() => planCompare({ model: 'm.json', pairs: '0' }, machine)).toThrow(
    /--pairs: expected a whole number from 1/,
  );
});
