import { type BlockAlgebra, type Random, blockAlgebra, diagonal, seededRandom } from '@thalweg/core';
import { type LoadedModel, type ModelDocument, encodeMatrix, loadModel } from '@thalweg/format';
import {
  balancedForm,
  daviesForm,
  lindbladForm,
  randomHermitian,
  ratesForm,
  superoperatorForm,
} from './random-forms.js';

/** A model as a document, which both programs read. */
export interface RandomModel extends LoadedModel {
  readonly name: string;
  /** GNS-symmetric by construction. */
  readonly symmetric: boolean;
  /** Draws what is asked of the model. */
  readonly random: Random;
}

/** Twenty seeded models over seven generator forms, on algebras of one to five blocks with N ≤ 6. */
export function randomModels(): RandomModel[] {
  return [...LINDBLAD, ...BALANCED, ...CHAINS, ...DAVIES, ...SUPEROPERATORS, ...COMBINATIONS];
}

const LINDBLAD = [[2], [3], [4], [2, 1]].map((blocks) => randomModel('lindblad', blocks, false, lindbladForm));

const BALANCED = [[2], [3], [2, 1], [2, 2], [1, 1, 2]].map((blocks) =>
  randomModel('balanced', blocks, true, balancedForm),
);

const CHAINS = [
  randomModel('rates, not reversible', [1, 1, 1, 1], false, (random) => ratesForm(random, 4, false)),
  randomModel('rates, reversible', [1, 1, 1, 1, 1], true, (random) => ratesForm(random, 5, true)),
];

const DAVIES = [
  randomModel('davies, ohmic', [3], true, (random, algebra) =>
    daviesForm(random, algebra, { kind: 'ohmic', strength: 0.6, cutoff: 3 }),
  ),
  randomModel('davies, metropolis', [2, 2], true, (random, algebra) =>
    daviesForm(random, algebra, { kind: 'metropolis', strength: 0.4 }),
  ),
  randomModel('davies, flat, on a ladder', [4], true, (random, algebra) =>
    daviesForm(random, algebra, { kind: 'flat', strength: 0.5 }, diagonal([0, 0.5, 1, 1.5])),
  ),
];

const SUPEROPERATORS = [
  randomModel('superoperator of L, rows', [3], false, (random) => superoperatorForm(random, 3, 'heisenberg', 'rows')),
  randomModel('superoperator of L†, columns', [2], false, (random) =>
    superoperatorForm(random, 2, 'schrodinger', 'columns'),
  ),
];

const COMBINATIONS = [
  randomModel('sum', [3], false, (random, algebra) => ({
    form: 'sum',
    terms: [
      { weight: 0.7, generator: balancedForm(random, algebra) },
      { weight: 0.4, generator: lindbladForm(random, algebra) },
    ],
  })),
  randomModel('sum, tracial', [3], true, (random, algebra) => ({
    form: 'sum',
    terms: [
      { weight: 0.5, generator: { form: 'expectation', onto: { diagonal: true } } },
      {
        weight: 1.5,
        generator: { form: 'lindblad', jumps: [{ matrix: encodeMatrix(randomHermitian(random, algebra)) }] },
      },
    ],
  })),
  randomModel('tensor with a chain', [2, 2], true, (random) => ({
    form: 'tensor',
    factors: [
      { algebra: [2], generator: balancedForm(random, blockAlgebra([2])) },
      { generator: ratesForm(random, 2, true) },
    ],
  })),
  randomModel('tensor with blocks', [4, 2], true, (random) => ({
    form: 'tensor',
    factors: [
      { algebra: [2, 1], generator: balancedForm(random, blockAlgebra([2, 1])) },
      { algebra: [2], generator: balancedForm(random, blockAlgebra([2])) },
    ],
  })),
];

function randomModel(
  name: string,
  blocks: readonly number[],
  symmetric: boolean,
  form: (random: Random, algebra: BlockAlgebra) => ModelDocument['generator'],
): RandomModel {
  const title = `${name}, blocks [${blocks.join()}]`;
  const random = seededRandom(title);
  const document = { schema: 'thalweg.model/1', algebra: [...blocks], generator: form(random, blockAlgebra(blocks)) };
  return { ...loadModel(document), name: title, symmetric, random };
}
