import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { type EntropyResult, bestOf } from '../../src/constants/entropy-search.js';
import { gapDense } from '../../src/constants/gap.js';
import { mlsiAt } from '../../src/constants/mlsi-quotient.js';
import { entropyUpper, mlsiTasks, runMlsiStart } from '../../src/constants/mlsi.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import {
  addScaledInto,
  diagonal,
  identity,
  multiply,
  multiplyAdjointSecond,
  scale,
  trace,
} from '../../src/linalg/complex-matrix.js';
import { hermitianEigen } from '../../src/linalg/hermitian-eigen.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { type Structure, analyse } from '../../src/structure/structure.js';
import { dephasing, depolarising, generalisedDepolarising, randomChain, randomDavies } from '../entropy/models.js';
import { randomHermitianMatrix, randomState } from '../entropy/random-states.js';
import { depolarisingMlsi } from './closed-forms.js';

const random = seededRandom('mlsi');

function search(structure: Structure, seed = 1): EntropyResult {
  const best = bestOf(mlsiTasks(structure, { seed }).map((start) => runMlsiStart(structure, start)));
  expect(best).not.toBeNull();
  return best as EntropyResult;
}

function gapOf(structure: Structure): number {
  return gapDense(structure.generator, structure.state!, structure.fixedPoints!).value;
}

describe('search for mlsi', () => {
  it.each([3, 4, 5, 6])('reaches the closed form for depolarising, n = %d, over eigenvalues alone', (n) => {
    const structure = depolarising(n);
    expect(mlsiTasks(structure, { seed: 1 }).every((start) => start.diagonal && start.x.length === n)).toBe(true);
    const { value, margin } = search(structure);
    expect(margin).toBeLessThan(1e-12);
    expect(Math.abs(value - depolarisingMlsi(1 / n))).toBeLessThan(1e-12);
  });

  it.each([0.3, 0.1, 0.01])('reaches the closed form for a qubit depolarising to (s, 1−s), s = %d', (s) => {
    const structure = generalisedDepolarising([s, 1 - s]);
    const { value, margin } = search(structure);
    expect(margin).toBeLessThan(1e-11);
    expect(Math.abs(value - depolarisingMlsi(s))).toBeLessThan(1e-12);
  });

  it('reaches the closed form for three levels, which the smallest weight decides', () => {
    const { value } = search(generalisedDepolarising([0.2, 0.3, 0.5]));
    expect(Math.abs(value - depolarisingMlsi(0.2))).toBeLessThan(1e-11);
  });

  it('returns the gap where the infimum is the limit at the reference state', () => {
    const structure = depolarising(2);
    const results = mlsiTasks(structure, { seed: 1 }).map((start) => runMlsiStart(structure, start));
    const gap = { value: 1, grade: 'certified', by: 'test' } as const;
    for (const result of results) expect(result!.value).toBeGreaterThan(1 - 1e-9);
    expect(entropyUpper(gap, results)).toEqual(gap);
  });

  it('returns the witness where it is below the gap, and the gap without results', () => {
    const structure = depolarising(4);
    const results = mlsiTasks(structure, { seed: 1 }).map((start) => runMlsiStart(structure, start));
    const gap = { value: 1, grade: 'certified', by: 'test' } as const;
    const end = entropyUpper(gap, results)!;
    expect(end.grade).toBe('observed');
    expect(end.evidence?.constant).toBe('mlsi');
    const again = mlsiAt(structure, end.evidence!.state);
    expect(again.value).toBe(end.evidence!.value);
    expect(end.value).toBe(again.value + again.margin);
    expect(entropyUpper(gap, [null])).toBe(gap);
    expect(entropyUpper(null, [])).toBeNull();
  });

  it('stays at most the gap on chains, thermal models and dephasing, and scales with time', () => {
    const models: Structure[] = [
      randomChain(2, random),
      randomChain(4, random),
      randomDavies([2, 1], random),
      randomDavies([2], random),
      dephasing(2),
    ];
    for (const structure of models) {
      const { value } = search(structure);
      expect(value).toBeGreaterThan(0);
      expect(value).toBeLessThan(gapOf(structure) * (1 + 1e-4));
      const faster = analyse(scaled(structure, 3));
      expect(Math.abs(search(faster).value / (3 * value) - 1)).toBeLessThan(1e-7);
    }
  });

  it('does not change under a unitary conjugation of the model', () => {
    const structure = generalisedDepolarising([0.15, 0.85]);
    const { vectors } = hermitianEigen(randomHermitianMatrix(2, random));
    const rotated = analyse({
      ...structure.generator,
      jumps: structure.generator.jumps.map(({ matrix }) => {
        const dense = denseFromSparse(matrix);
        return { matrix: sparseFromDense(multiply(vectors, multiplyAdjointSecond(dense, vectors))) };
      }),
    });
    expect(Math.abs(search(rotated).value - search(structure).value)).toBeLessThan(1e-11);
  });

  it('gives the same bytes for the same seed', () => {
    const structure = randomDavies([2], seededRandom(5));
    const first = mlsiTasks(structure, { seed: 9 });
    expect(mlsiTasks(structure, { seed: 9 })).toEqual(first);
    expect(mlsiTasks(structure, { seed: 10 })).not.toEqual(first);
    expect(structuredClone(first)).toEqual(first);
    const start = first[first.length - 1];
    expect(runMlsiStart(structure, start)).toEqual(runMlsiStart(structure, start));
  });

  it('ends early when stopped, with what it has', () => {
    const structure = generalisedDepolarising([0.2, 0.3, 0.5]);
    const start = mlsiTasks(structure, { seed: 1 })[19];
    let asked = 0;
    const result = runMlsiStart(structure, start, { stop: () => ++asked > 4 })!;
    expect(result.reason).toBe('stopped');
    expect(result.evaluations).toBeLessThan(8);
    expect(mlsiAt(structure, result.state).value).toBe(result.value);
  });

  it('searches a chain that is not reversible by the plain formula', () => {
    const cycle = analyse(
      ratesGenerator([
        [0, 1, 0],
        [0, 0, 1],
        [1, 0, 0],
      ]),
    );
    expect(cycle.symmetry.kind).toBe('none');
    const { value, entropy } = search(cycle);
    // Re L = −3/2 off the constants, so that D cannot decay faster near the uniform distribution.
    expect(entropy).toBeGreaterThanOrEqual(1e-5);
    expect(value).toBeLessThan(1.5);
    expect(value).toBeGreaterThan(0);
  });

  it('does not feel a Hamiltonian that keeps the reference state, though it breaks the symmetry', () => {
    const { generator } = depolarising(3);
    const driven = analyse({ ...generator, hamiltonian: sparseFromDense(randomHermitianMatrix(3, random)) });
    expect(driven.symmetry.kind).toBe('none');
    expect(driven.canonical).toBeNull();
    const { value, margin } = search(driven);
    expect(margin).toBeLessThan(1e-11);
    expect(Math.abs(value - depolarisingMlsi(1 / 3))).toBeLessThan(1e-10);
  });

  it('has no tasks when nothing moves', () => {
    expect(mlsiTasks(analyse(ratesGenerator([[0]])), { seed: 1 })).toEqual([]);
  });
});

describe('bestOf', () => {
  it('takes the least value and margin together, of equals the first', () => {
    const result = (value: number, margin: number, label: string): EntropyResult => ({
      constant: 'mlsi',
      label,
      amplification: 1,
      value,
      margin,
      entropy: 1,
      smallestEigenvalue: 0.1,
      state: identity(1),
      evaluations: 1,
      reason: 'gradient',
    });
    const list = [result(1, 0, 'a'), null, result(0.9, 0.2, 'b'), result(1, 0, 'c')];
    expect(bestOf(list)?.label).toBe('a');
    expect(bestOf([null])).toBeNull();
  });
});

describe('mlsiAt', () => {
  it('evaluates the quotient of the depolarising qubit', () => {
    const x = 0.9;
    const d = (a: number, b: number): number => a * Math.log(a / b) + (1 - a) * Math.log((1 - a) / (1 - b));
    const { value, entropy, smallestEigenvalue } = mlsiAt(depolarising(2), diagonal([x, 1 - x]));
    expect(Math.abs(value - 0.5 * (1 + d(0.5, x) / d(x, 0.5)))).toBeLessThan(1e-14);
    expect(Math.abs(entropy - d(x, 0.5))).toBeLessThan(1e-15);
    expect(Math.abs(smallestEigenvalue - 0.1)).toBeLessThan(1e-16);
  });

  it('keeps its accuracy down to the threshold and refuses below it', () => {
    // ρ = 1/2 + e·diag(1,−1): the value is 1 + O(e²), and D = 2e² + O(e⁴).
    const at = (e: number) => mlsiAt(depolarising(2), diagonal([0.5 + e, 0.5 - e]));
    expect(Math.abs(at(1e-5).value - 1)).toBeLessThan(1e-9);
    expect(at(1e-5).margin).toBeLessThan(1e-9);
    expect(() => at(1e-6)).toThrowError(/at least 1e-10, got 2\.0/);
  });

  it('refuses a state on the boundary, and one of the wrong size', () => {
    expect(() => mlsiAt(depolarising(2), diagonal([1, 0]))).toThrowError(/eigenvalues are all positive/);
    expect(() => mlsiAt(depolarising(2), scale(identity(3), 1 / 3))).toThrowError(/2×2 state, got 3×3/);
  });

  it('has a margin that covers a perturbation of the matrix by rounding', () => {
    const structure = generalisedDepolarising([0.2, 0.8]);
    const rho = randomState(blockAlgebra([2]), random, 4);
    const { value, margin } = mlsiAt(structure, rho);
    for (let trial = 0; trial < 5; trial++) {
      const shift = randomHermitianMatrix(2, random);
      addScaledInto(shift, identity(2), -trace(shift).re / 2);
      const moved = addScaledInto(scale(rho, 1), shift, 2 ** -54);
      expect(Math.abs(mlsiAt(structure, moved).value - value)).toBeLessThanOrEqual(2 * margin);
    }
  });
});

function scaled(structure: Structure, factor: number): Structure['generator'] {
  const { generator } = structure;
  const root = Math.sqrt(factor);
  return {
    ...generator,
    jumps: generator.jumps.map(({ matrix }) => ({
      matrix: { ...matrix, re: matrix.re.map((x) => x * root), im: matrix.im.map((x) => x * root) },
    })),
    superoperator: generator.superoperator && generator.superoperator.map((x) => x * factor),
  };
}
