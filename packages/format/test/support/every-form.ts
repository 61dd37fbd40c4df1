import type { ModelDocument } from '../../src/model/model-document.js';

const X = { pauli: 'X' };
const lower = [
  [0, 1],
  [0, 0],
];
const raise = [
  [0, 0],
  [1, 0],
];
/** σ with frequency log(σ_22/σ_11) = log 3 for e_12. */
const thermal = [
  [0.25, 0],
  [0, 0.75],
];

function model(generator: ModelDocument['generator'], algebra?: number[]): ModelDocument {
  return { schema: 'thalweg.model/1', ...(algebra && { algebra }), generator };
}

/** A valid model of each generator form and variant. */
export const EVERY_FORM: Record<string, ModelDocument> = {
  lindblad: model(
    {
      form: 'lindblad',
      hamiltonian: { pauli: { Z: 0.5, X: -1 } },
      jumps: [{ label: 'decay', rate: 2, matrix: lower }, { matrix: { re: raise, im: lower } }],
    },
    [2],
  ),
  balanced: model(
    {
      form: 'balanced',
      state: thermal,
      terms: [
        { label: 'V1', matrix: lower, frequency: Math.log(3) },
        { label: 'V2', matrix: raise, frequency: -Math.log(3) },
      ],
    },
    [2],
  ),
  rates: model({
    form: 'rates',
    rates: [
      [0, 1],
      [2, -2],
    ],
  }),
  'expectation onto scalars': model({ form: 'expectation', onto: { scalars: true }, rate: 3 }, [3]),
  'expectation onto the diagonal': model({ form: 'expectation', onto: { diagonal: true } }, [2]),
  'expectation onto blocks': model({ form: 'expectation', onto: { blocks: [1, 2] } }, [3]),
  'expectation onto a span': model({ form: 'expectation', onto: { spannedBy: [{ pauli: 'I' }, X] } }, [2]),
  'length, cyclic': model({ form: 'length', group: { cyclic: 4 }, length: 'word' }),
  'length, dihedral': model({ form: 'length', group: { dihedral: 3 }, length: [0, 1, 1, 1, 1, 1] }),
  'length, symmetric': model({ form: 'length', group: { symmetric: 3 }, length: [0, 1, 1, 1, 1, 1] }),
  'length, table': model({
    form: 'length',
    group: {
      table: [
        [0, 1],
        [1, 0],
      ],
    },
    length: [0, 1],
  }),
  schur: model({
    form: 'schur',
    points: [
      [0, 0],
      [1, 0],
      [0, 2],
    ],
  }),
  'davies, flat': davies({ kind: 'flat', strength: 1 }),
  'davies, ohmic': davies({ kind: 'ohmic', strength: 1, cutoff: 5 }),
  'davies, ohmic without cutoff': davies({ kind: 'ohmic', strength: 1 }),
  'davies, metropolis': davies({ kind: 'metropolis', strength: 0.5 }),
  'davies, table': davies({
    kind: 'table',
    values: [
      [0, 1],
      [2, 3],
    ],
  }),
  superoperator: model(
    {
      form: 'superoperator',
      matrix: [
        [0, 0, 0, 0],
        [0, -1, 0, 0],
        [0, 0, -1, 0],
        [0, 0, 0, 0],
      ],
      picture: 'schrodinger',
      stacking: 'columns',
    },
    [2],
  ),
  sum: model(
    {
      form: 'sum',
      terms: [
        { weight: 0.5, generator: { form: 'expectation', onto: { scalars: true } } },
        { weight: 2, generator: { form: 'schur', points: [[0], [1]] } },
      ],
    },
    [2],
  ),
  tensor: model({
    form: 'tensor',
    factors: [
      { generator: { form: 'schur', points: [[0], [1]] } },
      {
        schema: 'thalweg.model/1',
        title: 'one of two',
        algebra: [2],
        generator: { form: 'lindblad', jumps: [{ matrix: X }] },
      },
    ],
  }),
};

function davies(spectrum: Extract<ModelDocument['generator'], { form: 'davies' }>['spectrum']): ModelDocument {
  return model({ form: 'davies', hamiltonian: { pauli: 'Z' }, couplings: [X], beta: 0.5, spectrum }, [2]);
}
