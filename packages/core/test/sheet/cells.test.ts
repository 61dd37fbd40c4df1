import { expect, it } from 'vitest';
import { completeGraph, depolarising } from '../../src/families/index.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { bracketOf, expectWithin } from '../helpers/bracket-of.js';

/** Two points: Maas, J. Funct. Anal. 261 (2011). The others: observed by another program; for the qubit ge = 1 is a theorem. */
it.each([
  ['two points with rates 1 and 2', ratesGenerator([[0, 1], [2, 0]]), 2.935563990577], // prettier-ignore
  ['the depolarising qubit', depolarising(2), 1],
  ['the complete graph on three points, rates 1/3', completeGraph(3), 0.962710989954],
])('%s: ge is closed by cells of states, its lower end enclosed', (_, g, value) => {
  const { lower, upper, closed } = bracketOf(g, 'ge');
  expect(closed).toBe(true);
  expect(lower?.grade).toBe('enclosed');
  expect(lower?.by).toMatch(/^all states, cut into \d+ cells$/);
  expectWithin(lower?.value, value, 1e-8, 'lower end of ge');
  expect(lower?.value).toBeLessThanOrEqual(value + 1e-12);
  expectWithin(upper?.value, value, 1e-8, 'upper end of ge');
});
