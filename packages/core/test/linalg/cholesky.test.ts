import { describe, expect, it } from 'vitest';
import {
  choleskyComplex,
  choleskySolveComplex,
  solveLowerAdjoint,
  solveLowerComplex,
} from '../../src/linalg/cholesky-complex.js';
import { choleskyReal, choleskyRealInto, choleskySolveReal } from '../../src/linalg/cholesky-real.js';
import {
  adjoint,
  identity,
  multiply,
  multiplyAdjointSecond,
  zeros,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectBelow } from './support/expect-close.js';
import { gradedMatrix, grading, randomMatrix, wellConditioned, withSpectrum } from './support/inputs.js';
import { asMatrix, differenceRatio, SOLVE_RATIO, solveRatio } from './support/ratios.js';

const SIZES = [0, 1, 2, 5, 16, 40];

describe('choleskyReal', () => {
  for (const n of SIZES) {
    for (const [family, a] of Object.entries(definite(seededRandom(`cholesky ${n}`), n, false))) {
      it(`factors and solves: n = ${n}, ${family}`, () => {
        const l = choleskyReal(a.re, n);
        const factor = asMatrix(l, n);
        expectLowerTriangular(factor);
        expectBelow(differenceRatio(a, multiplyAdjointSecond(factor, factor)), SOLVE_RATIO, 'factor ratio');
        const b = randomMatrix(seededRandom(n), n, 1, false);
        const x = asMatrix(choleskySolveReal(l, n, b.re.slice()), n, 1);
        expectBelow(solveRatio(a, x, b), SOLVE_RATIO, 'solve ratio');
        const inPlace = a.re.slice();
        expect(choleskyRealInto(inPlace, n, inPlace)).toBe(-1);
        for (let i = 0; i < n; i++) for (let j = 0; j <= i; j++) expect(inPlace[i * n + j]).toBe(l[i * n + j]);
      });
    }
  }

  it('reports the first pivot that is not positive', () => {
    const failure = (pivot: number): unknown =>
      expect.objectContaining({ code: 'not-positive-definite', details: expect.objectContaining({ pivot }) });
    expect(() => choleskyReal(Float64Array.of(0), 1)).toThrow(failure(0));
    expect(() => choleskyReal(Float64Array.of(1, 1, 1, 1), 2)).toThrow(failure(1));
    expect(() => choleskyReal(Float64Array.of(-1, 0, 0, 1), 2)).toThrow(failure(0));
    expect(() => choleskyReal(Float64Array.of(NaN), 1)).toThrow(expect.objectContaining({ code: 'not-finite' }));
  });
});

describe('choleskyComplex', () => {
  for (const n of SIZES) {
    for (const [family, a] of Object.entries(definite(seededRandom(`cholesky ${n}`), n, true))) {
      it(`factors and solves: n = ${n}, ${family}`, () => {
        const l = choleskyComplex(a);
        expectLowerTriangular(l);
        expectBelow(differenceRatio(a, multiplyAdjointSecond(l, l)), SOLVE_RATIO, 'factor ratio');
        const b = randomMatrix(seededRandom(n), n, 3);
        expectBelow(solveRatio(a, choleskySolveComplex(l, b), b), SOLVE_RATIO, 'solve ratio');
        expectBelow(solveRatio(l, solveLowerComplex(l, b), b), SOLVE_RATIO, 'triangular solve ratio');
        expectBelow(solveRatio(adjoint(l), solveLowerAdjoint(l, b), b), SOLVE_RATIO, 'adjoint solve ratio');
      });
    }
  }

  it('agrees with the real factor on a real matrix', () => {
    const a = wellConditioned(seededRandom('real'), 7, false);
    const l = choleskyComplex(a);
    expect(l.im.every((y) => y === 0)).toBe(true);
    expect(differenceRatio(asMatrix(choleskyReal(a.re, 7), 7), l)).toBeLessThan(1);
  });

  it('refuses what is not definite, square or finite', () => {
    const swap = { ...zeros(2), im: Float64Array.of(0, -1, 1, 0) };
    expect(() => choleskyComplex(swap)).toThrow(expect.objectContaining({ code: 'not-positive-definite' }));
    expect(() => choleskyComplex(zeros(2, 3))).toThrow(expect.objectContaining({ code: 'dimension-mismatch' }));
    const infinite = { ...identity(1), im: Float64Array.of(Infinity) };
    expect(() => choleskyComplex(infinite)).toThrow(expect.objectContaining({ code: 'not-finite' }));
  });
});

function definite(random: Random, n: number, complex: boolean): Record<string, ComplexMatrix> {
  const g = randomMatrix(random, n, n, complex);
  return {
    'well conditioned': wellConditioned(random, n, complex),
    'all equal': identity(n),
    'graded entries': gradedMatrix(random, n, complex),
    'graded spectrum': withSpectrum(random, grading(n), complex),
    'Gram matrix': multiply(adjoint(g), g),
  };
}

function expectLowerTriangular(l: ComplexMatrix): void {
  for (let i = 0; i < l.rows; i++) {
    expect(l.re[i * l.cols + i]).toBeGreaterThan(0);
    expect(l.im[i * l.cols + i]).toBe(0);
    for (let j = i + 1; j < l.cols; j++) expect([l.re[i * l.cols + j], l.im[i * l.cols + j]]).toEqual([0, 0]);
  }
}
