import { describe, expect, it } from 'vitest';
import { deepestFeasible, strictlyFeasible } from '../../src/programme/deepest-feasible.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';
import { diagonalBlock, symmetricBlock, unit } from './support/block.js';
import { depolarisingJumps } from './support/gell-mann.js';
import { liftInstance, smallAnsatz } from './support/lift-instance.js';
import { randomProgramme } from './support/random-programme.js';

describe('deepestFeasible', () => {
  it('finds the centre of an interval, and of what an objective value leaves of it', () => {
    const programme = { objective: [1], blocks: [diagonalBlock([3, 1], [1, -1])] };
    const free = deepestFeasible(programme, -10);
    expectClose(free.y[0], 1, 1e-8, 'centre of [−1, 3]');
    expectClose(free.margin, 2, 1e-8, 'half its length');
    const near = deepestFeasible(programme, 2.5);
    expectClose(near.y[0], 2.5, 1e-8, 'point');
    expectClose(near.margin, 0.5, 1e-8, 'distance to 3');
    expect(free.status).toBe('optimal');
  });

  it('reports the eigenvalue of the slack, off-diagonal parts included', () => {
    // [[1, y_0], [y_0, 1]] has the smallest eigenvalue 1 − |y_0|; the objective asks for y_0 ≥ 0.75.
    const programme = {
      objective: [1],
      blocks: [
        symmetricBlock(
          [
            [1, 0],
            [0, 1],
          ],
          unit(2, 0, 1),
        ),
      ],
    };
    const point = deepestFeasible(programme, 0.75);
    expectClose(point.margin, 0.25, 1e-8, 'margin');
  });

  it('bounds the margin where the feasible set is unbounded', () => {
    const programme = { objective: [0], blocks: [diagonalBlock([2], [-1])] };
    const point = deepestFeasible(programme, 0);
    expect(point.status).toBe('optimal');
    expectBelow(2 - 1e-6, point.margin, 'the norm of C');
  });

  it('shows by a margin that is not positive that nothing has the objective value, or the interior is empty', () => {
    const interval = { objective: [1], blocks: [diagonalBlock([3, 1], [1, -1])] };
    expectClose(deepestFeasible(interval, 5).margin, -2, 1e-7, 'margin beyond the end');
    const thin = {
      objective: [1, 0],
      blocks: [
        symmetricBlock(
          [
            [0, 0],
            [0, 1],
          ],
          unit(2, 1),
          unit(2, 0, 1),
        ),
      ],
    };
    expectClose(deepestFeasible(thin, 0).margin, 0, 1e-8, 'margin of a set without interior');
  });
});

describe('strictlyFeasible', () => {
  it.each([1e-2, 1e-5, 1e-8])('gives a point with a margin within %f of the optimum', (backOff) => {
    for (const kind of ['symmetric', 'hermitian'] as const) {
      const programme = randomProgramme({ sizes: [6, 3], kind, unknowns: 7, density: 0.7 }, seededRandom(kind));
      const { solution, point } = strictlyFeasible(programme, { backOff });
      expect(solution.status).toBe('optimal');
      expectBelow(0, point!.margin, 'margin');
      expect(point!.objective).toBeGreaterThanOrEqual(solution.dualObjective - backOff * (1 + 1e-6));
    }
  });

  it('a lift of the depolarising qubit has a margin that falls in proportion to the distance from K = 3/4', () => {
    const programme = liftInstance(depolarisingJumps(2), smallAnsatz(3))!;
    const margins = [1e-2, 1e-4, 1e-6].map(
      (backOff) => strictlyFeasible(programme, { backOff }).point!.margin / backOff,
    );
    // The derivative of the best margin at the optimum, 1.6, from the multipliers of the programme at 1e-2.
    for (const quotient of margins) expectClose(quotient, margins[0], 1e-3, 'margin per distance');
    expectBelow(1, margins[0], 'margin per distance');
  });

  it('gives no point where there is no optimum', () => {
    const programme = { objective: [1], blocks: [symmetricBlock([[1]], [[-1]])] };
    expect(strictlyFeasible(programme, { backOff: 0.1 })).toMatchObject({
      solution: { status: 'primal-infeasible' },
      point: null,
    });
  });
});
