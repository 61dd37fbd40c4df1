import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  add,
  adjoint,
  fromEntries,
  kronecker,
  multiply,
  scale,
  subtract,
  zeros,
  frobeniusNorm,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import {
  denseFromSparse,
  denseTimesSparse,
  sparseAdd,
  sparseAdjoint,
  sparseFromDense,
  sparseFromTriplets,
  sparseKronecker,
  sparseMultiply,
  sparseTimesDense,
  type SparseMatrix,
} from '../../src/linalg/sparse-matrix.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectClose } from './support/expect-close.js';
import { randomMatrix } from './support/inputs.js';

const shapes = fc.tuple(fc.integer(), fc.array(fc.integer({ min: 0, max: 6 }), { minLength: 4, maxLength: 4 }));

describe('sparse matrices', () => {
  it('agree with dense arithmetic and keep their form', () => {
    fc.assert(
      fc.property(shapes, ([seed, [k, l, m, n]]) => {
        const random = seededRandom(seed);
        const [a, b, c] = [scattered(random, k, l), scattered(random, l, m), scattered(random, k, l)];
        const d = scattered(random, m, n);
        const [s, t, u, w] = [a, b, c, d].map(sparseFromDense);
        expect(denseFromSparse(s)).toEqual(a);
        expectSame(sparseAdjoint(s), adjoint(a), 'adjoint');
        expectSame(sparseMultiply(s, t), multiply(a, b), 'product');
        expectSame(sparseKronecker(s, w), kronecker(a, d), 'tensor product');
        expectSame(sparseAdd(s, u, 2, -3), add(a, scale(c, 2, -3)), 'sum');
        const x = randomMatrix(random, l, n);
        const y = randomMatrix(random, n, k);
        expectClose(frobeniusNorm(subtract(sparseTimesDense(s, x), multiply(a, x))), 0, 1e-13, 'sparse times dense');
        expectClose(frobeniusNorm(subtract(denseTimesSparse(y, s), multiply(y, a))), 0, 1e-13, 'dense times sparse');
      }),
    );
  });

  it('sum duplicate triplets in any order and drop what cancels', () => {
    const s = sparseFromTriplets(2, 3, [
      [1, 2, 1, 1],
      [0, 1, 2, 0],
      [1, 0, 5, -1],
      [1, 2, 3, -4],
      [0, 1, -2, 0],
    ]);
    expect([...s.rowStart]).toEqual([0, 0, 2]);
    expect([...s.colIndex]).toEqual([0, 2]);
    expect([...s.re]).toEqual([5, 4]);
    expect([...s.im]).toEqual([-1, -3]);
    expect(sparseAdd(s, s, -1).re.length).toBe(0);
  });

  it('drop exact zeros only', () => {
    const tiny = sparseFromTriplets(1, 3, [
      [0, 0, 0, 0],
      [0, 1, 5e-324, 0],
      [0, 2, 0, -5e-324],
    ]);
    expect([...tiny.colIndex]).toEqual([1, 2]);
  });

  it('refuse entries outside and factors that do not fit', () => {
    const mismatch = expect.objectContaining({ code: 'dimension-mismatch' });
    for (const [i, j] of [
      [2, 0],
      [0, 2],
      [-1, 0],
      [0.5, 0],
    ]) {
      expect(() => sparseFromTriplets(2, 2, [[i, j, 1, 0]])).toThrow(mismatch);
    }
    const s = sparseFromDense(zeros(2, 3));
    expect(() => sparseMultiply(s, s)).toThrow(mismatch);
    expect(() => sparseTimesDense(s, zeros(2))).toThrow(mismatch);
    expect(() => denseTimesSparse(zeros(3), s)).toThrow(mismatch);
    expect(() => sparseAdd(s, sparseFromDense(zeros(3, 2)))).toThrow(mismatch);
  });
});

function scattered(random: Random, rows: number, cols: number): ComplexMatrix {
  return fromEntries(rows, cols, () => (random.uniform() < 0.6 ? [0, 0] : [random.normal(), random.normal()]));
}

function expectSame(s: SparseMatrix, dense: ComplexMatrix, what: string): void {
  expect([s.rows, s.cols, s.rowStart.length], what).toEqual([dense.rows, dense.cols, dense.rows + 1]);
  expectClose(frobeniusNorm(subtract(denseFromSparse(s), dense)), 0, 1e-13, what);
  for (let i = 0; i < s.rows; i++) {
    for (let p = s.rowStart[i]; p < s.rowStart[i + 1]; p++) {
      expect(s.re[p] !== 0 || s.im[p] !== 0, `${what}: no stored zeros`).toBe(true);
      if (p > s.rowStart[i]) expect(s.colIndex[p], `${what}: ascending columns`).toBeGreaterThan(s.colIndex[p - 1]);
    }
  }
  expect(s.rowStart[s.rows], what).toBe(s.re.length);
}
