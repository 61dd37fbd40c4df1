import { describe, expect, it } from 'vitest';
import { sparseFromTriplets } from '../../src/linalg/sparse-matrix.js';
import { conicForm } from '../../src/programme/conic-form.js';
import { dependentCoefficients } from '../../src/programme/dependent-coefficients.js';
import { type Programme } from '../../src/programme/programme.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { splitBlock } from '../../src/programme/split-blocks.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';
import { diagonalBlock, symmetricBlock, unit } from './support/block.js';
import { randomProgramme } from './support/random-programme.js';

function formOf(programme: Programme): ReturnType<typeof conicForm> {
  return conicForm(
    programme,
    Int32Array.from({ length: programme.objective.length }, (_, i) => i),
  );
}

describe('splitBlock', () => {
  it('finds the components of the joint pattern and leaves out rows without entries', () => {
    const block = symmetricBlock(unit(6, 0, 3), unit(6, 3, 5), unit(6, 1));
    expect(splitBlock(block, 7).map(({ block: k, indices }) => [k, ...indices])).toEqual([
      [7, 0, 3, 5],
      [7, 1],
    ]);
  });
});

describe('conicForm', () => {
  it('gathers single rows of all blocks as inequalities and the rest as matrix cones', () => {
    const form = formOf({
      objective: [1, 1],
      blocks: [symmetricBlock(unit(4, 0, 2), unit(4, 1)), diagonalBlock([1, 2])],
    });
    expect(form.cones.map(({ indices }) => [...indices].sort())).toEqual([[0, 2]]);
    expect([...form.linear.block]).toEqual([0, 1, 1]);
    expect([...form.linear.index]).toEqual([1, 0, 1]);
  });

  it('treats a Hermitian block without imaginary parts as real', () => {
    const block = { ...symmetricBlock(unit(2, 0, 1), unit(2, 0)), kind: 'hermitian' as const };
    expect(formOf({ objective: [1], blocks: [block] }).cones[0].complex).toBe(false);
    const constant = sparseFromTriplets(2, 2, [
      [0, 1, 0, 1],
      [1, 0, 0, -1],
    ]);
    expect(formOf({ objective: [1], blocks: [{ ...block, constant }] }).cones[0].complex).toBe(true);
  });

  it('scales coefficients, objective and constant to norm 1', () => {
    const form = formOf(
      randomProgramme({ sizes: [5, 3], kind: 'hermitian', unknowns: 6, density: 0.5 }, seededRandom('scale')),
    );
    const norm = (x: Float64Array): number => Math.sqrt(x.reduce((sum, value) => sum + value * value, 0));
    expectClose(norm(form.objective), 1, 1e-14, 'norm of b');
    expectClose(norm(form.constant), 1, 1e-14, 'norm of C');
    const squares = new Float64Array(6);
    for (const { rows } of form.cones) {
      for (let t = 0; t < rows.count; t++) {
        for (let e = rows.start[t]; e < rows.start[t + 1]; e++) squares[rows.unknown[t]] += rows.value[e] ** 2;
      }
    }
    for (const square of squares) expectClose(square, 1, 1e-14, 'square of a coefficient');
  });
});

describe('dependent coefficients', () => {
  const base = symmetricBlock(
    [
      [2, 0.5, 0],
      [0.5, 3, 0],
      [0, 0, 1],
    ],
    unit(3, 0),
    unit(3, 1),
    unit(3, 0, 1),
  );
  const extended = (weights: readonly number[]): Programme['blocks'] => {
    const entries = [unit(3, 0), unit(3, 1), unit(3, 0, 1)].map((rows, k) =>
      rows.map((row) => row.map((x) => weights[k] * x)),
    );
    const sum = entries[0].map((row, i) => row.map((_, j) => entries[0][i][j] + entries[1][i][j] + entries[2][i][j]));
    return [
      {
        ...base,
        coefficients: [
          ...base.coefficients,
          ...symmetricBlock(sum, sum).coefficients.map((c) => ({ ...c, unknown: 3 })),
        ],
      },
    ];
  };

  it('are found, kept at zero, and change nothing when the objective follows them', () => {
    const weights = [1.5, -2, 0.25];
    const objective = [1, 2, 0.3];
    const right = solveProgramme({ objective, blocks: [base] });
    const value = weights.reduce((sum, w, k) => sum + w * objective[k], 0);
    const solution = solveProgramme({ objective: [...objective, value], blocks: extended(weights) });
    expect(solution.status).toBe('optimal');
    expect(solution.dependent).toEqual([3]);
    expect(solution.y[3]).toBe(0);
    expectClose(solution.dualObjective, right.dualObjective, 1e-8, 'optimum');
  });

  it('prove infeasibility when the objective contradicts them', () => {
    const weights = [1.5, -2, 0.25];
    const solution = solveProgramme({ objective: [1, 2, 0.3, 5], blocks: extended(weights) });
    expect(solution.status).toBe('primal-infeasible');
    const y = solution.certificate?.kind === 'primal' ? solution.certificate.y : [];
    expectClose(y[0] + 2 * y[1] + 0.3 * y[2] + 5 * y[3], 1, 1e-12, 'b·y');
    for (let k = 0; k < 3; k++) expectBelow(Math.abs(y[k] + weights[k] * y[3]), 1e-13, `coefficient ${k} of Σ y_i A_i`);
  });

  it('are not claimed for nearly dependent ones', () => {
    const form = formOf({
      objective: [1, 1],
      blocks: [
        symmetricBlock(unit(2, 0), unit(2, 0), [
          [1, 0],
          [0, 1e-7],
        ]),
      ],
    });
    expect(dependentCoefficients(form).dependent).toEqual([]);
  });

  it('include coefficients that are rounding beside the others', () => {
    const tiny = unit(2, 0, 1).map((row) => row.map((x) => 1e-17 * x));
    const blocks = [symmetricBlock(unit(2, 0), unit(2, 0), unit(2, 1), tiny)];
    const solution = solveProgramme({ objective: [1, 1, 0], blocks });
    expect(solution).toMatchObject({ status: 'optimal', dependent: [2] });
    expectClose(solution.dualObjective, 1, 1e-8, 'optimum');
  });

  it('include coefficients that vanish', () => {
    const zero = [
      [0, 0],
      [0, 0],
    ];
    const blocks = [
      symmetricBlock(
        unit(2, 0, 1).map((row, i) => row.map((x, j) => x + 2 * Number(i === j))),
        zero,
      ),
    ];
    expect(solveProgramme({ objective: [0], blocks })).toMatchObject({ status: 'optimal', dependent: [0] });
    expect(solveProgramme({ objective: [1], blocks }).status).toBe('primal-infeasible');
  });
});
