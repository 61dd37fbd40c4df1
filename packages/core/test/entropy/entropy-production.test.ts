import { describe, expect, it } from 'vitest';
import { toCoordinates } from '../../src/algebra/block-algebra.js';
import { entropyModel } from '../../src/entropy/entropy-model.js';
import { entropyProduction, metricProduction, plainProduction } from '../../src/entropy/entropy-production.js';
import { entropyForms } from '../../src/entropy/entropy-gradient.js';
import { logStateOf, matrixOf } from '../../src/entropy/log-state.js';
import { matrixAction } from '../../src/entropy/matrix-action.js';
import { relativeEntropy } from '../../src/entropy/relative-entropy.js';
import { applyGenerator, applyGeneratorAdjoint, generatorMatrix } from '../../src/generator/apply-generator.js';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { addScaledInto, copy, frobeniusNorm, scale, subtract } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { dephasing, depolarising, generalisedDepolarising, randomChain, randomDavies } from './models.js';
import { randomHermitian, randomState } from './random-states.js';

const random = seededRandom('entropy production');

const MODELS = {
  'depolarising, n = 3': depolarising(3),
  'depolarising to a thermal qubit': generalisedDepolarising([0.2, 0.8]),
  'dephasing, n = 3': dephasing(3),
  'chain of 4 points': randomChain(4, random),
  'thermal on [2,1]': randomDavies([2, 1], random),
  'thermal on [3]': randomDavies([3], random),
};

describe('entropyProduction', () => {
  it.each(Object.entries(MODELS))('metric form equals −Tr L†ρ(log ρ − log σ): %s', (_, structure) => {
    for (const k of [1, 2]) {
      const model = entropyModel(structure, k);
      expect(model.jumps).not.toBeNull();
      const state = logStateOf(model.algebra, randomState(model.algebra, random));
      const plain = plainProduction(model, state);
      expect(plain).toBeGreaterThan(0);
      expect(Math.abs(metricProduction(model, state) / plain - 1)).toBeLessThan(1e-11);
    }
  });

  it.each(Object.entries(MODELS))('is minus the derivative of D along the flow: %s', (_, structure) => {
    const rho = randomState(structure.algebra, random);
    const sigma = structure.state!.sigma;
    const flow = applyGeneratorAdjoint(structure.generator, rho);
    const step = 1e-5;
    const ahead = relativeEntropy(addScaledInto(copy(rho), flow, step), sigma);
    const behind = relativeEntropy(addScaledInto(copy(rho), flow, -step), sigma);
    const numeric = (behind - ahead) / (2 * step);
    expect(Math.abs(entropyProduction(structure, rho) / numeric - 1)).toBeLessThan(1e-6);
  });

  it('is computed plainly for a chain that is not reversible', () => {
    const cycle = analyse(
      ratesGenerator([
        [0, 1, 0.2],
        [0.2, 0, 1],
        [1, 0.2, 0],
      ]),
    );
    expect(entropyModel(cycle).jumps).toBeNull();
    // Σ_xy ρ_x Q_xy (log f_x − log f_y), f = ρ/σ, σ uniform.
    const p = [0.5, 0.3, 0.2];
    const q = [
      [0, 1, 0.2],
      [0.2, 0, 1],
      [1, 0.2, 0],
    ];
    let expected = 0;
    p.forEach((px, x) => p.forEach((py, y) => (expected += px * q[x][y] * Math.log(px / py))));
    const rho = {
      rows: 3,
      cols: 3,
      re: Float64Array.from([p[0], 0, 0, 0, p[1], 0, 0, 0, p[2]]),
      im: new Float64Array(9),
    };
    expect(Math.abs(entropyProduction(cycle, rho) - expected)).toBeLessThan(1e-14);
  });

  it('refuses a state that is not faithful and a generator without a faithful invariant state', () => {
    const pure = { rows: 2, cols: 2, re: Float64Array.from([1, 0, 0, 0]), im: new Float64Array(4) };
    expect(() => entropyProduction(depolarising(2), pure)).toThrowError(/eigenvalues are all positive/);
    const decay = analyse(
      lindbladGenerator({
        algebra: blockAlgebra([2]),
        jumps: [{ matrix: { rows: 2, cols: 2, re: Float64Array.from([0, 1, 0, 0]), im: new Float64Array(4) } }],
      }),
    );
    expect(() => entropyProduction(decay, pure)).toThrowError(/faithful invariant state/);
  });
});

describe('quick paths', () => {
  it('take the production from its definition far from σ, and the metric form near it', () => {
    const structure = randomDavies([2, 1], random);
    const model = entropyModel(structure);
    const far = logStateOf(model.algebra, randomState(model.algebra, random));
    const quick = entropyForms(model, far, true);
    const plain = entropyForms(model, far);
    expect(quick.entropy).toBeGreaterThan(0.01);
    expect(quick.production).not.toBe(plain.production);
    expect(Math.abs(quick.production / plain.production - 1)).toBeLessThan(1e-12);
    const { sigma } = structure.state!;
    const near = logStateOf(model.algebra, addScaledInto(scale(sigma, 0.99), matrixOf(far), 0.01));
    expect(entropyForms(model, near, true).production).toBe(entropyForms(model, near).production);
  });

  it('apply L by its matrix as by its jumps, on matrices that are not Hermitian too', () => {
    const { generator, algebra } = randomDavies([2, 1], random);
    const a = addScaledInto(randomHermitian(algebra, random), randomHermitian(algebra, random), 0, 1);
    const byMatrix = matrixAction(algebra, generatorMatrix(generator), false)(a);
    expect(frobeniusNorm(subtract(byMatrix, applyGenerator(generator, a)))).toBeLessThan(1e-13 * frobeniusNorm(a));
    const onStates = matrixAction(algebra, generatorMatrix(generator), true)(a);
    const expected = applyGeneratorAdjoint(generator, a);
    expect(frobeniusNorm(subtract(onStates, expected))).toBeLessThan(1e-13 * frobeniusNorm(a));
  });
});

describe('entropyModel on M ⊗ M_k', () => {
  it('applies L ⊗ id as the tensor product with the zero generator does', () => {
    const base = randomDavies([2, 1], random);
    const idle = lindbladGenerator({ algebra: blockAlgebra([2]), jumps: [] });
    const amplified = tensorGenerator([base.generator, idle]);
    const model = entropyModel(base, 2);
    expect(amplified.algebra.blocks).toEqual(model.algebra.blocks);
    const rho = randomHermitian(model.algebra, random);
    const difference = subtract(model.applyAdjoint(rho), applyGeneratorAdjoint(amplified, rho));
    expect(frobeniusNorm(difference)).toBeLessThan(1e-13 * frobeniusNorm(rho));
  });

  it('projects states as the limit of the flow does, primitive or not', () => {
    for (const structure of [generalisedDepolarising([0.3, 0.7]), dephasing(2)]) {
      const model = entropyModel(structure, 2);
      const rho = randomState(model.algebra, random);
      const tau = model.reference(logStateOf(model.algebra, rho));
      // Both are E − id for their E, so E†ρ = ρ + L†ρ.
      const expected = addScaledInto(copy(rho), model.applyAdjoint(rho), 1);
      const found = toCoordinates(model.algebra, expected);
      const { logs, u } = tau;
      const rebuilt = toCoordinates(model.algebra, expectationMatrix(logs, u));
      const worst = Math.max(...found.map((x, i) => Math.abs(x - rebuilt[i])));
      expect(worst).toBeLessThan(1e-13);
    }
  });
});

function expectationMatrix(logs: Float64Array, u: { rows: number; cols: number; re: Float64Array; im: Float64Array }) {
  const n = u.rows;
  const re = new Float64Array(n * n);
  const im = new Float64Array(n * n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      for (let k = 0; k < n; k++) {
        const w = Math.exp(logs[k]);
        re[i * n + j] += w * (u.re[i * n + k] * u.re[j * n + k] + u.im[i * n + k] * u.im[j * n + k]);
        im[i * n + j] += w * (u.im[i * n + k] * u.re[j * n + k] - u.re[i * n + k] * u.im[j * n + k]);
      }
    }
  }
  return { rows: n, cols: n, re, im };
}
