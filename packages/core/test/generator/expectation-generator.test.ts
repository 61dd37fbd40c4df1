import { describe, expect, it } from 'vitest';
import { blockAlgebra, projectToAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGenerator, generatorMatrix } from '../../src/generator/apply-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import {
  diagonal,
  frobeniusNorm,
  fromRows,
  identity,
  kronecker,
  multiply,
  multiplyAdjointSecond,
  scale,
  subtract,
  trace,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectError } from '../helpers/expect-error.js';
import { randomMatrix, randomUnitary } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

const random = seededRandom('expectation');

describe('expectationGenerator', () => {
  it('onto scalars is rate (Tr(A)/N − A)', () => {
    const algebra = blockAlgebra([2, 1]);
    const a = projectToAlgebra(algebra, randomMatrix(random, 3));
    const { re, im } = trace(a);
    const g = expectationGenerator({ algebra, onto: { scalars: true }, rate: 1.5 });
    const expected = scale(subtract(scale(identity(3), re / 3, im / 3), a), 1.5);
    expectBelow(frobeniusNorm(subtract(applyGenerator(g, a), expected)), 1e-14, 'L(A)');
    expect(g.origin).toEqual({ kind: 'expectation', rate: 1.5, tracial: true });
  });

  it('onto the diagonal and onto blocks drops entries', () => {
    const a = randomMatrix(random, 3);
    const cases = [[{ diagonal: true }, [1, 1, 1]], [{ blocks: [2, 1] }, [2, 1]], [{ blocks: [3] }, [3]]] as const; // prettier-ignore
    for (const [onto, blocks] of cases) {
      const g = expectationGenerator({ algebra: blockAlgebra([3]), onto });
      const expected = subtract(projectToAlgebra(blockAlgebra([...blocks]), a), a);
      expectBelow(frobeniusNorm(subtract(applyGenerator(g, a), expected)), 1e-14, blocks.join());
    }
  });

  it('onto a span of matrices is the conditional expectation: E(BA) = B E(A) for B in the span', () => {
    const u = randomUnitary(random, 4);
    // M_2 ⊗ 1, rotated; a basis that is not Hermitian.
    const span = [0, 1, 2, 3].map((k) => {
      const unit = fromRows([[0, 0], [0, 0]]); // prettier-ignore
      unit.re[k] = 1;
      return multiplyAdjointSecond(multiply(u, kronecker(unit, identity(2))), u);
    });
    const g = expectationGenerator({ algebra: blockAlgebra([4]), onto: { spannedBy: span } });
    const e = (a: ReturnType<typeof identity>) => subtract(applyGenerator(g, a), scale(a, -1));
    const a = randomMatrix(random, 4);
    for (const b of span)
      expectBelow(frobeniusNorm(subtract(e(multiply(b, a)), multiply(b, e(a)))), 1e-13, 'E(BA) − B E(A)');
    expectBelow(frobeniusNorm(subtract(e(e(a)), e(a))), 1e-13, 'E² − E');
  });

  it('agrees between names and a span', () => {
    const algebra = blockAlgebra([2]);
    const span = [diagonal([1, 0]), diagonal([0, 1])];
    const named = expectationGenerator({ algebra, onto: { diagonal: true } });
    const spanned = expectationGenerator({ algebra, onto: { spannedBy: span } });
    expectAllClose(generatorMatrix(spanned), generatorMatrix(named), 1e-15);
  });

  it('names what is wrong', () => {
    const algebra = blockAlgebra([2]);
    const x = fromRows([[0, 1], [1, 0]]); // prettier-ignore
    const up = fromRows([[0, 1], [0, 0]]); // prettier-ignore
    const at = '/generator/onto/spannedBy';
    const onto =
      (...spannedBy: (typeof x)[]) =>
      () =>
        expectationGenerator({ algebra, onto: { spannedBy } });
    expectError(onto(x), 'not-an-algebra', /contain the identity/, at);
    expectError(onto(identity(2), up), 'not-an-algebra', /contain the adjoint of each/, at);
    expectError(onto(identity(2), x, diagonal([1, -1])), 'not-an-algebra', /contain all products/, at);
    expectError(onto(identity(2), identity(3)), 'dimension-mismatch', /2×2 matrix, got 3×3/, `${at}/1`);
    expectError(
      () => expectationGenerator({ algebra: blockAlgebra([1, 1]), onto: { spannedBy: [identity(2), x] } }),
      'dimension-mismatch',
      /inside the blocks/,
      `${at}/1`,
    );
    expectError(
      () => expectationGenerator({ algebra: blockAlgebra([2, 1]), onto: { blocks: [1, 2] } }),
      'dimension-mismatch',
      /divide the blocks \[2, 1\] of the algebra, got \[1, 2\]/,
      '/generator/onto/blocks',
    );
    expectError(
      () => expectationGenerator({ algebra, onto: { blocks: [1] } }),
      'dimension-mismatch',
      /divide the blocks/,
      '/generator/onto/blocks',
    );
    expectError(
      () => expectationGenerator({ algebra, onto: { scalars: true }, rate: -2 }),
      'negative-rate',
      /got -2/,
      '/generator/rate',
    );
    expectError(
      () => expectationGenerator({ algebra: blockAlgebra([33]), onto: { scalars: true } }),
      'too-large',
      /got 1089 \(a matrix would take 9.05 MiB\); give it by jumps/,
    );
  });
});
