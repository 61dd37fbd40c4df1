import { describe, expect, it } from 'vitest';
import { adjoint, fromRows, multiply } from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense, type SparseMatrix } from '../../src/linalg/sparse-matrix.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { type Programme } from '../../src/programme/programme.js';
import { type ProgrammeSolution } from '../../src/programme/programme-solution.js';
import { seededRandom } from '../../src/random.js';
import { expectClose } from '../linalg/support/expect-close.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { expectOptimal } from './support/optimality.js';
import { randomProgramme } from './support/random-programme.js';

function solved(programme: Programme): ProgrammeSolution {
  const solution = solveProgramme(programme);
  expect(solution.status).toBe('optimal');
  expectOptimal(programme, solution, 1e-7, 'conditions');
  return solution;
}

describe('laws', () => {
  const shape = { sizes: [7, 4], kind: 'hermitian', unknowns: 9, density: 0.6 } as const;
  const programme = randomProgramme(shape, seededRandom('laws'));
  const right = solved(programme);

  const mapMatrices = (map: (a: SparseMatrix, k: number, unknown: number) => SparseMatrix): Programme => ({
    objective: programme.objective,
    blocks: programme.blocks.map((block, k) => ({
      ...block,
      constant: map(block.constant, k, -1),
      coefficients: block.coefficients.map(({ unknown, matrix }) => ({ unknown, matrix: map(matrix, k, unknown) })),
    })),
  });
  const scaled = (a: SparseMatrix, c: number): SparseMatrix => ({
    ...a,
    re: a.re.map((x) => c * x),
    im: a.im.map((x) => c * x),
  });

  it('the same input gives the same bytes', () => {
    expect(solveProgramme(programme)).toEqual(right);
  });

  it('unitary conjugation of a block changes nothing', () => {
    const unitaries = shape.sizes.map((n, k) => randomUnitary(seededRandom(k), n));
    const turned = mapMatrices((a, k) =>
      sparseFromDense(multiply(multiply(unitaries[k], denseFromSparse(a)), adjoint(unitaries[k]))),
    );
    expectClose(solved(turned).dualObjective, right.dualObjective, 1e-8 * Math.abs(right.dualObjective), 'optimum');
  });

  it('the order of blocks and unknowns does not matter', () => {
    const last = shape.unknowns - 1;
    const reversed: Programme = {
      objective: Array.from(programme.objective).reverse(),
      blocks: [...programme.blocks].reverse().map((block) => ({
        ...block,
        coefficients: block.coefficients.map(({ unknown, matrix }) => ({ unknown: last - unknown, matrix })),
      })),
    };
    const solution = solved(reversed);
    expectClose(solution.dualObjective, right.dualObjective, 1e-8 * Math.abs(right.dualObjective), 'optimum');
    right.y.forEach((y, i) => expectClose(solution.y[last - i], y, 1e-6, `y_${i}`));
  });

  it('data far from 1 are scaled away', () => {
    const factors = (unknown: number): number => (unknown < 0 ? 1e-7 : 10 ** ((unknown % 5) - 2));
    const other = mapMatrices((a, _, unknown) => scaled(a, factors(unknown)));
    const objective = Array.from(programme.objective, (b, i) => 1e9 * b * factors(i));
    const solution = solveProgramme({ ...other, objective });
    expect(solution.status).toBe('optimal');
    expectClose(solution.dualObjective / (right.dualObjective * 1e2), 1, 1e-8, 'quotient of optima');
    right.y.forEach((y, i) => expectClose((solution.y[i] * factors(i)) / 1e-7, y, 1e-6, `y_${i}`));
  });

  it('a complex block equals its real embedding', () => {
    const embedded: Programme = {
      objective: programme.objective,
      blocks: programme.blocks.map((block) => ({
        kind: 'symmetric',
        size: 2 * block.size,
        constant: embed(block.constant),
        coefficients: block.coefficients.map(({ unknown, matrix }) => ({ unknown, matrix: embed(matrix) })),
      })),
    };
    expectClose(solved(embedded).dualObjective, right.dualObjective, 1e-8 * Math.abs(right.dualObjective), 'optimum');
  });
});

function embed(a: SparseMatrix): SparseMatrix {
  const n = a.rows;
  const dense = denseFromSparse(a);
  const rows = Array.from({ length: 2 * n }, (_, i) =>
    Array.from({ length: 2 * n }, (__, j) => {
      const q = (i % n) * n + (j % n);
      if (i < n === j < n) return dense.re[q];
      return i < n ? -dense.im[q] : dense.im[q];
    }),
  );
  return sparseFromDense(fromRows(rows));
}
