import { FLIP, model, qubit } from './refusal.js';

/** Name, content of m.json, and the parts of the message that refuses it with 65. */
export type BadModel = readonly [name: string, content: string | Uint8Array | object, ...says: string[]];

/** Documents of the wrong shape. */
export const SHAPES: readonly BadModel[] = [
  ['a list', [1, 2], 'expected an object, got a list of 2; correct the document (at the top of m.json)'],
  [
    'an unknown field',
    { ...qubit([]), alegbra: [2] },
    'expected only the fields schema, title, algebra, generator, state, provenance, got "alegbra"; remove it or correct its spelling (at /alegbra of m.json)',
  ],
  [
    'an unknown form',
    model({ algebra: [2], generator: { form: 'linblad', jumps: [] } }),
    'expected one of "lindblad"',
    'got the text "linblad"; correct',
    '(at /generator/form of m.json)',
  ],
  [
    'another version of the schema',
    { ...qubit([]), schema: 'thalweg.model/2' },
    'expected "thalweg.model/1", got the text "thalweg.model/2"; correct',
    '(at /schema of m.json)',
  ],
  [
    'no algebra',
    model({ generator: { form: 'lindblad', jumps: [] } }),
    'expected "algebra", the block sizes',
    'got nothing; write',
    '(at /algebra of m.json)',
  ],
  [
    'a ragged matrix',
    qubit([{ matrix: [[0, 1], [1]] }]),
    'expected 2 entries in row 1 as in row 0, got 1; make all rows equally long (at /generator/jumps/0/matrix/1 of m.json)',
  ],
  [
    'text in a matrix',
    qubit([
      {
        matrix: [
          ['0', '1'],
          ['1', '0'],
        ],
      },
    ]),
    'expected a number, got the text "0"; write a number',
    '(at /generator/jumps/0/matrix/0/0 of m.json)',
  ],
  [
    'a Hamiltonian that is not Hermitian',
    qubit([], {
      hamiltonian: [
        [0, 1],
        [0, 0],
      ],
    }),
    'expected the Hamiltonian to be Hermitian, got ‖A−A*‖ = 1.41; check',
    '(at /generator/hamiltonian of m.json)',
  ],
  [
    'a matrix that does not fit the algebra',
    qubit([
      {
        matrix: [
          [0, 1, 0],
          [0, 0, 0],
          [0, 0, 0],
        ],
      },
    ]),
    'expected a 2×2 matrix, got 3×3; correct it or "algebra" (at /generator/jumps/0/matrix of m.json)',
  ],
  [
    'a Pauli string of another length',
    qubit([{ matrix: { pauli: 'XX' } }]),
    'expected a 2×2 matrix, got 4×4;',
    '(at /generator/jumps/0/matrix of m.json)',
  ],
];

/** Documents of the right shape that describe no semigroup, or another one than they say. */
export const MEANINGS: readonly BadModel[] = [
  [
    'a negative rate',
    qubit([{ rate: -1, matrix: FLIP }]),
    'expected a rate to be at least 0, got -1; change its sign or remove it (at /generator/jumps/0/rate of m.json)',
  ],
  [
    'a negative rate of a chain',
    model({
      generator: {
        form: 'rates',
        rates: [
          [0, -1],
          [1, 0],
        ],
      },
    }),
    'expected a rate of at least 0 from 0 to 1, got -1; change its sign (at /generator/rates/0/1 of m.json)',
  ],
  [
    'a state that is not positive',
    {
      ...qubit([{ matrix: FLIP }]),
      state: [
        [1.5, 0],
        [0, -0.5],
      ],
    },
    'expected a positive state, got the eigenvalue -0.5;',
    '(at /state of m.json)',
  ],
  [
    'a state of trace two',
    {
      ...qubit([{ matrix: FLIP }]),
      state: [
        [1, 0],
        [0, 1],
      ],
    },
    'expected a state of trace 1, got 2; divide it by its trace (at /state of m.json)',
  ],
  [
    'a state that is not invariant',
    {
      ...qubit([{ matrix: FLIP }]),
      state: [
        [0.7, 0],
        [0, 0.3],
      ],
    },
    'expected the declared state to be invariant, got ‖L†σ‖ = ',
    '; leave "state" out to have an invariant state computed (at /state of m.json)',
  ],
  [
    'a length that is not conditionally negative: n − number of cycles on S₃',
    model({ generator: { form: 'length', group: { symmetric: 3 }, length: [0, 1, 1, 2, 2, 1] } }),
    'to be positive semidefinite, got the eigenvalue -0.645751; ',
    'conditionally negative (at /generator/length of m.json)',
  ],
  [
    'a length that does not vanish at the identity',
    model({ generator: { form: 'length', group: { cyclic: 2 }, length: [1, 1] } }),
    'expected ℓ = 0 at the identity, element 0, got 1; check',
    '(at /generator/length/0 of m.json)',
  ],
  [
    'a bath spectrum that violates detailed balance',
    model({
      algebra: [2],
      generator: {
        form: 'davies',
        hamiltonian: [
          [0, 0],
          [0, 1],
        ],
        couplings: [FLIP],
        beta: 1,
        spectrum: {
          kind: 'table',
          values: [
            [1, 1],
            [-1, 0.5],
          ],
        },
      },
    }),
    'expected g(−ω) = e^{−βω}g(ω) = 0.36787',
    'at ω = 1, got 0.5; leave one of ±ω out',
    '(at /generator/spectrum/values/0 of m.json)',
  ],
  [
    'a jump of another frequency than stated',
    model({
      algebra: [2],
      generator: {
        form: 'balanced',
        state: [
          [0.7, 0],
          [0, 0.3],
        ],
        terms: [
          {
            matrix: [
              [0, 1],
              [0, 0],
            ],
            frequency: 3,
          },
          {
            matrix: [
              [0, 0],
              [1, 0],
            ],
            frequency: -3,
          },
        ],
      },
    }),
    'expected σVσ⁻¹ = e^{−ω}V with ω = 3 for term 0, got a relative residual of 0.958; the frequency of',
    '(at /generator/terms/0/frequency of m.json)',
  ],
  [
    'a generator that leaves its algebra',
    model({ algebra: [1, 1], generator: { form: 'lindblad', hamiltonian: FLIP, jumps: [] } }),
    'expected a generator that maps the algebra with blocks [1, 1] into itself, got entries of',
    '; use the algebra [2]',
    '(at /generator of m.json)',
  ],
  [
    'a generator that is not completely positive',
    model({ algebra: [2], generator: transposition() }),
    'expected a generator of a Markov semigroup, got one that is not: it is not completely positive, smallest eigenvalue -1.00000; thalweg inspect tells more (in m.json)',
  ],
];

/** Transposition minus the identity: positive, not completely positive. */
function transposition(): object {
  const matrix = [
    [0, 0, 0, 0],
    [0, -1, 1, 0],
    [0, 1, -1, 0],
    [0, 0, 0, 0],
  ];
  return { form: 'superoperator', picture: 'heisenberg', stacking: 'rows', matrix };
}
