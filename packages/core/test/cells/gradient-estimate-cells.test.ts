import { describe, expect, it } from 'vitest';
import { type CellBound, cellCharts, gradientEstimateByCells } from '../../src/cells/gradient-estimate-cells.js';
import { proveOverCells } from '../../src/cells/branch-and-bound.js';
import {
  completeGraph,
  cycle,
  dephasing,
  depolarising,
  hypercube,
  pauliJumps,
  thermalQubit,
} from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { minimiseScalar } from '../../src/search/brent.js';
import { seededRandom } from '../../src/random.js';
import { runSheetTask } from '../../src/sheet/run-sheet-task.js';
import { planSearches } from '../../src/sheet/sheet-plan.js';
import { analyse } from '../../src/structure/structure.js';
import { expectWithin } from '../helpers/bracket-of.js';

/** Maas, J. Funct. Anal. 261 (2011): the curvature of two points with rates p (0→1) and q (1→0). */
function twoPointCurvature(p: number, q: number): number {
  const excess = (b: number): number => {
    const x = q * (1 - b);
    const y = p * (1 + b);
    const mean = Math.abs(x - y) < 1e-7 * (x + y) ? (x + y) / 2 : (x - y) / Math.log(x / y);
    return mean / (1 - b * b);
  };
  return (p + q) / 2 + minimiseScalar(excess, -1 + 1e-12, 1 - 1e-12, 1e-12).value;
}

function twoPoints(p: number, q: number): Generator {
  return ratesGenerator([
    [0, p],
    [q, 0],
  ]);
}

function isProved(g: Generator, k: number, maxCells = 4000): boolean {
  const charts = cellCharts(analyse(g));
  if (!charts) throw new Error('expected a model that cells cover');
  return charts.every((chart) => proveOverCells(chart, k, { maxCells }).proved);
}

function boundOf(g: Generator, upper: number): CellBound {
  const bound = gradientEstimateByCells(analyse(g), { upper, lower: -Infinity, scale: 1 });
  if (!bound) throw new Error('expected a bound');
  return bound;
}

describe('two points', () => {
  const rates = [0.01, 0.35, 1, 7, 1000];
  const pairs = rates.flatMap((p, k) => rates.slice(k).map((q) => [p, q] as const));

  it.each(pairs)('rates %f and %f: proved 1e-6 below the closed form, refused 1e-6 above it, relative', (p, q) => {
    const truth = twoPointCurvature(p, q);
    for (const g of [twoPoints(p, q), twoPoints(q, p)]) {
      expect(isProved(g, truth * (1 - 1e-6))).toBe(true);
      expect(isProved(g, truth * (1 + 1e-6))).toBe(false);
    }
  });

  it('rates 1 and 2: a bound within 1e-8 of 2.93556399, where a lift gives 2.5', () => {
    const { value, cells } = boundOf(twoPoints(1, 2), twoPointCurvature(1, 2));
    expectWithin(value, twoPointCurvature(1, 2), 1e-8, 'ge');
    expect(cells).toBeLessThan(200);
  });
});

/** Observed minima of searches with another program (NumPy): method of the search over states, not of cells. */
describe('three points', () => {
  it('the complete graph with rates 1/3: within 1e-8 of 0.96271099, refused above', () => {
    expectWithin(boundOf(completeGraph(3), 0.962710989954).value, 0.962710989954, 1e-8, 'ge');
    expect(isProved(completeGraph(3), 0.962710989954 + 1e-6, 1500)).toBe(false);
  });

  it('the cycle with rates 1: proved at 2.888, refused at 2.8882', () => {
    expect(isProved(cycle(3), 2.888)).toBe(true);
    expect(isProved(cycle(3), 2.8882, 1500)).toBe(false);
  });
});

/** The best of a few starts of the search over states, which shares no code with the cells. */
function observed(g: Generator): number {
  const key = { id: 'ge', mean: 'logarithmic' } as const;
  const request = { rows: [key], seed: 3, randomStarts: null, epsilon: 0.01 };
  const findings = planSearches(analyse(g), request, new Set()).map((task) => runSheetTask(analyse(g), task));
  return Math.min(...findings.map((finding) => (finding.kind === 'ge' ? finding.result.value : Infinity)));
}

describe('chains of three points against the search', () => {
  const random = seededRandom('three points');
  const chains = Array.from({ length: 5 }, (_, k) => {
    const pi = [0, 1, 2].map(() => 0.1 + random.uniform());
    const c = [0.1 + random.uniform(), k % 2 === 0 ? 0 : random.uniform(), 0.1 + random.uniform()];
    return [0, 1, 2].map((x) => [0, 1, 2].map((y) => (x === y ? 0 : c[x + y - 1] / pi[x])));
  });

  it.each(chains)('rates %j, %j, %j: proved 1e-3 below the observed minimum, not 1e-3 above it', (...rates) => {
    const g = ratesGenerator(rates);
    const upper = observed(g);
    const unit = Math.max(1, Math.abs(upper));
    expect(isProved(g, upper - 1e-3 * unit)).toBe(true);
    expect(isProved(g, upper + 1e-3 * unit, 500)).toBe(false);
  });
});

describe('tracial qubits', () => {
  it('depolarising: within 1e-8 of 1, refused above', () => {
    expectWithin(boundOf(depolarising(2), 1).value, 1, 1e-8, 'ge');
    expect(isProved(depolarising(2), 1 + 1e-6)).toBe(false);
  });

  const pauli = (x: number, y: number, z: number): Generator =>
    pauliJumps([
      { string: 'X', rate: x },
      { string: 'Y', rate: y },
      { string: 'Z', rate: z },
    ]);

  // ge ≤ gap, the sum of the two smaller rates; searches find nothing lower.
  it.each([
    [1, 1, 0.7, 1e-3],
    [0.4, 1, 0.4, 1e-3],
    [0.6, 0.4, 1, 1e-1],
  ])('Pauli rates %f, %f, %f: proved below the gap, not above it', (x, y, z, width) => {
    const gap = x + y + z - Math.max(x, y, z);
    expect(isProved(pauli(x, y, z), gap * (1 - width))).toBe(true);
    expect(isProved(pauli(x, y, z), gap * 1.001, 400)).toBe(false);
  });
});

describe('what cells do not cover', () => {
  it.each([
    ['a qubit whose diagonal states are all fixed', dephasing(2)],
    ['a qubit that is not tracial', thermalQubit({ beta: 1 })],
    ['a chain of four points', hypercube(2)],
    ['a qutrit', depolarising(3)],
  ])('%s has no charts', (_, g) => {
    expect(cellCharts(analyse(g))).toBeNull();
  });

  it('nothing is claimed above an upper end, whatever is asked', () => {
    const found = gradientEstimateByCells(analyse(twoPoints(1, 2)), { upper: 2.95, lower: 2.94, scale: 1 });
    expect(found).toBeNull();
  });

  it('stops when told to', () => {
    const found = gradientEstimateByCells(analyse(completeGraph(3)), {
      upper: 0.96271,
      lower: -Infinity,
      scale: 1,
      shouldStop: () => true,
    });
    expect(found === null || found.value < 0.9).toBe(true);
  });
});
