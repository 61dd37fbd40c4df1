import { describe, expect, it } from 'vitest';
import { fromCoordinates, toCoordinates } from '../../src/algebra/block-algebra.js';
import { bestOf, type EntropyResult } from '../../src/constants/entropy-search.js';
import { gapDense } from '../../src/constants/gap.js';
import { lsiFromGap, lsiOfProjection } from '../../src/constants/lsi-lower.js';
import { lsiAt, lsiProblem } from '../../src/constants/lsi-quotient.js';
import { lsiTasks, runLsiStart } from '../../src/constants/lsi.js';
import { mlsiTasks, runMlsiStart } from '../../src/constants/mlsi.js';
import { exponentialState } from '../../src/entropy/log-state.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { diagonal } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import type { End } from '../../src/sheet/bracket.js';
import { type Structure, analyse } from '../../src/structure/structure.js';
import { dephasing, depolarising, generalisedDepolarising, randomChain, randomDavies } from '../entropy/models.js';
import { randomHermitian } from '../entropy/random-states.js';

const random = seededRandom('lsi');

function search(structure: Structure): EntropyResult {
  return bestOf(lsiTasks(structure, { seed: 1 }).map((start) => runLsiStart(structure, start))) as EntropyResult;
}

describe('search for lsi', () => {
  it.each([3, 4, 5])('reaches 2(1−2/n)/log(n−1) for depolarising, n = %d', (n) => {
    expect(Math.abs(search(depolarising(n)).value - (2 * (1 - 2 / n)) / Math.log(n - 1))).toBeLessThan(1e-11);
  });

  it.each([0.3, 0.1])('reaches the two-point constant for a qubit depolarising to (s, 1−s), s = %d', (s) => {
    expect(Math.abs(search(generalisedDepolarising([s, 1 - s])).value - lsiOfProjection(s))).toBeLessThan(1e-11);
  });

  it('reaches the two-point constant of rates p, q', () => {
    const [p, q] = [1.5, 0.4];
    const chain = analyse(
      ratesGenerator([
        [0, p],
        [q, 0],
      ]),
    );
    const smallest = q / (p + q);
    expect(Math.abs(search(chain).value - (p + q) * lsiOfProjection(smallest))).toBeLessThan(1e-11);
  });

  it('stays at most mlsi and the gap, and at least the bound from the gap', () => {
    for (const structure of [randomChain(4, random), randomDavies([2], random), depolarising(3)]) {
      const gap = gapDense(structure.generator, structure.state!, structure.fixedPoints!).value;
      const { value } = search(structure);
      const mlsi = bestOf(mlsiTasks(structure, { seed: 1 }).map((s) => runMlsiStart(structure, s))) as EntropyResult;
      expect(value).toBeLessThan(mlsi.value * (1 + 1e-4));
      expect(value).toBeLessThan(gap * (1 + 1e-4));
      const lower = lsiFromGap(structure, { value: gap, grade: 'certified', by: 'test' });
      if (lower) expect(value).toBeGreaterThan(lower.value * (1 - 1e-9));
    }
  });

  it('evaluates its witness afresh and refuses generators that are not primitive', () => {
    const structure = generalisedDepolarising([0.2, 0.8]);
    const result = search(structure);
    expect(lsiAt(structure, result.state).value).toBe(result.value);
    expect(() => lsiTasks(dephasing(2), { seed: 1 })).toThrowError(/primitive/);
    expect(() => lsiAt(structure, structure.state!.sigma)).toThrowError(/relative entropy to its projection/);
  });
});

describe('lsiAt', () => {
  it('is 2E(f,f)/Ent(f²) on a chain', () => {
    const rates = [
      [0, 1, 0.5],
      [1, 0, 2],
      [0.5, 2, 0],
    ];
    const p = [0.2, 0.5, 0.3];
    const f = p.map((x) => Math.sqrt(3 * x));
    let energy = 0;
    for (let x = 0; x < 3; x++) for (let y = 0; y < 3; y++) energy += (rates[x][y] * (f[x] - f[y]) ** 2) / 6;
    const entropy = p.reduce((sum, x) => sum + x * Math.log(3 * x), 0);
    const { value } = lsiAt(analyse(ratesGenerator(rates)), diagonal(p));
    expect(Math.abs(value - (2 * energy) / entropy)).toBeLessThan(1e-13);
  });
});

describe('derivative of the quotient', () => {
  it.each([
    ['chain', () => randomChain(3, random)],
    ['thermal qubit', () => generalisedDepolarising([0.2, 0.8])],
    ['thermal on [2,1]', () => randomDavies([2, 1], random)],
  ])('against central differences: %s', (_, make) => {
    const structure = make();
    const { algebra } = structure;
    const problem = lsiProblem(structure);
    const x = toCoordinates(algebra, randomHermitian(algebra, random));
    const value = (y: Float64Array): number =>
      problem.evaluate(exponentialState(algebra, fromCoordinates(algebra, y)))!.value;
    const { gradient } = problem.evaluate(exponentialState(algebra, fromCoordinates(algebra, x)))!;
    const analytic = toCoordinates(algebra, gradient());
    const step = 1e-5;
    for (let i = 0; i < x.length; i++) {
      const ahead = value(x.map((v, j) => (i === j ? v + step : v)));
      const behind = value(x.map((v, j) => (i === j ? v - step : v)));
      expect(Math.abs((ahead - behind) / (2 * step) - analytic[i])).toBeLessThan(1e-8);
    }
  });
});

describe('lsiFromGap', () => {
  const gap: End = { value: 2, grade: 'enclosed', by: 'test', margin: 1e-3 };

  it('multiplies the gap, never with a better grade than floating point gives', () => {
    const end = lsiFromGap(depolarising(3), gap)!;
    expect(Math.abs(end.value - (2 * 2 * (1 - 2 / 3)) / Math.log(2))).toBeLessThan(1e-14);
    expect(end.grade).toBe('certified');
    expect(Math.abs(end.margin! - 1e-3 * lsiOfProjection(1 / 3))).toBeLessThan(1e-17);
    expect(lsiFromGap(depolarising(2), gap)?.value).toBe(2);
  });

  it('takes the smallest weight of a chain', () => {
    const chain = randomChain(3, random);
    expect(lsiFromGap(chain, gap)?.value).toBe(2 * lsiOfProjection(chain.state!.smallest));
  });

  it('checks its hypotheses', () => {
    expect(lsiFromGap(dephasing(3), gap)).toBeNull();
    expect(lsiFromGap(generalisedDepolarising([0.2, 0.8]), gap)).toBeNull();
    expect(lsiFromGap(depolarising(3), { ...gap, grade: 'observed' })).toBeNull();
    expect(lsiFromGap(depolarising(3), { ...gap, value: 0 })).toBeNull();
    expect(lsiFromGap(depolarising(3), null)).toBeNull();
  });

  it('has the limit 1 at s = ½ and is 2(1−2s)/log(1/s−1) elsewhere', () => {
    expect(lsiOfProjection(0.5)).toBe(1);
    expect(Math.abs(lsiOfProjection(0.5 - 1e-9) - 1)).toBeLessThan(1e-15);
    expect(Math.abs(lsiOfProjection(0.1) - 1.6 / Math.log(9))).toBeLessThan(1e-15);
  });
});
