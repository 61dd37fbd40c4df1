import { describe, expect, it } from 'vitest';
import { basisElement, blockAlgebra, projectToAlgebra, toCoordinates } from '../../src/algebra/block-algebra.js';
import { blockEigen } from '../../src/algebra/block-eigen.js';
import { matrixUnits } from '../../src/algebra/matrix-units.js';
import { applyGenerator, generatorMatrix } from '../../src/generator/apply-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { hermitianToUnits, unitsToHermitian } from '../../src/generator/hermitian-units.js';
import { unitForm } from '../../src/generator/unit-form.js';
import {
  fromEntries,
  hermitianPart,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { generatorInStateBasis } from '../../src/structure/generator-in-basis.js';
import { randomMatrix } from '../linalg/support/inputs.js';
import { expectAllClose, expectClose } from '../linalg/support/expect-close.js';

/** Jumps in every corner, a Hamiltonian and a superoperator part at once. */
function everyPart(blocks: readonly number[]): Generator {
  const random = seededRandom(`unit form ${blocks.join()}`);
  const algebra = blockAlgebra(blocks);
  const n = algebra.size;
  const corner = (a: number, b: number) => {
    const dense = randomMatrix(random, n);
    return fromEntries(n, n, (i, j) =>
      algebra.blockOf[i] === a && algebra.blockOf[j] === b ? [dense.re[i * n + j], dense.im[i * n + j]] : [0, 0],
    );
  };
  const jumps = blocks.flatMap((_, a) => blocks.map((_, b) => ({ matrix: sparseFromDense(corner(a, b)) })));
  return {
    algebra,
    hamiltonian: sparseFromDense(projectToAlgebra(algebra, hermitianPart(randomMatrix(random, n)))),
    jumps,
    superoperator: expectationGenerator({ algebra, onto: { scalars: true } }).superoperator,
    declaredState: null,
    origin: { kind: 'lindblad' },
  };
}

const BLOCKS = [[1], [3], [2, 1], [1, 2, 2], [1, 1, 1]]; // prettier-ignore

describe('L put together jump by jump', () => {
  for (const blocks of BLOCKS) {
    it(`is what applying L gives, blocks [${blocks.join()}]`, () => {
      const g = everyPart(blocks);
      const d = g.algebra.dimension;
      const m = generatorMatrix(g);
      for (let l = 0; l < d; l++) {
        const column = Float64Array.from({ length: d }, (_, k) => m[k * d + l]);
        expectAllClose(
          column,
          toCoordinates(g.algebra, applyGenerator(g, basisElement(g.algebra, l))),
          1e-12,
          `column ${l}`,
        );
      }
    });

    it(`is what applying L gives in another basis, blocks [${blocks.join()}]`, () => {
      const g = everyPart(blocks);
      const n = g.algebra.size;
      const { vectors } = blockEigen(
        g.algebra,
        projectToAlgebra(g.algebra, hermitianPart(randomMatrix(seededRandom(1), n))),
      );
      const { units, matrix } = generatorInStateBasis(g, { vectors });
      for (let q = 0; q < units.count; q++) {
        const unit = zeros(n);
        unit.re[units.row[q] * n + units.col[q]] = 1;
        const image = applyGenerator(g, multiplyAdjointSecond(multiply(vectors, unit), vectors));
        const expected = multiplyAdjointFirst(vectors, multiply(image, vectors));
        for (let p = 0; p < units.count; p++) {
          const at = units.row[p] * n + units.col[p];
          expectClose(matrix.re[p * units.count + q], expected.re[at], 1e-12, `Re (${p},${q})`);
          expectClose(matrix.im[p * units.count + q], expected.im[at], 1e-12, `Im (${p},${q})`);
        }
      }
    });

    it(`goes from the Hermitian basis to units and back, blocks [${blocks.join()}]`, () => {
      const algebra = blockAlgebra(blocks);
      const units = matrixUnits(algebra);
      const random = seededRandom(2);
      const s = Float64Array.from({ length: algebra.dimension ** 2 }, () => random.normal());
      expectAllClose(unitsToHermitian(algebra, units, hermitianToUnits(algebra, units, s)), s, 1e-14);
    });
  }

  it('is kept, and is made anew for another generator', () => {
    const g = everyPart([2]);
    expect(unitForm(g)).toBe(unitForm(g));
    expect(unitForm({ ...g })).not.toBe(unitForm(g));
  });
});
