import { describe, expect, it } from 'vitest';
import { clsiByComparison } from '../../src/constants/clsi-comparison.js';
import { clsiTasks } from '../../src/constants/clsi.js';
import { type EntropyResult, bestOf } from '../../src/constants/entropy-search.js';
import { gapDense } from '../../src/constants/gap.js';
import { mlsiAt } from '../../src/constants/mlsi-quotient.js';
import { mlsiTasks, runMlsiStart } from '../../src/constants/mlsi.js';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { sumGenerator } from '../../src/generator/sum-generator.js';
import { fromRows } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { type Structure, analyse } from '../../src/structure/structure.js';
import { dephasing, depolarising, generalisedDepolarising, randomChain, randomDavies } from '../entropy/models.js';
import { depolarisingMlsi } from './closed-forms.js';

const random = seededRandom('clsi');

const PAULIS = [
  fromRows([
    [0, 1],
    [1, 0],
  ]),
  fromRows(
    [
      [0, 0],
      [0, 0],
    ],
    [
      [0, -1],
      [1, 0],
    ],
  ),
  fromRows([
    [1, 0],
    [0, -1],
  ]),
];

function search(structure: Structure): { mlsi: EntropyResult; clsi: EntropyResult } {
  const run = (tasks: ReturnType<typeof mlsiTasks>): EntropyResult =>
    bestOf(tasks.map((start) => runMlsiStart(structure, start))) as EntropyResult;
  return { mlsi: run(mlsiTasks(structure, { seed: 1 })), clsi: run(clsiTasks(structure, { seed: 1 })) };
}

describe('search for clsi', () => {
  it.each([2, 3])('reaches the value at s = 1/n² for depolarising, n = %d, below mlsi', (n) => {
    const { mlsi, clsi } = search(depolarising(n));
    expect(clsi.amplification).toBe(n);
    expect(clsi.state.rows).toBe(n * n);
    expect(Math.abs(clsi.value - depolarisingMlsi(1 / n ** 2))).toBeLessThan(1e-11);
    expect(clsi.value).toBeLessThan(mlsi.value - 0.04);
  });

  it('evaluates its witness afresh', () => {
    const structure = generalisedDepolarising([0.2, 0.8]);
    const { clsi } = search(structure);
    expect(mlsiAt(structure, clsi.state, 2).value).toBe(clsi.value);
  });

  it('does not exceed mlsi, nor mlsi the gap', () => {
    for (const structure of [randomDavies([2], random), dephasing(2), randomDavies([2, 1], random)]) {
      const { mlsi, clsi } = search(structure);
      const gap = gapDense(structure.generator, structure.state!, structure.fixedPoints!).value;
      expect(clsi.value).toBeLessThan(mlsi.value * (1 + 1e-4));
      expect(mlsi.value).toBeLessThan(gap * (1 + 1e-4));
      expect(clsi.value).toBeGreaterThan(clsiByComparison(structure)?.value ?? 0);
    }
  });

  it('searches chains with an ancilla qubit, and nothing too large', () => {
    expect(clsiTasks(randomChain(3, random), { seed: 1 })[0].amplification).toBe(2);
    expect(clsiTasks(depolarising(6), { seed: 1 })).toEqual([]);
    expect(clsiTasks(depolarising(6), { seed: 1, amplification: 2 })[0].amplification).toBe(2);
  });
});

describe('clsiByComparison', () => {
  it('is one half for the identity minus a conditional expectation, at its rate', () => {
    const models: [Structure, number][] = [
      [depolarising(3), 0.5],
      [dephasing(3), 0.5],
      [generalisedDepolarising([0.2, 0.8]), 0.5],
      [analyse(expectationGenerator({ algebra: blockAlgebra([3]), onto: { blocks: [2, 1] }, rate: 4 })), 2],
    ];
    for (const [structure, expected] of models) {
      const end = clsiByComparison(structure)!;
      expect(end.grade).toBe('certified');
      expect(end.value).toBeLessThanOrEqual(expected);
      expect(expected - end.value).toBeLessThan(1e-10);
    }
  });

  it('finds the least rate of a Pauli semigroup, for which Γ_L − cΓ₀ is diagonal', () => {
    // L = Σ r_i(σ_iAσ_i − A), and E − id = Σ ¼(σ_iAσ_i − A), so c is 4 min r_i.
    const rates = [0.5, 0.2, 0.9];
    const g = lindbladGenerator({
      algebra: blockAlgebra([2]),
      jumps: PAULIS.map((matrix, i) => ({ matrix, rate: rates[i] })),
    });
    expect(Math.abs(clsiByComparison(analyse(g))!.value - 2 * 0.2)).toBeLessThan(1e-11);
  });

  it('adds to what a second generator contributes', () => {
    const base = depolarising(2).generator;
    const more = dephasing(2).generator;
    const both = analyse(
      sumGenerator([
        { weight: 1, generator: base },
        { weight: 1, generator: more },
      ]),
    );
    const end = clsiByComparison(both)!;
    expect(end.value).toBeGreaterThan(0.5 - 1e-10);
    expect(end.value).toBeLessThan(0.5 + 0.5);
  });

  it('is silent where the jumps do not span the tangent space', () => {
    const jumps = [{ matrix: PAULIS[0] }, { matrix: PAULIS[2] }];
    const structure = analyse(lindbladGenerator({ algebra: blockAlgebra([2]), jumps }));
    expect(structure.fixedPoints?.primitive).toBe(true);
    expect(clsiByComparison(structure)).toBeNull();
  });
});
