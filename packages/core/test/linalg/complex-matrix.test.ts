import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  add,
  addScaledInto,
  adjoint,
  anticommutator,
  commutator,
  conjugate,
  copy,
  diagonal,
  directSum,
  frobeniusNorm,
  fromEntries,
  fromRows,
  hermitianPart,
  hermiticityResidual,
  identity,
  innerProduct,
  isFiniteMatrix,
  kronecker,
  maxAbs,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  scale,
  subtract,
  trace,
  transpose,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow, expectClose } from './support/expect-close.js';
import { randomMatrix } from './support/inputs.js';
import { differenceRatio, SOLVE_RATIO } from './support/ratios.js';

const sizes = fc.tuple(fc.integer(), fc.array(fc.integer({ min: 0, max: 5 }), { minLength: 4, maxLength: 4 }));

describe('products', () => {
  it('match the definition entry by entry', () => {
    const a = fromRows([[1, 2, 0]], [[0, -1, 3]]);
    const b = fromRows([[1], [1], [2]], [[1], [0], [1]]);
    // (1)(1+i) + (2−i)(1) + (3i)(2+i) = (1+i) + (2−i) + (−3+6i)
    expect(multiply(a, b)).toEqual(fromRows([[0]], [[6]]));
  });

  it('are associative, and adjoints reverse them', () => {
    fc.assert(
      fc.property(sizes, ([seed, [k, l, m, n]]) => {
        const random = seededRandom(seed);
        const [a, b, c] = [randomMatrix(random, k, l), randomMatrix(random, l, m), randomMatrix(random, m, n)];
        const product = multiply(multiply(a, b), c);
        expectClose(frobeniusNorm(subtract(product, multiply(a, multiply(b, c)))), 0, 1e-12, 'associator');
        expectClose(
          frobeniusNorm(subtract(adjoint(multiply(a, b)), multiply(adjoint(b), adjoint(a)))),
          0,
          1e-13,
          'adjoint',
        );
        expectClose(
          frobeniusNorm(subtract(multiplyAdjointFirst(b, adjoint(a)), adjoint(multiply(a, b)))),
          0,
          1e-13,
          'A*B',
        );
        expectClose(
          frobeniusNorm(subtract(multiplyAdjointSecond(adjoint(b), a), adjoint(multiply(a, b)))),
          0,
          1e-13,
          'AB*',
        );
      }),
    );
  });

  it('have a cyclic trace and a matching inner product', () => {
    fc.assert(
      fc.property(sizes, ([seed, [m, n]]) => {
        const random = seededRandom(seed);
        const [a, b] = [randomMatrix(random, m, n), randomMatrix(random, n, m)];
        const [x, y] = [trace(multiply(a, b)), trace(multiply(b, a))];
        expectAllClose([x.re, x.im], [y.re, y.im], 1e-13, 'cyclic trace');
        const inner = innerProduct(adjoint(a), b);
        expectAllClose([inner.re, inner.im], [x.re, x.im], 1e-13, 'Tr A*B');
        expectClose(innerProduct(a, a).re, frobeniusNorm(a) ** 2, 1e-12, '‖A‖²');
      }),
    );
  });

  it('split into commutator and anticommutator', () => {
    const random = seededRandom('bracket');
    const [a, b] = [randomMatrix(random, 5), randomMatrix(random, 5)];
    const twice = add(commutator(a, b), anticommutator(a, b));
    expectBelow(differenceRatio(scale(multiply(a, b), 2), twice), SOLVE_RATIO, 'sum');
    const jacobi = [commutator(a, commutator(b, a)), commutator(b, commutator(a, a)), commutator(a, commutator(a, b))];
    expectClose(frobeniusNorm(add(add(jacobi[0], jacobi[1]), jacobi[2])), 0, 1e-12, 'Jacobi identity');
  });
});

describe('kronecker and directSum', () => {
  it('obey the mixed-product law', () => {
    fc.assert(
      fc.property(sizes, ([seed, [k, l, m, n]]) => {
        const random = seededRandom(seed);
        const [a, c] = [randomMatrix(random, k, l), randomMatrix(random, l, 2)];
        const [b, d] = [randomMatrix(random, m, n), randomMatrix(random, n, 3)];
        const left = multiply(kronecker(a, b), kronecker(c, d));
        const right = kronecker(multiply(a, c), multiply(b, d));
        expect([left.rows, left.cols]).toEqual([k * m, 6]);
        expectClose(frobeniusNorm(subtract(left, right)), 0, 1e-12, 'mixed product');
      }),
    );
  });

  it('place entries as documented', () => {
    const a = fromEntries(2, 3, (i, j) => [10 * i + j, i - j]);
    const b = fromEntries(4, 5, (i, j) => [i * j + 1, i + j]);
    const product = kronecker(a, b);
    const at = (m: typeof a, i: number, j: number): [number, number] => [m.re[i * m.cols + j], m.im[i * m.cols + j]];
    const [[x, y], [u, v]] = [at(a, 1, 2), at(b, 3, 4)];
    expect(at(product, 7, 14)).toEqual([x * u - y * v, x * v + y * u]);
    const sum = directSum([a, b, zeros(0), identity(1)]);
    expect([sum.rows, sum.cols]).toEqual([7, 9]);
    expect([at(sum, 1, 2), at(sum, 5, 7), at(sum, 6, 8), at(sum, 0, 3), at(sum, 2, 0)]).toEqual([
      at(a, 1, 2),
      at(b, 3, 4),
      [1, 0],
      [0, 0],
      [0, 0],
    ]);
  });
});

describe('construction and small operations', () => {
  it('build what they say', () => {
    expect(fromRows([])).toEqual(zeros(0));
    expect(
      fromRows([
        [1, 2],
        [3, 4],
      ]).re,
    ).toEqual(Float64Array.of(1, 2, 3, 4));
    expect(diagonal([1, 2]).re).toEqual(Float64Array.of(1, 0, 0, 2));
    expect(identity(2)).toEqual(diagonal([1, 1]));
    expect([zeros(2).rows, zeros(2).cols, zeros(2, 3).cols]).toEqual([2, 2, 3]);
  });

  it('leave their arguments alone, except the target of addScaledInto', () => {
    const random = seededRandom('pure');
    const a = randomMatrix(random, 3);
    const before = copy(a);
    for (const f of [adjoint, transpose, conjugate, hermitianPart, copy, (m: typeof a) => scale(m, 2, 1)]) f(a);
    add(a, a);
    multiply(a, a);
    expect(a).toEqual(before);
    const target = identity(3);
    expect(addScaledInto(target, a, 2, -1)).toBe(target);
    expectClose(frobeniusNorm(subtract(target, add(identity(3), scale(a, 2, -1)))), 0, 1e-15, 'I + cA');
  });

  it('relate adjoint, transpose and conjugate', () => {
    const a = randomMatrix(seededRandom('star'), 2, 4);
    expect(adjoint(adjoint(a))).toEqual(a);
    expect(transpose(conjugate(a))).toEqual(adjoint(a));
    const square = randomMatrix(seededRandom('square'), 4);
    expect(hermiticityResidual(hermitianPart(square))).toBe(0);
    expectClose(hermiticityResidual(square), frobeniusNorm(subtract(square, adjoint(square))), 0, 'residual');
  });

  it('take norms that neither overflow nor vanish', () => {
    for (const size of [1e-300, 1e-200, 1, 1e200, 1e300]) {
      const a = fromRows([[3 * size, 0]], [[0, 4 * size]]);
      expectClose(frobeniusNorm(a) / size, 5, 1e-14, `norm at ${size}`);
      expectClose(maxAbs(scale(a, 1, 1)) / size, 4 * Math.SQRT2, 1e-14, `largest entry at ${size}`);
    }
    expect([frobeniusNorm(zeros(0)), maxAbs(zeros(0)), frobeniusNorm(zeros(2))]).toEqual([0, 0, 0]);
    expect(frobeniusNorm(fromRows([[1, NaN]]))).toBeNaN();
    expect(frobeniusNorm(fromRows([[-Infinity]]))).toBe(Infinity);
  });

  it('tell finite from other entries', () => {
    expect(isFiniteMatrix(identity(2))).toBe(true);
    expect(isFiniteMatrix(fromRows([[1]], [[NaN]]))).toBe(false);
    expect(isFiniteMatrix(fromRows([[Infinity]]))).toBe(false);
  });

  it('refuse shapes that do not fit', () => {
    const mismatch = expect.objectContaining({ code: 'dimension-mismatch' });
    expect(() => multiply(zeros(2, 3), zeros(2, 3))).toThrow(mismatch);
    expect(() => add(zeros(2), zeros(2, 3))).toThrow(mismatch);
    expect(() => innerProduct(zeros(2), zeros(3))).toThrow(mismatch);
    expect(() => trace(zeros(2, 3))).toThrow(mismatch);
    expect(() => hermitianPart(zeros(2, 3))).toThrow(mismatch);
    expect(() => hermiticityResidual(zeros(2, 3))).toThrow(mismatch);
    expect(() => fromRows([[1]], [[1], [2]])).toThrow(mismatch);
    const ragged = expect.objectContaining({ code: 'ragged-matrix' });
    expect(() => fromRows([[1, 2], [3]])).toThrow(ragged);
    expect(() => fromRows([[1, 2]], [[3]])).toThrow(ragged);
  });
});
