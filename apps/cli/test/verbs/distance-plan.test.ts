import { expect, test } from 'vitest';
import { planDistance } from '../../src/verbs/distance/plan.js';

const machine = { processors: 2 };
const states = { model: 'm.json', from: 'a.json', to: 'b.json' };

test('a distance is planned with a width and a number of points', () => {
  expect(planDistance(states, machine)).toMatchObject({ ...states, width: 1e-4, points: 9, output: null });
  expect(planDistance({ ...states, width: '1e-6', points: '3', output: 'd.json' }, machine)).toMatchObject({
    width: 1e-6,
    points: 3,
    output: 'd.json',
  });
});

test.each([
  ['width', '0', /--width: expected a number above 0/],
  ['width', '2', /--width: expected a relative width below 1/],
  ['points', '1', /--points: expected a whole number from 2/],
])('--%s %s is refused', (option, value, message) => {
  expect(() => planDistance({ ...states, [option]: value }, machine)).toThrow(message);
});
