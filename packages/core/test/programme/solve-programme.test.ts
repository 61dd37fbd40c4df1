import { describe, expect, it } from 'vitest';
import { diagonal, fromRows, type ComplexMatrix } from '../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../src/linalg/hermitian-eigen.js';
import { sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { type Programme, type ProgrammeBlock } from '../../src/programme/programme.js';
import { type ProgrammeSolution } from '../../src/programme/programme-solution.js';
import { seededRandom } from '../../src/random.js';
import { expectClose } from '../linalg/support/expect-close.js';
import { withSpectrum } from '../linalg/support/inputs.js';
import { diagonalBlock, symmetricBlock, unit } from './support/block.js';
import { expectOptimal } from './support/optimality.js';
import { randomHermitian } from './support/random-programme.js';

function solved(programme: Programme): ProgrammeSolution {
  const solution = solveProgramme(programme);
  expect(solution.status).toBe('optimal');
  expectOptimal(programme, solution, 1e-7, 'conditions');
  return solution;
}

/** λ_min(A) as the largest y with A − y · 1 ⪰ 0. */
function smallestEigenvalueProgramme(a: ComplexMatrix, kind: ProgrammeBlock['kind'] = 'hermitian'): Programme {
  const matrix = sparseFromDense(diagonal(Array<number>(a.rows).fill(1)));
  return {
    objective: [1],
    blocks: [{ kind, size: a.rows, constant: sparseFromDense(a), coefficients: [{ unknown: 0, matrix }] }],
  };
}

describe('closed forms', () => {
  it.each([1, 2, 5, 20, 61])('smallest eigenvalue at n = %i', (n) => {
    const a = randomHermitian(n, 'hermitian', 1, seededRandom(n));
    const solution = solved(smallestEigenvalueProgramme(a));
    const scale = Math.max(...hermitianEigenvalues(a).map(Math.abs)) * n;
    expectClose(solution.dualObjective, hermitianEigenvalues(a)[0], 1e-8 * scale, 'eigenvalue');
  });

  it('smallest eigenvalue when it is triple: X is not unique', () => {
    const a = withSpectrum(seededRandom('triple'), [-1, -1, -1, 2, 3], true);
    expectClose(solved(smallestEigenvalueProgramme(a)).dualObjective, -1, 1e-8, 'eigenvalue');
  });

  it('sum of the smallest two eigenvalues', () => {
    // max 2z − Tr P over A − z + P ⪰ 0, P ⪰ 0, on 3 × 3: unknowns z and the six entries of P.
    const values = [0.3, 1.1, 2.5];
    const a = withSpectrum(seededRandom('two'), values, false);
    const pairs = [0, 1, 2].flatMap((i) => Array.from({ length: i + 1 }, (_, j) => [i, j] as const));
    const rows = (b: ComplexMatrix): number[][] => values.map((_, i) => Array.from(b.re.slice(3 * i, 3 * i + 3)));
    const negative = pairs.map(([i, j]) => unit(3, i, j).map((row) => row.map((x) => -x)));
    const zero = [0, 1, 2].map(() => [0, 0, 0]);
    const identity = [0, 1, 2].map((i) => [0, 1, 2].map((j) => Number(i === j)));
    const programme = {
      objective: [2, ...pairs.map(([i, j]) => (i === j ? -1 : 0))],
      blocks: [symmetricBlock(rows(a), identity, ...negative), symmetricBlock(zero, zero, ...negative)],
    };
    expectClose(solved(programme).dualObjective, values[0] + values[1], 1e-8, 'sum');
  });

  it('a linear programme with a segment of optima', () => {
    const programme = { objective: [1, 1], blocks: [diagonalBlock([1, 5, 5], [1, -1, 0], [1, 0, -1])] };
    expectClose(solved(programme).dualObjective, 1, 1e-8, 'optimum');
  });

  it('trace of the largest diagonal below a Hilbert matrix', () => {
    // The dual: min <H, X> over correlation-like X with unit diagonal; at n = 2, 1 + 1/3 − 2 · 1/2.
    const hilbert = (n: number): number[][] =>
      Array.from({ length: n }, (_, i) => Array.from({ length: n }, (__, j) => 1 / (i + j + 1)));
    for (const n of [2, 6, 12]) {
      const units = Array.from({ length: n }, (_, k) => unit(n, k));
      const programme = { objective: Array<number>(n).fill(1), blocks: [symmetricBlock(hilbert(n), ...units)] };
      const solution = solved(programme);
      if (n === 2) expectClose(solution.dualObjective, 1 / 3, 1e-8, 'trace');
    }
  });

  it.each([4, 8, 12, 20])('smallest eigenvalue of the Hilbert matrix of order %i, to 1e-9 of its norm', (n) => {
    const rows = Array.from({ length: n }, (_, i) => Array.from({ length: n }, (__, j) => 1 / (i + j + 1)));
    const solution = solved(smallestEigenvalueProgramme(fromRows(rows), 'symmetric'));
    expectClose(solution.dualObjective, hermitianEigenvalues(fromRows(rows))[0], 4e-9, 'eigenvalue');
  });

  it('nearly dependent coefficients: a polynomial fit in monomials of degree 9', () => {
    // max t with |p(x_k) − f(x_k)| ≤ −t at 40 points: the best uniform approximation of |x| on the grid.
    const points = Array.from({ length: 40 }, (_, k) => k / 39);
    const f = points.map((x) => Math.abs(x - 0.4));
    const monomials = Array.from({ length: 10 }, (_, d) => points.map((x) => x ** d));
    const programme = {
      objective: [...Array<number>(10).fill(0), 1],
      blocks: [
        diagonalBlock(f, ...monomials, Array<number>(40).fill(1)),
        diagonalBlock(
          f.map((x) => -x),
          ...monomials.map((row) => row.map((x) => -x)),
          Array<number>(40).fill(1),
        ),
      ],
    };
    const solution = solved(programme);
    // An extremal error alternates in sign on at least 11 points (Chebyshev).
    const errors = points.map((_, k) => monomials.reduce((sum, row, d) => sum + solution.y[d] * row[k], 0) - f[k]);
    const extremal = errors.filter((e) => Math.abs(e) > -solution.dualObjective * (1 - 1e-4)).map(Math.sign);
    const changes = extremal.filter((sign, k) => k > 0 && sign !== extremal[k - 1]).length;
    expect(changes).toBeGreaterThanOrEqual(10);
  });
});
