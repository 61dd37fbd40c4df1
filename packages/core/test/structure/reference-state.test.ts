import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGeneratorAdjoint, generatorMatrix } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { withDeclaredState } from '../../src/generator/declared-state.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { birthDeath, dephasing, localDepolarising, truncatedOscillator } from '../../src/families/index.js';
import {
  diagonal,
  frobeniusNorm,
  fromEntries,
  fromRows,
  hermitianPart,
  identity,
  multiplyAdjointFirst,
  scale,
  subtract,
  trace,
} from '../../src/linalg/complex-matrix.js';
import { expmAction } from '../../src/linalg/expm-action.js';
import { fromCoordinates, toCoordinates } from '../../src/algebra/block-algebra.js';
import { generatorNormBound } from '../../src/generator/generator-norm.js';
import { seededRandom } from '../../src/random.js';
import { referenceState } from '../../src/structure/reference-state.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

function randomLindblad(seed: number, n: number, jumps = 3): Generator {
  const random = seededRandom(seed);
  return lindbladGenerator({
    algebra: blockAlgebra([n]),
    hamiltonian: hermitianPart(randomMatrix(random, n)),
    jumps: Array.from({ length: jumps }, () => ({ matrix: randomMatrix(random, n) })),
  });
}

describe('referenceState, computed', () => {
  it('is invariant, positive, of trace one for random generators', () => {
    for (let seed = 0; seed < 8; seed++) {
      const g = randomLindblad(seed, 2 + (seed % 4));
      const state = referenceState(g);
      expect(state).toMatchObject({ declared: false, faithful: true });
      expectBelow(frobeniusNorm(applyGeneratorAdjoint(g, state.sigma)), 1e-12 * generatorNormBound(g), 'L†σ');
      expectClose(trace(state.sigma).re, 1, 1e-14, 'trace');
    }
  });

  it('has eigenvectors that diagonalise σ, each in its block', () => {
    const g = tensorGenerator([randomLindblad(5, 2), ratesGenerator([[0, 1], [3, 0]])]); // prettier-ignore
    const { sigma, vectors, values } = referenceState(g);
    const n = sigma.rows;
    const rebuilt = fromEntries(n, n, (i, j) => {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const [ar, ai, br, bi] = [
          vectors.re[i * n + k],
          vectors.im[i * n + k],
          vectors.re[j * n + k],
          -vectors.im[j * n + k],
        ];
        re += values[k] * (ar * br - ai * bi);
        im += values[k] * (ar * bi + ai * br);
      }
      return [re, im];
    });
    expectBelow(frobeniusNorm(subtract(rebuilt, sigma)), 1e-14, 'UΛU* − σ');
    expectBelow(frobeniusNorm(subtract(multiplyAdjointFirst(vectors, vectors), identity(n))), 1e-14, 'U*U − 1');
    vectors.re.forEach((x, at) => {
      if (g.algebra.blockOf[Math.floor(at / n)] !== g.algebra.blockOf[at % n])
        expect(Math.abs(x) + Math.abs(vectors.im[at])).toBe(0);
    });
  });

  it('is 1/N when that is invariant, also where other states are', () => {
    const state = referenceState({ ...dephasing(3), declaredState: null });
    expectAllClose(state.values, [1 / 3, 1 / 3, 1 / 3], 0, 'weights');
    expect(state.exact).toBe(true);
  });

  it('keeps tiny weights to full relative accuracy where L† preserves diagonal matrices', () => {
    const beta = 3;
    const levels = 14;
    const declared = truncatedOscillator({ levels, beta });
    const { values, exact, faithful } = referenceState({ ...declared, declaredState: null });
    expect({ exact, faithful }).toEqual({ exact: true, faithful: true });
    for (let k = 1; k < levels; k++) expectClose(Math.log(values[k - 1] / values[k]), beta, 1e-13, `log ratio at ${k}`);
  });

  it('agrees with detailed balance of a birth–death chain', () => {
    const births = [1, 2, 0.5, 1e-6];
    const deaths = [3, 1, 2, 1];
    const { values } = referenceState(birthDeath(births, deaths));
    births.forEach((b, x) => expectClose((values[x] * b) / (values[x + 1] * deaths[x]), 1, 1e-14, `balance at ${x}`));
  });

  it('is the limit of the flow for reducible chains: mass goes where it is absorbed', () => {
    // 0 ↔ 1 closed, 2 closed, 3 leaves with rate 1 to 1 and rate 3 to 2.
    const g = ratesGenerator([[0, 1, 0, 0], [1, 0, 0, 0], [0, 0, 0, 0], [0, 1, 3, 0]]); // prettier-ignore
    const state = referenceState(g);
    expectAllClose(state.values, [0.28125, 0.28125, 0.4375, 0], 1e-15, 'weight');
    expect(state.faithful).toBe(false);
  });

  it('is the limit of the flow for a decaying qubit pair with several invariant states', () => {
    const lower = fromRows([[0, 1, 0], [0, 0, 0], [0, 0, 0]]); // prettier-ignore
    const mix = fromRows([[0, 0.3, 1], [0, 0, 0], [0, 0, 0]]); // prettier-ignore
    const g = lindbladGenerator({ algebra: blockAlgebra([3]), jumps: [{ matrix: lower }, { matrix: mix }] });
    const { sigma } = referenceState(g);
    const bound = generatorNormBound(g);
    const start = toCoordinates(g.algebra, scale(identity(3), 1 / 3));
    const flow = (x: Float64Array) => toCoordinates(g.algebra, applyGeneratorAdjoint(g, fromCoordinates(g.algebra, x)));
    const late = fromCoordinates(g.algebra, expmAction(flow, 600 / bound, start, bound));
    expectBelow(frobeniusNorm(subtract(late, sigma)), 1e-9, 'e^{tL†}(1/N) − σ');
  });

  it('agrees between factors and a Krylov space on a large algebra', () => {
    const small = randomLindblad(3, 2);
    const pieces = [small, localDepolarising(5)];
    const product = tensorGenerator(pieces);
    const flattened: Generator = { ...product, origin: { kind: 'lindblad' } };
    const bySearch = referenceState(flattened);
    expectBelow(frobeniusNorm(subtract(bySearch.sigma, referenceState(product).sigma)), 1e-12, 'Krylov − product');
  });
});

describe('referenceState, declared', () => {
  const qubit = lindbladGenerator({
    algebra: blockAlgebra([2]),
    jumps: [{ matrix: fromRows([[0, 1], [0, 0]]), rate: 3 }, { matrix: fromRows([[0, 0], [1, 0]]) }], // prettier-ignore
  });

  it('is used as given', () => {
    const state = referenceState(withDeclaredState(qubit, diagonal([0.75, 0.25])));
    expect(state).toMatchObject({ declared: true, faithful: true, smallest: 0.25, exact: true });
  });

  it('is refused when it moves', () => {
    expectError(
      () => referenceState(withDeclaredState(qubit, diagonal([0.5, 0.5]))),
      'state-not-invariant',
      /leave "state" out/,
      '/state',
    );
  });

  it('is refused when it is no state', () => {
    expectError(
      () => withDeclaredState(qubit, diagonal([1.25, -0.25])),
      'state-not-positive',
      /eigenvalue -0\.25/,
      '/state',
    );
    expectError(
      () => withDeclaredState(qubit, diagonal([0.75, 0.75])),
      'state-not-positive',
      /trace 1, got 1\.5/,
      '/state',
    );
    expectError(() => withDeclaredState(qubit, fromRows([[0.5, 1], [0, 0.5]])), 'not-hermitian', /a state to be Hermitian/, '/state'); // prettier-ignore
    expectError(
      () => withDeclaredState(qubit, diagonal([1, 0, 0])),
      'dimension-mismatch',
      /2×2 matrix, got 3×3/,
      '/state',
    );
    expectError(() => withDeclaredState(qubit, diagonal([NaN, 1])), 'not-finite', /NaN/, '/state');
    const chain = ratesGenerator([[0, 1], [1, 0]]); // prettier-ignore
    const coherent = fromRows([[0.5, 0.1], [0.1, 0.5]]); // prettier-ignore
    expectError(() => withDeclaredState(chain, coherent), 'dimension-mismatch', /modulus 0\.100 outside/, '/state');
  });

  it('may be any invariant state of a generator that has several', () => {
    const g = withDeclaredState({ ...dephasing(2), declaredState: null }, diagonal([0.9, 0.1]));
    expectAllClose(referenceState(g).values, [0.9, 0.1], 0, 'weight');
    expect(generatorMatrix(g).length).toBe(16);
  });
});
