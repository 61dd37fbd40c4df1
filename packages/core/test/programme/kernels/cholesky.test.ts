import { describe, expect, it } from 'vitest';
import { choleskyFactor } from '../../../src/programme/kernels/cholesky-factor.js';
import { choleskyInverse } from '../../../src/programme/kernels/cholesky-inverse.js';
import { solveLower, solveLowerAdjoint } from '../../../src/programme/kernels/triangular-solve.js';
import {
  frobeniusNorm,
  identity,
  multiply,
  multiplyAdjointSecond,
  subtract,
  type ComplexMatrix,
} from '../../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../../src/random.js';
import { EPSILON } from '../../../src/tolerances.js';
import { expectBelow } from '../../linalg/support/expect-close.js';
import { gradedMatrix, randomMatrix, wellConditioned } from '../../linalg/support/inputs.js';

const SIZES = [0, 1, 2, 3, 4, 5, 7, 8, 16, 47, 48, 49, 100, 131];
const LAW = 30;

/** n² real parts, then n² imaginary ones. */
function flat(a: ComplexMatrix, complex: boolean): Float64Array {
  return complex ? Float64Array.from([...a.re, ...a.im]) : a.re.slice();
}

function unflat(a: Float64Array, n: number, complex: boolean, lower = false): ComplexMatrix {
  const keep = (x: number, k: number): number => (lower && k % n > Math.floor(k / n) ? 0 : x);
  return {
    rows: n,
    cols: n,
    re: a.slice(0, n * n).map(keep),
    im: complex ? a.slice(n * n).map(keep) : new Float64Array(n * n),
  };
}

describe.each([false, true])('Cholesky kernels, complex: %s', (complex) => {
  it.each(SIZES)('factor, inverse and solves obey their laws at n = %i', (n) => {
    const random = seededRandom(`cholesky ${n} ${complex}`);
    for (const [name, a] of [
      ['well conditioned', wellConditioned(random, n, complex)],
      ['graded', gradedMatrix(random, n, complex)],
    ] as const) {
      const input = flat(a, complex);
      const l = new Float64Array(input.length).fill(NaN);
      expect(choleskyFactor(input, n, complex, l)).toBe(-1);
      const factor = unflat(l, n, complex, true);
      const unit = (n + 1) * frobeniusNorm(a) * EPSILON + Number.MIN_VALUE;
      expectBelow(frobeniusNorm(subtract(multiplyAdjointSecond(factor, factor), a)) / unit, LAW, `${name}: A − L L*`);
      if (name === 'graded') continue;
      const inverse = new Float64Array(input.length);
      choleskyInverse(l, n, complex, inverse, new Float64Array(input.length));
      const product = multiply(a, unflat(inverse, n, complex));
      expectBelow(frobeniusNorm(subtract(product, identity(n))) / ((n + 1) * EPSILON), LAW, `${name}: A A⁻¹ − 1`);
      const x = randomMatrix(random, n, 1, complex);
      const solution = Float64Array.from(complex ? [...x.re, ...x.im] : x.re);
      solveLower(l, n, complex, solution);
      solveLowerAdjoint(l, n, complex, solution);
      const image = multiply(a, {
        rows: n,
        cols: 1,
        re: solution.slice(0, n),
        im: complex ? solution.slice(n) : new Float64Array(n),
      });
      expectBelow(frobeniusNorm(subtract(image, x)) / ((n + 1) * EPSILON * 10), LAW, `${name}: A x − b`);
    }
  });

  it('names the first pivot that is not positive', () => {
    const a = wellConditioned(seededRandom(3), 60, complex);
    a.re[57 * 60 + 57] = -1;
    expect(choleskyFactor(flat(a, complex), 60, complex, new Float64Array((complex ? 2 : 1) * 3600))).toBe(57);
  });
});

it('skips pivots at their floors: the solution is that of the remaining rows, with zeros', () => {
  const n = 60;
  const a = wellConditioned(seededRandom(4), n, false);
  // Row 50 repeats row 10.
  for (let j = 0; j < n; j++) a.re[50 * n + j] = a.re[10 * n + j];
  for (let i = 0; i < n; i++) a.re[i * n + 50] = a.re[i * n + 10];
  const l = new Float64Array(n * n);
  const skipped = new Uint8Array(n);
  expect(choleskyFactor(a.re, n, false, l, { floors: new Float64Array(n).fill(1e-10), skipped })).toBe(-1);
  expect([...skipped].flatMap((flag, k) => (flag ? [k] : []))).toEqual([50]);
  const right = Float64Array.from({ length: n }, (_, i) => a.re[i * n + 3]);
  solveLower(l, n, false, right);
  solveLowerAdjoint(l, n, false, right);
  for (let i = 0; i < n; i++) expectBelow(Math.abs(right[i] - Number(i === 3)), 1e-13, `entry ${i}`);
});
