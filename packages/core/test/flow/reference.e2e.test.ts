import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { descend } from '../../src/flow/index.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { fromRows, frobeniusNorm, subtract } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { randomState } from '../entropy/random-states.js';
import { type WrittenMatrix, numberOf, referenceAnswers, writeMatrix } from '../helpers/ask-reference.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';

const random = seededRandom('flow against the reference');
const down = fromRows([[0, 1], [0, 0]]); // prettier-ignore
const up = fromRows([[0, 0], [1, 0]]); // prettier-ignore
const turn = fromRows([[0.3, 0.8], [0.8, -0.3]]); // prettier-ignore
const rates = [[0, 1, 0, 0], [2, 0, 0, 0], [0, 0, 0, 0.5], [0, 0, 0.7, 0]]; // prettier-ignore

const MODELS = [
  [
    'a driven qubit, without symmetry',
    { algebra: [2], generator: { form: 'lindblad', hamiltonian: writeMatrix(turn), jumps: [{ matrix: writeMatrix(down), rate: 1 }, { matrix: writeMatrix(up), rate: 0.3 }] } },
    lindbladGenerator({ algebra: blockAlgebra([2]), hamiltonian: turn, jumps: [{ matrix: down, rate: 1 }, { matrix: up, rate: 0.3 }] }),
  ],
  [
    'dephasing of a qutrit, not primitive',
    { algebra: [3], generator: { form: 'expectation', onto: { diagonal: true } } },
    expectationGenerator({ algebra: blockAlgebra([3]), onto: { diagonal: true } }),
  ],
  ['a chain of two components', { algebra: [1, 1, 1, 1], generator: { form: 'rates', rates } }, ratesGenerator(rates)],
] as const; // prettier-ignore

describe('the flow against SciPy’s matrix exponential and the reference’s entropies', () => {
  const until = 2.5;
  const cases = MODELS.map(([name, model, generator]) => {
    const structure = analyse(generator);
    const rho = randomState(structure.algebra, random);
    return { name, model, rho, ...descend(structure, rho, { until, points: 6 }) };
  });
  const answers = referenceAnswers(
    cases.flatMap(({ model, rho, points }) => [
      { what: 'limit_state', model, state: writeMatrix(rho) },
      ...points.flatMap(({ time: t, state }) => [
        { what: 'expm_state', model, t, state: writeMatrix(rho) },
        { what: 'entropy', model, state: writeMatrix(state) },
      ]),
    ]),
  );

  cases.forEach(({ name, limit, points }, c) => {
    it(name, () => {
      const [limitAnswer, ...rest] = answers().slice(13 * c, 13 * (c + 1));
      const read = (value: unknown) => fromRows((value as WrittenMatrix).re, (value as WrittenMatrix).im);
      expectBelow(frobeniusNorm(subtract(read(limitAnswer.value), limit)), 1e-12, 'E†ρ');
      expect(points).toHaveLength(6);
      points.forEach(({ time, state, entropy, production }, k) => {
        const [moved, entropies] = rest.slice(2 * k, 2 * k + 2);
        expectBelow(frobeniusNorm(subtract(read(moved.value), state)), 1e-12, `state at t = ${time}`);
        expectClose(entropy, numberOf(entropies.value), 1e-12, `D at t = ${time}`);
        expectClose(production, numberOf(entropies.production), 1e-11, `I at t = ${time}`);
      });
    });
  });
});
