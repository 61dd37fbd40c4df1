import { describe, expect, it } from 'vitest';
import {
  diagonal,
  frobeniusNorm,
  identity,
  kronecker,
  multiply,
  subtract,
  transpose,
  zeros,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import { nullSpace, nullSpaceReal } from '../../src/linalg/null-space.js';
import { svdComplex } from '../../src/linalg/svd-complex.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow } from './support/expect-close.js';
import { randomMatrix, randomUnitary } from './support/inputs.js';
import { asMatrix, orthogonalityRatio, SOLVE_RATIO } from './support/ratios.js';

describe('nullSpace', () => {
  for (const [m, n, rank] of [
    [0, 3, 0],
    [3, 0, 0],
    [1, 1, 0],
    [4, 4, 4],
    [6, 4, 2],
    [4, 6, 3],
    [30, 20, 13],
  ]) {
    for (const complex of [true, false]) {
      it(`spans the kernel of a ${complex ? 'complex' : 'real'} ${m} × ${n} matrix of rank ${rank}`, () => {
        const random = seededRandom(`null ${m} ${n}`);
        const a = multiply(randomMatrix(random, m, rank, complex), randomMatrix(random, rank, n, complex));
        const real = nullSpaceReal(a.re, m, n, 1e-10);
        const basis = complex ? nullSpace(a, 1e-10) : asMatrix(real.basis, n, real.dimension);
        expect([basis.rows, basis.cols]).toEqual([n, n - rank]);
        expectBelow(orthogonalityRatio(basis), SOLVE_RATIO, 'orthogonality ratio');
        expectBelow(frobeniusNorm(multiply(a, basis)), 1e-12, 'A times the basis');
      });
    }
  }

  it('counts singular values at most the tolerance, an absolute bound', () => {
    const random = seededRandom('count');
    const spectrum = [3, 1, 1e-3, 2e-8, 0.9e-8, 1e-9, 0];
    const a = multiply(multiply(randomUnitary(random, 7), diagonal(spectrum)), randomUnitary(random, 7));
    for (const [tolerance, count] of [
      [4, 7],
      [1e-2, 5],
      [1e-8, 3],
      [1e-8 / 2, 2],
      [1e-12, 1],
    ]) {
      const basis = nullSpace(a, tolerance);
      expect(basis.cols, `tolerance ${tolerance}`).toBe(count);
      expectBelow(svdComplex(multiply(a, basis)).s[0], tolerance, '‖A N‖');
    }
    expect(nullSpaceReal(new Float64Array(6), 2, 3, 0).dimension).toBe(3);
  });

  it('is not deceived by the matrix of Kahan, whose pivots hide its smallest singular value', () => {
    const n = 60;
    const c = 0.285;
    const s = Math.sqrt(1 - c * c);
    const kahan = zeros(n);
    // Slightly growing columns stop rounding from breaking the ties of the pivoting.
    for (let i = 0; i < n; i++) {
      for (let j = i; j < n; j++) kahan.re[i * n + j] = s ** i * (i === j ? 1 : -c) * (1 - j * 1e-13);
    }
    const values = svdComplex(kahan).s;
    const tolerance = 2 * values[n - 1];
    expect(values[n - 2]).toBeGreaterThan(tolerance);
    const real = nullSpaceReal(transpose(kahan).re, n, n, tolerance);
    expect(real.dimension).toBe(1);
    expectBelow(frobeniusNorm(multiply(transpose(kahan), asMatrix(real.basis, n, 1))), tolerance, '‖A x‖');
    // The same with complex pivots, and with a tolerance that the bounds of the factor settle by themselves.
    const phases = zeros(n);
    for (let i = 0; i < n; i++) {
      phases.re[i * n + i] = Math.cos(i * i);
      phases.im[i * n + i] = Math.sin(i * i);
    }
    const turned = multiply(phases, kahan);
    expect(nullSpace(turned, tolerance).cols).toBe(1);
    expect(nullSpace(turned, values[n - 1] / 20).cols).toBe(0);
  });

  it('finds the commutant of a spin: multiples of the identity', () => {
    const x = { ...zeros(2), re: Float64Array.of(0, 1, 1, 0) };
    const z = diagonal([1, -1]);
    const bracket = (h: ComplexMatrix): ComplexMatrix =>
      subtract(kronecker(h, identity(2)), kronecker(identity(2), transpose(h)));
    const stacked = { ...zeros(8, 4), re: Float64Array.of(...bracket(x).re, ...bracket(z).re) };
    const { basis, dimension } = nullSpaceReal(stacked.re, 8, 4, 1e-12);
    expect(dimension).toBe(1);
    expect(Math.abs(basis[0])).toBeCloseTo(Math.SQRT1_2, 14);
    expect(basis[3]).toBeCloseTo(basis[0], 14);
    expect(Math.hypot(basis[1], basis[2])).toBeLessThan(1e-15);
  });
});
