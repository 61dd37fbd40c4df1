import { describe, expect, it } from 'vitest';
import { adjoint, diagonal, fromRows, multiply, type ComplexMatrix } from '../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../src/linalg/hermitian-eigen.js';
import {
  denseFromSparse,
  sparseFromDense,
  sparseFromTriplets,
  type SparseMatrix,
} from '../../src/linalg/sparse-matrix.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { type Programme, type ProgrammeBlock } from '../../src/programme/programme.js';
import { type ProgrammeIterate } from '../../src/programme/programme-options.js';
import { type ProgrammeSolution } from '../../src/programme/programme-solution.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';
import { randomUnitary, withSpectrum } from '../linalg/support/inputs.js';
import { diagonalBlock, symmetricBlock, unit } from './support/block.js';
import { expectOptimal } from './support/optimality.js';
import { randomHermitian, randomProgramme } from './support/random-programme.js';

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

  it('nearly dependent coefficients: a polynomial fit in monomials of degree 7', () => {
    // max t with |p(x_k) − f(x_k)| ≤ −t at 40 points: the best uniform approximation of |x| on the grid.
    const points = Array.from({ length: 40 }, (_, k) => k / 39);
    const f = points.map((x) => Math.abs(x - 0.4));
    const monomials = Array.from({ length: 8 }, (_, d) => points.map((x) => x ** d));
    const programme = {
      objective: [...Array<number>(8).fill(0), 1],
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
    // An extremal error alternates in sign on at least 9 points (Chebyshev).
    const errors = points.map((_, k) => monomials.reduce((sum, row, d) => sum + solution.y[d] * row[k], 0) - f[k]);
    const extremal = errors.filter((e) => Math.abs(e) > -solution.dualObjective * (1 - 1e-4)).map(Math.sign);
    const changes = extremal.filter((sign, k) => k > 0 && sign !== extremal[k - 1]).length;
    expect(changes).toBeGreaterThanOrEqual(8);
  });
});

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
