import { describe, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGenerator, applyGeneratorAdjoint, generatorMatrix } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { superoperatorGenerator } from '../../src/generator/superoperator-generator.js';
import {
  type ComplexMatrix,
  frobeniusNorm,
  fromEntries,
  hermitianPart,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

describe('superoperatorGenerator', () => {
  const random = seededRandom('superoperator');
  const n = 3;
  const given = lindbladGenerator({
    algebra: blockAlgebra([n]),
    hamiltonian: hermitianPart(randomMatrix(random, n)),
    jumps: [{ matrix: randomMatrix(random, n) }],
  });

  /** The n²×n² matrix of a map in the stated stacking, by its definition. */
  function stackedMatrix(map: (a: ComplexMatrix) => ComplexMatrix, stacking: 'rows' | 'columns'): ComplexMatrix {
    const place = (i: number, j: number) => (stacking === 'rows' ? i * n + j : i + j * n);
    const out = zeros(n * n);
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const unit = zeros(n);
        unit.re[i * n + j] = 1;
        const image = map(unit);
        for (let p = 0; p < n; p++) {
          for (let q = 0; q < n; q++) {
            out.re[place(p, q) * n * n + place(i, j)] = image.re[p * n + q];
            out.im[place(p, q) * n * n + place(i, j)] = image.im[p * n + q];
          }
        }
      }
    }
    return out;
  }

  for (const stacking of ['rows', 'columns'] as const) {
    for (const picture of ['heisenberg', 'schrodinger'] as const) {
      it(`reads ${picture} with stacked ${stacking}`, () => {
        const map = (a: ComplexMatrix) =>
          picture === 'heisenberg' ? applyGenerator(given, a) : applyGeneratorAdjoint(given, a);
        const g = superoperatorGenerator({
          algebra: given.algebra,
          matrix: stackedMatrix(map, stacking),
          picture,
          stacking,
        });
        expectAllClose(generatorMatrix(g), generatorMatrix(given), 1e-13);
      });
    }
  }

  it('acts on matrices that are not Hermitian', () => {
    const g: Generator = { ...given, hamiltonian: null, jumps: [], superoperator: generatorMatrix(given) };
    const a = randomMatrix(random, n);
    expectBelow(frobeniusNorm(subtract(applyGenerator(g, a), applyGenerator(given, a))), 1e-12, 'L(A)');
    expectBelow(frobeniusNorm(subtract(applyGeneratorAdjoint(g, a), applyGeneratorAdjoint(given, a))), 1e-12, 'L†(A)');
  });

  it('names what is wrong', () => {
    const form = { algebra: blockAlgebra([2]), picture: 'heisenberg', stacking: 'rows' } as const;
    expectError(
      () => superoperatorGenerator({ ...form, matrix: zeros(3) }),
      'dimension-mismatch',
      /4×4 matrix, got 3×3/,
      '/generator/matrix',
    );
    const skew = fromEntries(4, 4, (i, j) => [0, i === j ? 1 : 0]);
    expectError(
      () => superoperatorGenerator({ ...form, matrix: skew }),
      'not-hermitian',
      /check "stacking" and "picture"/,
      '/generator/matrix',
    );
    // Sends e_00 to e_01 + e_10, outside two points.
    const leaking = fromEntries(4, 4, (i, j) => [j === 0 && (i === 1 || i === 2) ? 1 : 0, 0]);
    expectError(
      () => superoperatorGenerator({ ...form, algebra: blockAlgebra([1, 1]), matrix: leaking }),
      'algebra-not-preserved',
      /modulus 1\.00 outside the blocks/,
      '/generator/matrix',
    );
    const large = blockAlgebra([33]);
    expectError(
      () => superoperatorGenerator({ ...form, algebra: large, matrix: sparseFromDense(zeros(1, 1)) }),
      'too-large',
      /at most 1024 for a superoperator, got 1089/,
    );
  });
});
