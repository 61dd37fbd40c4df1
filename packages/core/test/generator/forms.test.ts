import { describe, expect, it } from 'vitest';
import { basisElement, blockAlgebra, fromCoordinates } from '../../src/algebra/block-algebra.js';
import { applyGenerator, applyGeneratorAdjoint, generatorMatrix } from '../../src/generator/apply-generator.js';
import { generatorNormBound } from '../../src/generator/generator-norm.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { schurGenerator } from '../../src/generator/schur-generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  anticommutator,
  commutator,
  diagonal,
  frobeniusNorm,
  fromEntries,
  fromRows,
  hermitianPart,
  innerProduct,
  maxAbs,
  multiply,
  scale,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

/** i[H,A] + Σ rate (R*AR − ½{R*R,A}), written out. */
function lindbladFormula(
  h: ComplexMatrix,
  jumps: readonly { rate: number; matrix: ComplexMatrix }[],
  a: ComplexMatrix,
): ComplexMatrix {
  const out = scale(commutator(h, a), 0, 1);
  for (const { rate, matrix: r } of jumps) {
    const rr = adjoint(r);
    addScaledInto(out, multiply(rr, multiply(a, r)), rate);
    addScaledInto(out, anticommutator(multiply(rr, r), a), -rate / 2);
  }
  return out;
}

describe('lindbladGenerator', () => {
  const random = seededRandom('lindblad');
  const n = 4;
  const h = hermitianPart(randomMatrix(random, n));
  const jumps = [0.5, 2].map((rate) => ({ rate, matrix: randomMatrix(random, n) }));
  // A sparse jump beside dense ones, so that both ways of multiplying are taken.
  jumps.push({
    rate: 3,
    matrix: fromEntries(n, n, (i, j) => [i === (j + 1) % n ? j + 1 : 0, i === (j + 1) % n ? -1 : 0]),
  });
  const g = lindbladGenerator({ algebra: blockAlgebra([n]), hamiltonian: h, jumps });

  it('is its formula, on matrices that are not Hermitian too', () => {
    const a = randomMatrix(random, n);
    expectBelow(frobeniusNorm(subtract(applyGenerator(g, a), lindbladFormula(h, jumps, a))), 1e-12, 'L(A) − formula');
  });

  it('has its adjoint and its matrix', () => {
    const [a, rho] = [randomMatrix(random, n), randomMatrix(random, n)];
    const left = innerProduct(adjoint(rho), applyGenerator(g, a));
    const right = innerProduct(adjoint(applyGeneratorAdjoint(g, rho)), a);
    expectClose(left.re, right.re, 1e-11, 'Re Tr ρL(A)');
    expectClose(left.im, right.im, 1e-11, 'Im Tr ρL(A)');
    const m = generatorMatrix(g);
    expect(generatorMatrix(g)).toBe(m);
    const k = 5;
    const column = Float64Array.from({ length: n * n }, (_, row) => m[row * n * n + k]);
    const image = applyGenerator(g, basisElement(g.algebra, k));
    expectBelow(frobeniusNorm(subtract(fromCoordinates(g.algebra, column), image)), 1e-13, 'column 5');
  });

  it('takes sparse matrices', () => {
    const same = lindbladGenerator({
      algebra: g.algebra,
      hamiltonian: sparseFromDense(h),
      jumps: jumps.map((j) => ({ ...j, matrix: sparseFromDense(j.matrix) })),
    });
    expectAllClose(generatorMatrix(same), generatorMatrix(g), 0);
  });

  it('has a norm bound that holds', () => {
    const a = randomMatrix(random, n);
    expect(frobeniusNorm(applyGenerator(g, a))).toBeLessThan(generatorNormBound(g) * frobeniusNorm(a) * Math.sqrt(n));
  });

  it('acts on blocks through jumps between them', () => {
    const algebra = blockAlgebra([2, 1]);
    const link = fromRows([[0, 0, 1], [0, 0, 2], [0, 0, 0]]); // prettier-ignore
    const between = lindbladGenerator({ algebra, jumps: [{ matrix: link }] });
    const image = applyGenerator(between, diagonal([1, 0, 0]));
    // R*AR = 1 at the point, R*R = 5 there and nothing on the block.
    expectAllClose(image.re, [0, 0, 0, 0, 0, 0, 0, 0, 1], 1e-15);
  });

  it('names what is wrong', () => {
    const algebra = blockAlgebra([2]);
    const x = fromRows([[0, 1], [1, 0]]); // prettier-ignore
    expectError(
      () => lindbladGenerator({ algebra, jumps: [{ matrix: x }, { matrix: x, rate: -1 }] }),
      'negative-rate',
      /at least 0, got -1/,
      '/generator/jumps/1/rate',
    );
    expectError(
      () => lindbladGenerator({ algebra, jumps: [{ matrix: x, rate: NaN }] }),
      'not-finite',
      /got NaN/,
      '/generator/jumps/0/rate',
    );
    expectError(
      () => lindbladGenerator({ algebra, jumps: [{ matrix: zeros(3) }] }),
      'dimension-mismatch',
      /2×2 matrix, got 3×3/,
      '/generator/jumps/0/matrix',
    );
    expectError(
      () => lindbladGenerator({ algebra, jumps: [{ matrix: diagonal([Infinity, 0]) }] }),
      'not-finite',
      /infinity/,
      '/generator/jumps/0/matrix',
    );
    expectError(() => lindbladGenerator({ algebra, hamiltonian: fromRows([[0, 1], [0, 0]]), jumps: [] }), 'not-hermitian', /Hamiltonian to be Hermitian, got ‖A−A\*‖ = 1\.41/, '/generator/hamiltonian'); // prettier-ignore
    const split = expectError(() => lindbladGenerator({ algebra: blockAlgebra([1, 1]), jumps: [{ matrix: fromRows([[1, 1], [0, 0]]) }] }), 'algebra-not-preserved', /use the algebra \[2\]/, '/generator'); // prettier-ignore
    expect(split.details?.residual).toBeGreaterThan(0.01);
  });
});

describe('ratesGenerator', () => {
  const rates = [[0, 2, 0], [1, -4, 3], [0.5, 0, 0]]; // prettier-ignore

  it('is Σ_y Q_xy (f(y) − f(x))', () => {
    const f = [1, 10, 100];
    const image = applyGenerator(ratesGenerator(rates), diagonal(f));
    const expected = rates.map((row, x) => row.reduce((sum, q, y) => sum + (x === y ? 0 : q * (f[y] - f[x])), 0));
    expectAllClose(
      [0, 4, 8].map((k) => image.re[k]),
      expected,
      1e-13,
    );
  });

  it('names what is wrong', () => {
    expectError(() => ratesGenerator([[0, 1], [-1, 0]]), 'negative-rate', /from 1 to 0, got -1/, '/generator/rates/1/0'); // prettier-ignore
    expectError(() => ratesGenerator([[0, 1], [1]]), 'ragged-matrix', /2 rates in row 1, got 1/, '/generator/rates/1'); // prettier-ignore
    expectError(() => ratesGenerator([[0, NaN], [1, 0]]), 'not-finite', /from 0 to 1, got NaN/, '/generator/rates/0/1'); // prettier-ignore
    expectError(() => ratesGenerator([[1, 1], [1, 0]]), 'row-sum-mismatch', /row 0 to be 0 or minus the sum of the others, -1, got 1/, '/generator/rates/0/0'); // prettier-ignore
    expectError(() => ratesGenerator([[-2, 1], [1, 0]]), 'row-sum-mismatch', /-1, got -2/, '/generator/rates/0/0'); // prettier-ignore
  });
});

describe('schurGenerator', () => {
  it('multiplies entry (i,j) by −‖a_i − a_j‖²', () => {
    const points = [[0, 1], [3, 5], [-1, 2]]; // prettier-ignore
    const a = randomMatrix(seededRandom('schur'), 3);
    const image = applyGenerator(schurGenerator({ points }), a);
    const expected = fromEntries(3, 3, (i, j) => {
      const square = (points[i][0] - points[j][0]) ** 2 + (points[i][1] - points[j][1]) ** 2;
      return [-square * a.re[i * 3 + j], -square * a.im[i * 3 + j]];
    });
    expectBelow(frobeniusNorm(subtract(image, expected)), 1e-12 * maxAbs(expected), 'Schur multiplier');
  });

  it('names what is wrong', () => {
    expectError(() => schurGenerator({ points: [[0, 1], [2]] }), 'ragged-matrix', /2 coordinates of point 1, got 1/, '/generator/points/1'); // prettier-ignore
    expectError(() => schurGenerator({ points: [[0], [Infinity]] }), 'not-finite', /coordinate 0 of point 1/, '/generator/points/1/0'); // prettier-ignore
    expectError(() => schurGenerator({ points: [[0], [1]], algebra: blockAlgebra([3]) }), 'dimension-mismatch', /2×2 matrices for 2 points, got blocks \[3\]/, '/algebra'); // prettier-ignore
  });
});
