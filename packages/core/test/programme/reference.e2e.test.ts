import { beforeAll, describe, expect, it } from 'vitest';
import { type Programme } from '../../src/programme/programme.js';
import { type ProgrammeSolution } from '../../src/programme/programme-solution.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow } from '../linalg/support/expect-close.js';
import { diagonalBlock, symmetricBlock, unit } from './support/block.js';
import { depolarisingJumps } from './support/gell-mann.js';
import { liftInstance, smallAnsatz, wideAnsatz } from './support/lift-instance.js';
import { expectOptimal } from './support/optimality.js';
import { randomProgramme, type RandomShape } from './support/random-programme.js';
import { referenceSolutions, type ReferenceAnswer } from './support/reference-solver.js';

const SHAPES: RandomShape[] = [
  ...(['symmetric', 'hermitian'] as const).flatMap((kind) => [
    { sizes: [1], kind, unknowns: 1, density: 1 },
    { sizes: [2], kind, unknowns: 2, density: 1 },
    { sizes: [5], kind, unknowns: 7, density: 1 },
    { sizes: [6, 4, 1], kind, unknowns: 8, density: 0.6 },
    { sizes: [12], kind, unknowns: 20, density: 0.3 },
    { sizes: [25, 10], kind, unknowns: 40, density: 0.1 },
    { sizes: [8], kind, unknowns: 12, density: 1, dualRank: 3 },
    { sizes: [8], kind, unknowns: 12, density: 1, primalRank: 3 },
  ]),
  { sizes: [1], kind: 'diagonal', unknowns: 1, density: 1 },
  { sizes: [12], kind: 'diagonal', unknowns: 5, density: 0.7 },
  { sizes: [30, 10, 2], kind: 'diagonal', unknowns: 20, density: 0.4 },
  { sizes: [40], kind: 'symmetric', unknowns: 120, density: 0.02 },
  { sizes: [6, 7, 8], kind: ['hermitian', 'symmetric', 'diagonal'], unknowns: 10, density: 0.7 },
];

const identity = [
  [1, 0],
  [0, 1],
];

const OTHERS: Record<string, Programme> = {
  'depolarising qubit, small ansatz': liftInstance(depolarisingJumps(2), smallAnsatz(3))!,
  'depolarising qubit, wide ansatz': liftInstance(depolarisingJumps(2), wideAnsatz(3))!,
  'no strictly feasible y': {
    objective: [0.3, 1],
    blocks: [
      symmetricBlock(
        [
          [0, 0],
          [0, 1],
        ],
        unit(2, 0, 1),
        unit(2, 1),
      ),
    ],
  },
};

describe('against CVXOPT', () => {
  const names = [...SHAPES.map((shape) => JSON.stringify(shape)), ...Object.keys(OTHERS)];
  const programmes = [...SHAPES.map((shape, k) => randomProgramme(shape, seededRandom(k))), ...Object.values(OTHERS)];
  let answers: ReferenceAnswer[] = [];
  beforeAll(() => {
    answers = referenceSolutions(programmes);
  });

  it.each(names.map((name, k) => [k, name] as const))('%i: %s', (k) => {
    const solution: ProgrammeSolution = solveProgramme(programmes[k]);
    expect(answers[k].status).toBe('optimal');
    expect(solution.status).toBe('optimal');
    const { primal, dual } = answers[k];
    const scale = Math.max(1, Math.abs(dual!));
    expectBelow(Math.abs(solution.dualObjective - dual!) / scale, 1e-7, 'difference of the optima');
    expectBelow(Math.abs(solution.primalObjective - primal!) / scale, 1e-7, 'difference of the primal values');
    expectOptimal(programmes[k], solution, 1e-7, 'conditions');
  });
});

it('agrees with CVXOPT about what is infeasible', () => {
  const programmes: Programme[] = [
    {
      objective: [1],
      blocks: [
        symmetricBlock(
          identity,
          identity.map((row) => row.map((x) => -x)),
        ),
      ],
    },
    {
      objective: [1, 1],
      blocks: [
        symmetricBlock(
          [
            [-1, 0],
            [0, -1],
          ],
          [
            [1, 0],
            [0, -1],
          ],
          unit(2, 0, 1),
        ),
      ],
    },
    { objective: [1], blocks: [diagonalBlock([1, -2], [1, -1])] },
  ];
  // CVXOPT calls the side with y primal.
  const translated: Record<string, string> = {
    'primal infeasible': 'dual-infeasible',
    'dual infeasible': 'primal-infeasible',
  };
  const answers = referenceSolutions(programmes);
  expect(programmes.map((programme) => solveProgramme(programme).status)).toEqual(
    answers.map(({ status }) => translated[status]),
  );
});
