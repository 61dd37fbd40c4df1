import { describe, expect, it } from 'vitest';
import { blockAlgebra, projectToAlgebra } from '../../src/algebra/block-algebra.js';
import type { BathSpectrum } from '../../src/generator/bath-spectrum.js';
import { bathRate } from '../../src/generator/bath-spectrum.js';
import { type DaviesForm, daviesGenerator } from '../../src/generator/davies-generator.js';
import { generatorMatrix } from '../../src/generator/apply-generator.js';
import { clusterMiddles } from '../../src/generator/cluster-values.js';
import {
  adjoint,
  diagonal,
  frobeniusNorm,
  fromRows,
  hermitianPart,
  scale,
  subtract,
  trace,
} from '../../src/linalg/complex-matrix.js';
import { hermitianExp } from '../../src/linalg/matrix-function.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

const SPECTRA: BathSpectrum[] = [
  { kind: 'flat' },
  { kind: 'flat', strength: 2.5 },
  { kind: 'ohmic', cutoff: 3 },
  { kind: 'metropolis', strength: 0.7 },
];
const beta = 0.8;
const x = fromRows([[0, 1], [1, 0]]); // prettier-ignore
const qubit: DaviesForm = {
  algebra: blockAlgebra([2]),
  hamiltonian: diagonal([0, 1]),
  couplings: [x],
  beta,
  spectrum: { kind: 'flat' },
};

describe('bathRate', () => {
  it('satisfies g(−ω) = e^{−βω} g(ω)', () => {
    for (const spectrum of SPECTRA) {
      const g = bathRate(spectrum, beta, 1e-9);
      for (const w of [0, 1e-6, 0.3, 1, 4]) {
        expectClose(g(-w), Math.exp(-beta * w) * g(w), 1e-14 * g(w), `${spectrum.kind} at ${w}`);
      }
    }
  });

  it('has the values of its definition, and the ohmic limit strength/β at 0', () => {
    expectClose(bathRate({ kind: 'flat', strength: 2 }, 0, 0)(5), 1, 1e-15, 'flat at infinite temperature');
    expectClose(bathRate({ kind: 'metropolis' }, beta, 0)(-1), Math.exp(-beta), 1e-15, 'metropolis upward');
    const ohmic = bathRate({ kind: 'ohmic', cutoff: 2, strength: 3 }, beta, 1e-9);
    expectClose(ohmic(0), 3 / beta, 1e-14, 'ohmic at 0');
    expectClose(ohmic(1), (3 * Math.exp(-0.5)) / (1 - Math.exp(-beta)), 1e-14, 'ohmic at 1');
    expectClose(ohmic(1e-7), 3 / beta, 1e-6, 'ohmic near 0');
  });

  it('fills in the other side of a table', () => {
    const g = bathRate({ kind: 'table', values: [[1, 2], [0, 0.5]] }, beta, 1e-9); // prettier-ignore
    expectClose(g(-1), 2 * Math.exp(-beta), 1e-15, 'upward');
    expect(g(0)).toBe(0.5);
  });
});

describe('daviesGenerator', () => {
  it('is GNS-symmetric for the Gibbs state with every spectrum, on full and split algebras', () => {
    const random = seededRandom('davies');
    for (const spectrum of SPECTRA) {
      for (const blocks of [[3], [2, 1], [4]]) {
        // prettier-ignore
        const algebra = blockAlgebra(blocks);
        const h = projectToAlgebra(algebra, hermitianPart(randomMatrix(random, algebra.size)));
        const inside = projectToAlgebra(algebra, hermitianPart(randomMatrix(random, algebra.size)));
        const g = daviesGenerator({ algebra, hamiltonian: h, couplings: [inside], beta, spectrum });
        const { symmetry, state, canonical, markov } = analyse(g);
        const what = `${spectrum.kind} on [${blocks.join()}]`;
        expect(markov.completelyPositive.holds, what).toBe(true);
        expect(symmetry.kind, what).toBe('GNS');
        expectBelow(canonical?.residual ?? NaN, 1e-11, what);
        const boltzmann = hermitianExp(scale(h, -beta));
        const gibbs = scale(boltzmann, 1 / trace(boltzmann).re);
        expectBelow(
          frobeniusNorm(subtract((state as NonNullable<typeof state>).sigma, gibbs)),
          1e-13,
          `${what}: Gibbs`,
        );
      }
    }
  });

  it('groups the equal spacings of a ladder into one jump', () => {
    const ladder = fromRows([[0, 1, 0], [1, 0, 2], [0, 2, 0]]); // prettier-ignore
    const g = daviesGenerator({
      algebra: blockAlgebra([3]),
      hamiltonian: diagonal([0, 1, 2 + 1e-12]),
      couplings: [ladder],
      beta,
      spectrum: { kind: 'flat' },
    });
    expect(g.jumps.map((jump) => jump.label)).toEqual(['S1(-1)', 'S1(1)']);
    const split = daviesGenerator({
      algebra: blockAlgebra([3]),
      hamiltonian: diagonal([0, 1, 2.1]),
      couplings: [ladder],
      beta,
      spectrum: { kind: 'flat' },
    });
    expect(split.jumps.length).toBe(4);
  });

  it('cools faster than it heats, in the ratio of detailed balance', () => {
    const [up, down] = daviesGenerator(qubit).jumps;
    // S(1) takes level 1 to level 0.
    expect([...down.matrix.colIndex]).toEqual([1]);
    expectClose(up.matrix.re[0] ** 2 / down.matrix.re[0] ** 2, Math.exp(-beta), 1e-14, 'ratio of rates');
  });

  it('takes couplings that are closed under adjoints as a set', () => {
    const lower = fromRows([[0, 1], [0, 0]]); // prettier-ignore
    const pair = daviesGenerator({ ...qubit, couplings: [lower, adjoint(lower)] });
    expectAllClose(generatorMatrix(pair), generatorMatrix(daviesGenerator(qubit)), 1e-14);
  });

  it('names what is wrong', () => {
    const make = (change: Partial<DaviesForm>) => () => daviesGenerator({ ...qubit, ...change });
    expectError(make({ beta: NaN }), 'not-finite', /inverse temperature/, '/generator/beta');
    expectError(make({ hamiltonian: fromRows([[0, 1], [0, 0]]) }), 'not-hermitian', /Hamiltonian/, '/generator/hamiltonian'); // prettier-ignore
    expectError(make({ couplings: [fromRows([[0, 1], [0, 0]])] }), 'not-symmetric', /give S\* with every S/, '/generator/couplings'); // prettier-ignore
    expectError(
      make({ algebra: blockAlgebra([1, 1]), hamiltonian: x }),
      'algebra-not-preserved',
      /Hamiltonian inside the blocks/,
      '/generator/hamiltonian',
    );
    const degenerate = { algebra: blockAlgebra([1, 1]), hamiltonian: diagonal([0, 0]), couplings: [fromRows([[0.5, 1], [1, -0.5]])] }; // prettier-ignore
    expectError(make(degenerate), 'algebra-not-preserved', /outside the blocks/, '/generator/couplings');
    expectError(
      make({ spectrum: { kind: 'flat', strength: -1 } }),
      'negative-rate',
      /strength/,
      '/generator/spectrum/strength',
    );
    expectError(
      make({ spectrum: { kind: 'ohmic', cutoff: 0 } }),
      'usage',
      /cutoff to be positive, got 0/,
      '/generator/spectrum/cutoff',
    );
    expectError(
      make({ beta: 0, spectrum: { kind: 'ohmic', cutoff: 1 } }),
      'usage',
      /ohmic bath to be positive/,
      '/generator/beta',
    );
    expectError(make({ spectrum: { kind: 'table', values: [[1, 1], [-1, 1]] } }), 'spectrum-not-balanced', /at ω = 1, got 1; leave one/, '/generator/spectrum/values/0'); // prettier-ignore
    expectError(
      make({ spectrum: { kind: 'table', values: [[2, 1]] } }),
      'spectrum-not-balanced',
      /list the Bohr frequency -1 or its negative/,
      '/generator/spectrum/values',
    );
    expectError(
      make({ spectrum: { kind: 'table', values: [[1, -1]] } }),
      'negative-rate',
      /a rate/,
      '/generator/spectrum/values/0/1',
    );
  });
});

describe('clusterMiddles', () => {
  it('joins neighbours within the tolerance and keeps the order and the sign symmetry', () => {
    expectAllClose(
      clusterMiddles(Float64Array.of(3, 1, 1.05, -1, -1.05, 0), 0.1),
      [3, 1.025, 1.025, -1.025, -1.025, 0],
      1e-15,
    );
    expect(clusterMiddles(new Float64Array(0), 1).length).toBe(0);
  });
});
