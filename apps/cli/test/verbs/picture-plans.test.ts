import { ThalwegError } from '@thalweg/core';
import { describe, expect, test } from 'vitest';
import { planFlow } from '../../src/verbs/flow/plan.js';
import { planRelief } from '../../src/verbs/relief/plan.js';

const machine = { processors: 2 };
const usage = (run: () => unknown): string => {
  try {
    run();
  } catch (error) {
    if (error instanceof ThalwegError && error.code === 'usage') return error.message;
    throw error;
  }
  return 'no error';
};

describe('flow', () => {
  const plan = (raw: object) => planFlow({ model: 'm.json', from: 'rho.json', ...raw }, machine);

  test('is fully defaulted, and reads times as fractions too', () => {
    expect(plan({})).toMatchObject({ from: 'rho.json', until: null, points: null, csv: false, svg: null, set: [] });
    expect(plan({ until: '3/2', points: '7' })).toMatchObject({ until: 1.5, points: 7 });
  });

  test.each(['-1', '0', 'soon', '1e999', 'NaN'])('refuses --until %s', (until) => {
    expect(usage(() => plan({ until }))).toMatch(/^--until: expected a (finite )?number/);
  });

  test.each(['1', '10001', '2.5', '-3'])('refuses --points %s', (points) => {
    expect(usage(() => plan({ points }))).toMatch(/^--points: expected a whole number from 2 to 10000/);
  });

  test('asks for a state, and for one form of output', () => {
    expect(usage(() => planFlow({ model: 'm.json' }, machine))).toMatch(/^--from: .*give --from rho\.json/);
    expect(usage(() => plan({ csv: true, json: true }))).toMatch(/--csv and --json/);
  });
});

describe('relief', () => {
  const plan = (raw: object) => planRelief({ model: 'm.json', ...raw }, machine);

  test('is fully defaulted, and reads axes', () => {
    expect(plan({})).toMatchObject({ axes: null, through: [], points: null, mean: 'logarithmic', output: null });
    expect(plan({ axes: 'y,z' }).axes).toEqual(['y', 'z']);
  });

  test.each(['x', 'x,x', 'x,y,z', 'x,q', ''])('refuses --axes "%s"', (axes) => {
    expect(usage(() => plan({ axes }))).toMatch(/^--axes: expected (two different axes|one of x, y, z)/);
  });

  test.each(['99', '40001', '1e3'])('refuses --points %s', (points) => {
    expect(usage(() => plan({ points }))).toMatch(/^--points: expected a whole number from 100 to 40000/);
  });

  test('refuses what does not go together', () => {
    expect(usage(() => plan({ axes: 'x,z', through: ['a.json'] }))).toMatch(/--axes or --through/);
    expect(usage(() => plan({ through: ['a', 'b', 'c'] }))).toMatch(/at most two states, got 3/);
    expect(usage(() => plan({ table: true, csv: true }))).toMatch(/one form of output, got --table and --csv/);
  });
});
