import { describe, expect, it } from 'vitest';
import { fromCoordinates, toCoordinates } from '../../src/algebra/block-algebra.js';
import {
  entropyForms,
  entropyGradient,
  productionGradient,
  pullBackToLogarithm,
} from '../../src/entropy/entropy-gradient.js';
import { entropyModel } from '../../src/entropy/entropy-model.js';
import { exponentialState, logStateOf, matrixOf } from '../../src/entropy/log-state.js';
import {
  type ComplexMatrix,
  addScaledInto,
  copy,
  innerProduct,
  multiply,
  multiplyAdjointSecond,
  scale,
  trace,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import type { Structure } from '../../src/structure/structure.js';
import { dephasing, generalisedDepolarising, randomChain, randomDavies } from './models.js';
import { randomHermitian } from './random-states.js';

const random = seededRandom('entropy gradients');

const MODELS: [string, Structure][] = [
  ['depolarising to a thermal qubit', generalisedDepolarising([0.2, 0.8])],
  ['dephasing, n = 3', dephasing(3)],
  ['chain of 4 points', randomChain(4, random)],
  ['thermal on [2,1]', randomDavies([2, 1], random)],
  ['thermal on [1,2,2]', randomDavies([1, 2, 2], random)],
];

describe.each(MODELS)('gradients: %s', (_, structure) => {
  it.each([1, 2])('of I and D in H, against central differences, with an ancilla of side %d', (k) => {
    const model = entropyModel(structure, k);
    const d = model.algebra.dimension;
    const h = toCoordinates(model.algebra, randomHermitian(model.algebra, random));
    const values = (x: Float64Array): [number, number] => {
      const { production, entropy } = entropyForms(
        model,
        exponentialState(model.algebra, fromCoordinates(model.algebra, x)),
      );
      return [production, entropy];
    };
    const state = exponentialState(model.algebra, fromCoordinates(model.algebra, h));
    const forms = entropyForms(model, state);
    const ofI = toCoordinates(model.algebra, pullBackToLogarithm(state, forms, 1, 0));
    const ofD = toCoordinates(model.algebra, pullBackToLogarithm(state, forms, 0, 1));
    const step = 1e-5;
    for (let i = 0; i < d; i++) {
      const ahead = values(h.map((x, j) => (i === j ? x + step : x)));
      const behind = values(h.map((x, j) => (i === j ? x - step : x)));
      expect(Math.abs((ahead[0] - behind[0]) / (2 * step) - ofI[i])).toBeLessThan(2e-8 * (1 + forms.production));
      expect(Math.abs((ahead[1] - behind[1]) / (2 * step) - ofD[i])).toBeLessThan(2e-8);
    }
  });

  it('of I and D in ρ, against central differences along traceless directions', () => {
    const model = entropyModel(structure, 1);
    const state = exponentialState(model.algebra, randomHermitian(model.algebra, random));
    const forms = entropyForms(model, state);
    const toBasis = (g: ComplexMatrix): ComplexMatrix => multiply(state.u, multiplyAdjointSecond(g, state.u));
    const rho = matrixOf(state);
    for (let trial = 0; trial < 4; trial++) {
      const direction = randomHermitian(model.algebra, random);
      addScaledInto(direction, rho, -trace(direction).re);
      const step = 1e-5 * Math.min(...state.lambda);
      const at = (s: number): [number, number] => {
        const moved = addScaledInto(copy(rho), direction, s);
        const { production, entropy } = entropyForms(
          model,
          logStateOf(model.algebra, scale(moved, 1 / trace(moved).re)),
        );
        return [production, entropy];
      };
      const [ahead, behind] = [at(step), at(-step)];
      const gradients = [productionGradient(forms), entropyGradient(forms)];
      gradients.forEach((gradient, i) => {
        const expected = innerProduct(toBasis(gradient), direction).re;
        const numeric = (ahead[i] - behind[i]) / (2 * step);
        expect(Math.abs(numeric - expected)).toBeLessThan(1e-5 * (1 + Math.abs(expected)));
      });
    }
  });
});
