import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { balancedGenerator } from '../../src/generator/balanced-generator.js';
import { generatorMatrix } from '../../src/generator/apply-generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  diagonal,
  fromRows,
  scale,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { formulaResidual } from '../helpers/canonical-formula.js';
import { expectError } from '../helpers/expect-error.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

const down = fromRows([[0, 1], [0, 0]]); // prettier-ignore
const beta = Math.log(3);
const algebra = blockAlgebra([2]);
const state = diagonal([0.75, 0.25]);
const pair = [{ label: 'down', matrix: down, frequency: -beta }, { matrix: adjoint(down), frequency: beta }]; // prettier-ignore

describe('balancedGenerator', () => {
  it('is its formula', () => {
    for (let seed = 0; seed < 6; seed++) {
      const { generator, terms } = randomBalancedGenerator(
        blockAlgebra([[3], [2, 1], [2, 2]][seed % 3]),
        seededRandom(`balanced ${seed}`),
      );
      expectBelow(formulaResidual(generator, terms), 1e-13, `seed ${seed}`);
    }
  });

  it('keeps labels and declares the state', () => {
    const g = balancedGenerator({ algebra, state, terms: pair });
    expect(g.jumps.map((jump) => jump.label)).toEqual(['down', undefined]);
    expect(g.declaredState?.re[0]).toBe(0.75);
    expect(g.origin.kind).toBe('balanced');
  });

  it('does not depend on how a frequency space is mixed', () => {
    const random = seededRandom('mixing');
    const qutrit = blockAlgebra([3]);
    const sigma = diagonal([0.6, 0.2, 0.2]);
    const list = [fromRows([[0, 1, 0], [0, 0, 0], [0, 0, 0]]), fromRows([[0, 0, 2], [0, 0, 0], [0, 0, 0]])]; // prettier-ignore
    const u = randomUnitary(random, 2);
    const combined = (k: number): ComplexMatrix => {
      const out = zeros(3);
      list.forEach((v, j) => addScaledInto(out, v, u.re[k * 2 + j], u.im[k * 2 + j]));
      return out;
    };
    const mixed = [combined(0), combined(1)];
    const build = (lowering: ComplexMatrix[], raising: ComplexMatrix[]) =>
      balancedGenerator({
        algebra: qutrit,
        state: sigma,
        terms: [
          ...lowering.map((matrix) => ({ matrix, frequency: -beta })),
          ...raising.map((matrix) => ({ matrix: adjoint(matrix), frequency: beta })),
        ],
      });
    // Only one side mixed: still closed under adjoints as a space, and the same generator.
    expectAllClose(generatorMatrix(build(mixed, list)), generatorMatrix(build(list, list)), 1e-14);
  });

  it('names what is wrong', () => {
    expectError(
      () => balancedGenerator({ algebra, state: diagonal([1, 0]), terms: pair }),
      'state-not-positive',
      /positive definite reference state/,
      '/generator/state',
    );
    expectError(
      () => balancedGenerator({ algebra, state: diagonal([1, 1]), terms: pair }),
      'state-not-positive',
      /trace 1, got 2/,
      '/generator/state',
    );
    expectError(
      () => balancedGenerator({ algebra, state, terms: [{ matrix: down, frequency: beta }, pair[1]] }),
      'spectrum-not-balanced',
      /for term 0, got a relative residual/,
      '/generator/terms/0/frequency',
    );
    expectError(
      () => balancedGenerator({ algebra, state, terms: [pair[0]] }),
      'not-symmetric',
      /term 0 has no partner of frequency 1\.09861/,
      '/generator/terms',
    );
    expectError(
      () =>
        balancedGenerator({ algebra, state, terms: [pair[0], { matrix: scale(adjoint(down), 2), frequency: beta }] }),
      'not-symmetric',
      /closed under adjoints/,
      '/generator/terms',
    );
    expectError(
      () => balancedGenerator({ algebra, state, terms: [{ matrix: down, frequency: NaN }] }),
      'not-finite',
      /a frequency/,
      '/generator/terms/0/frequency',
    );
    const chain = blockAlgebra([1, 1]);
    const x = { matrix: fromRows([[0.3, 1], [1, -0.3]]), frequency: 0 }; // prettier-ignore
    expectError(
      () => balancedGenerator({ algebra: chain, state: diagonal([0.5, 0.5]), terms: [x] }),
      'algebra-not-preserved',
      /outside the blocks/,
      '/generator',
    );
  });
});
