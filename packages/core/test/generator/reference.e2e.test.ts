import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGenerator } from '../../src/generator/apply-generator.js';
import { balancedGenerator } from '../../src/generator/balanced-generator.js';
import { daviesGenerator } from '../../src/generator/davies-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lengthGenerator } from '../../src/generator/length-generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { schurGenerator } from '../../src/generator/schur-generator.js';
import { sumGenerator } from '../../src/generator/sum-generator.js';
import { superoperatorGenerator } from '../../src/generator/superoperator-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import {
  adjoint,
  diagonal,
  frobeniusNorm,
  fromEntries,
  fromRows,
  hermitianPart,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { type WrittenMatrix, referenceAnswers, writeMatrix } from '../helpers/ask-reference.js';
import { spectrum } from '../helpers/expect-spectrum.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

const random = seededRandom('reference');
const hermitian = (n: number) => hermitianPart(randomMatrix(random, n));
const [h3, r3, s3] = [hermitian(3), randomMatrix(random, 3), hermitian(3)];
const down = fromRows([[0, 1], [0, 0]]); // prettier-ignore
const link = fromRows([[0, 0, 1], [0, 0, 2], [0, 0, 0]]); // prettier-ignore
const block = fromEntries(3, 3, (i, j) => (i < 2 && j < 2 ? [s3.re[i * 3 + j], s3.im[i * 3 + j]] : [0, 0]));
const split = diagonal([0.3, 1, 2.2]);
const z = diagonal([1, -1]);
const dephase = fromEntries(4, 4, (i, j) => [i === j && (i === 1 || i === 2) ? -1 : 0, 0]);
const a3 = blockAlgebra([3]);
const balanced = [{ matrix: down, frequency: -1 }, { matrix: adjoint(down), frequency: 1 }]; // prettier-ignore
const gibbs = diagonal([1 / (1 + Math.exp(-1)), Math.exp(-1) / (1 + Math.exp(-1))]);
const rates = [[0, 1, 0.5], [2, 0, 3], [0.25, 1, 0]]; // prettier-ignore
const ohmic = { kind: 'ohmic', cutoff: 4, strength: 0.5 } as const;
const qubitDocument = {
  form: 'balanced',
  state: writeMatrix(gibbs),
  terms: balanced.map((t) => ({ ...t, matrix: writeMatrix(t.matrix) })),
};
const qubit = balancedGenerator({ algebra: blockAlgebra([2]), state: gibbs, terms: balanced });

/** A model document and the generator that the library makes of the same data. */
const MODELS: [string, object, Generator][] = [
  ['lindblad', { algebra: [3], generator: { form: 'lindblad', hamiltonian: writeMatrix(h3), jumps: [{ rate: 0.4, matrix: writeMatrix(r3) }] } }, lindbladGenerator({ algebra: a3, hamiltonian: h3, jumps: [{ rate: 0.4, matrix: r3 }] })],
  ['lindblad between blocks', { algebra: [2, 1], generator: { form: 'lindblad', jumps: [{ matrix: writeMatrix(link) }, { matrix: writeMatrix(adjoint(link)) }, { matrix: writeMatrix(block) }] } }, lindbladGenerator({ algebra: blockAlgebra([2, 1]), jumps: [{ matrix: link }, { matrix: adjoint(link) }, { matrix: block }] })],
  ['balanced', { algebra: [2], generator: qubitDocument }, qubit],
  ['rates', { algebra: [1, 1, 1], generator: { form: 'rates', rates } }, ratesGenerator(rates)],
  ['expectation onto scalars', { algebra: [2, 1], generator: { form: 'expectation', onto: { scalars: true }, rate: 1.5 } }, expectationGenerator({ algebra: blockAlgebra([2, 1]), onto: { scalars: true }, rate: 1.5 })],
  ['expectation onto blocks', { algebra: [3], generator: { form: 'expectation', onto: { blocks: [2, 1] } } }, expectationGenerator({ algebra: a3, onto: { blocks: [2, 1] } })],
  ['expectation onto a span', { algebra: [2], generator: { form: 'expectation', onto: { spannedBy: [writeMatrix(diagonal([1, 1])), writeMatrix(z)] } } }, expectationGenerator({ algebra: blockAlgebra([2]), onto: { spannedBy: [diagonal([1, 1]), z] } })],
  ['schur', { algebra: [3], generator: { form: 'schur', points: [[0, 1], [1, 1], [3, -2]] } }, schurGenerator({ points: [[0, 1], [1, 1], [3, -2]] })], // prettier-ignore
  ['davies', { algebra: [3], generator: { form: 'davies', hamiltonian: writeMatrix(split), couplings: [writeMatrix(s3)], beta: 0.7, spectrum: ohmic } }, daviesGenerator({ algebra: a3, hamiltonian: split, couplings: [s3], beta: 0.7, spectrum: ohmic })],
  ['davies in another basis', { algebra: [3], generator: { form: 'davies', hamiltonian: writeMatrix(h3), couplings: [writeMatrix(s3)], beta: 0.7, spectrum: { kind: 'metropolis' } } }, daviesGenerator({ algebra: a3, hamiltonian: h3, couplings: [s3], beta: 0.7, spectrum: { kind: 'metropolis' } })],
  ['superoperator', { algebra: [2], generator: { form: 'superoperator', matrix: writeMatrix(dephase), picture: 'schrodinger', stacking: 'columns' } }, superoperatorGenerator({ algebra: blockAlgebra([2]), matrix: dephase, picture: 'schrodinger', stacking: 'columns' })],
  ['sum', { algebra: [2], generator: { form: 'sum', terms: [{ weight: 2, generator: qubitDocument }, { weight: 0.5, generator: { form: 'expectation', onto: { diagonal: true } } }] } }, sumGenerator([{ weight: 2, generator: qubit }, { weight: 0.5, generator: expectationGenerator({ algebra: blockAlgebra([2]), onto: { diagonal: true } }) }])],
  ['tensor', { algebra: [4, 2], generator: { form: 'tensor', factors: [{ algebra: [2, 1], generator: { form: 'expectation', onto: { scalars: true } } }, { algebra: [2], generator: qubitDocument }] } }, tensorGenerator([expectationGenerator({ algebra: blockAlgebra([2, 1]), onto: { scalars: true } }), qubit])],
]; // prettier-ignore

const GROUPS = [{ symmetric: 3 }, { dihedral: 4 }, { cyclic: 5 }];
const OBSERVABLES = MODELS.map(([, , { algebra }]) =>
  fromEntries(algebra.size, algebra.size, (i, j) =>
    algebra.blockOf[i] === algebra.blockOf[j] ? [random.normal(), random.normal()] : [0, 0],
  ),
);

describe('every form against the NumPy reference', () => {
  const models = MODELS.flatMap(([, model], k) => [
    { what: 'generator', model, observable: writeMatrix(OBSERVABLES[k]) },
    { what: 'state', model },
    { what: 'symmetry', model },
  ]);
  const groups = GROUPS.map((group) => ({
    what: 'spectrum',
    model: { generator: { form: 'length', group, length: 'word' } },
  }));
  const answers = referenceAnswers([...models, ...groups]);

  MODELS.forEach(([name, , g], k) => {
    it(name, () => {
      const [image, state, symmetry] = answers().slice(3 * k, 3 * k + 3);
      const read = ({ re, im }: WrittenMatrix) => fromRows(re, im);
      const expected = read(image.value as WrittenMatrix);
      const difference = subtract(applyGenerator(g, OBSERVABLES[k]), expected);
      expectBelow(frobeniusNorm(difference), 1e-11 * (1 + frobeniusNorm(expected)), 'L(A)');
      const found = analyse(g);
      const { sigma } = found.state as NonNullable<typeof found.state>;
      expectBelow(frobeniusNorm(subtract(sigma, read(state.value as WrittenMatrix))), 1e-11, 'state');
      expect(found.fixedPoints?.dimension).toBe(state.fixedPoints);
      const reference = symmetry.value as { gns: number; kms: number };
      expect(['tracial', 'GNS'].includes(found.symmetry.kind), 'GNS').toBe(reference.gns < 1e-9);
      expect(['tracial', 'GNS', 'KMS'].includes(found.symmetry.kind), 'KMS').toBe(reference.kms < 1e-9);
    });
  });

  GROUPS.forEach((group, k) => {
    it(`length on ${JSON.stringify(group)}: the same spectrum`, () => {
      const expected = (answers()[3 * MODELS.length + k].value as { re: number[] }).re;
      const g = lengthGenerator({ group, length: 'word' });
      expectAllClose(
        spectrum(g),
        [...expected].sort((a, b) => a - b),
        1e-7,
        'eigenvalue',
      );
    });
  });
});
