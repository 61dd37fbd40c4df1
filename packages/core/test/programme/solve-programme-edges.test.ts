import { describe, expect, it } from 'vitest';
import { sparseFromTriplets } from '../../src/linalg/sparse-matrix.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { type Programme, type ProgrammeBlock } from '../../src/programme/programme.js';
import { type ProgrammeIterate } from '../../src/programme/programme-options.js';
import { type ProgrammeSolution } from '../../src/programme/programme-solution.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';
import { symmetricBlock, unit } from './support/block.js';
import { expectOptimal } from './support/optimality.js';
import { randomProgramme } from './support/random-programme.js';

function solved(programme: Programme): ProgrammeSolution {
  const solution = solveProgramme(programme);
  expect(solution.status).toBe('optimal');
  expectOptimal(programme, solution, 1e-7, 'conditions');
  return solution;
}

describe('edges', () => {
  it.each([
    ['1 × 1', 2, 3, 4],
    ['1 × 1, tiny', 2e-9, 3e-12, 4e5],
    ['1 × 1, huge', 2e9, -3e12, 4e-5],
  ])('%s', (_, b, c, a) => {
    const { dualObjective, status } = solveProgramme({ objective: [b], blocks: [symmetricBlock([[c]], [[a]])] });
    expect(status).toBe('optimal');
    expectClose(dualObjective / ((b * c) / a), 1, 1e-8, 'quotient');
  });

  it('empty blocks, no blocks, no unknowns', () => {
    const empty: ProgrammeBlock = {
      kind: 'hermitian',
      size: 0,
      constant: sparseFromTriplets(0, 0, []),
      coefficients: [],
    };
    expect(solveProgramme({ objective: [], blocks: [] })).toMatchObject({ status: 'optimal', dualObjective: 0 });
    expect(solveProgramme({ objective: [], blocks: [empty] })).toMatchObject({ status: 'optimal', dualObjective: 0 });
    const body = symmetricBlock(unit(2, 0, 1).map((row, i) => row.map((x, j) => x + 2 * Number(i === j))));
    expect(solveProgramme({ objective: [], blocks: [empty, body] }).status).toBe('optimal');
    expect(solveProgramme({ objective: [], blocks: [symmetricBlock(unit(2, 0, 1))] }).status).toBe('dual-infeasible');
    const bounded = symmetricBlock([[1]], [[1]]);
    expectClose(solveProgramme({ objective: [1], blocks: [empty, bounded] }).dualObjective, 1, 1e-8, 'optimum');
  });

  it('zero objective, zero constant', () => {
    const identity = unit(2, 0).map((row, i) => row.map((_, j) => Number(i === j)));
    expectClose(solved({ objective: [0], blocks: [symmetricBlock(identity, unit(2, 0, 1))] }).dualObjective, 0, 1e-9);
    const cone = {
      objective: [1],
      blocks: [
        symmetricBlock(
          [
            [0, 0],
            [0, 0],
          ],
          identity,
        ),
      ],
    };
    expectClose(solved(cone).dualObjective, 0, 1e-9, 'optimum on a cone');
  });

  it('rows that no matrix touches carry zeros', () => {
    const programme = { objective: [1], blocks: [symmetricBlock(unit(3, 1), unit(3, 1))] };
    const { x, s, dualObjective } = solved(programme);
    expectClose(dualObjective, 1, 1e-8, 'optimum');
    expect([x[0].re[0], s[0].re[0], x[0].re[8], s[0].re[8]]).toEqual([0, 0, 0, 0]);
  });
});

describe('without an interior', () => {
  it('no strictly feasible y: S is singular everywhere', () => {
    const programme = {
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
    };
    const solution = solveProgramme(programme);
    expect(solution.status).toBe('optimal');
    expectClose(solution.dualObjective, 1, 1e-7, 'optimum');
  });

  it('no strictly feasible X: the optimum is only approached', () => {
    const programme = {
      objective: [0, 1],
      blocks: [
        symmetricBlock(
          [
            [1, 0.5],
            [0.5, 1],
          ],
          unit(2, 0),
          unit(2, 1),
        ),
      ],
    };
    const solution = solveProgramme(programme);
    expect(solution.status).toBe('optimal');
    expectClose(solution.dualObjective, 1, 2e-7, 'supremum');
  });

  it('says that it stalled where primal and dual values differ', () => {
    // y_2 is free to make S positive only at y_1 = 0, while the primal value is 1 (Vandenberghe & Boyd, SIAM Rev. 38 (1996)).
    const programme = {
      objective: [1, 0],
      blocks: [
        symmetricBlock(
          unit(3, 0),
          [
            [1, 0, 0],
            [0, 0, 1],
            [0, 1, 0],
          ],
          unit(3, 1),
        ),
      ],
    };
    expect(solveProgramme(programme).status).toBe('stalled');
  });
});

describe('options and errors', () => {
  const programme = randomProgramme(
    { sizes: [6], kind: 'symmetric', unknowns: 5, density: 1 },
    seededRandom('options'),
  );

  it('reports every iteration, with the gap falling to the tolerance', () => {
    const records: ProgrammeIterate[] = [];
    const solution = solveProgramme(programme, { onIterate: (record) => records.push(record) });
    expect(records.map(({ iteration }) => iteration)).toEqual(records.map((_, k) => k));
    expect(records).toHaveLength(solution.iterations + 1);
    expect(records.at(-1)).toMatchObject({ gap: solution.gap, dualObjective: solution.dualObjective });
    expectBelow(solution.gap, 1e-9, 'gap');
    expect(records.every(({ primalStep, dualStep }) => primalStep <= 1 && dualStep <= 1)).toBe(true);
  });

  it('stops when asked, with the best point so far', () => {
    let calls = 0;
    const solution = solveProgramme(programme, { stop: () => ++calls > 3 });
    expect(solution).toMatchObject({ status: 'stopped', iterations: 3 });
    expect(solution.y.some((y) => Math.abs(y) > 0)).toBe(true);
  });

  it('respects the limit of iterations and the tolerance', () => {
    expect(solveProgramme(programme, { maxIterations: 2 })).toMatchObject({ status: 'iterations', iterations: 2 });
    const coarse = solveProgramme(programme, { tolerance: 1e-3 });
    expectBelow(coarse.gap, 1e-3, 'gap');
    expect(coarse.iterations).toBeLessThan(solveProgramme(programme).iterations);
  });

  const [block] = programme.blocks;
  it.each([
    ['not-finite', 'objective coefficient 0', { ...programme, objective: [NaN, 0, 0, 0, 0] }],
    [
      'usage',
      'unknown 7',
      { ...programme, blocks: [{ ...block, coefficients: [{ unknown: 7, matrix: block.constant }] }] },
    ],
    [
      'usage',
      'unknown 1 twice',
      { ...programme, blocks: [{ ...block, coefficients: [block.coefficients[1], block.coefficients[1]] }] },
    ],
    ['dimension-mismatch', '5×5', { ...programme, blocks: [{ ...block, size: 5 }] }],
    ['usage', 'diagonal', { ...programme, blocks: [{ ...block, kind: 'diagonal' as const }] }],
    [
      'not-hermitian',
      'both triangles',
      { ...programme, blocks: [{ ...block, constant: sparseFromTriplets(6, 6, [[0, 1, 1, 0]]) }] },
    ],
    [
      'not-hermitian',
      'real symmetric',
      {
        ...programme,
        blocks: [
          {
            ...block,
            constant: sparseFromTriplets(6, 6, [
              [0, 1, 0, 1],
              [1, 0, 0, -1],
            ]),
          },
        ],
      },
    ],
  ])('refuses a malformed programme: %s, %s', (code, text, malformed: Programme) => {
    expect(() => solveProgramme(malformed)).toThrowError(expect.objectContaining({ code }));
    expect(() => solveProgramme(malformed)).toThrowError(text);
  });
});
