import { describe, expect, it } from 'vitest';
import { identity, multiply, scale, zeros, type ComplexMatrix } from '../../src/linalg/complex-matrix.js';
import { packedComplexQR, qrComplex, unitaryColumns } from '../../src/linalg/qr-complex.js';
import { orthogonalColumns, packedQR, qrReal } from '../../src/linalg/qr-real.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectBelow } from './support/expect-close.js';
import { grading, randomMatrix } from './support/inputs.js';
import { asMatrix, differenceRatio, orthogonalityRatio, SOLVE_RATIO } from './support/ratios.js';

const SHAPES = [
  [0, 0],
  [0, 3],
  [3, 0],
  [1, 1],
  [4, 4],
  [7, 3],
  [3, 7],
  [40, 25],
] as const;

for (const [m, n] of SHAPES) {
  for (const complex of [false, true]) {
    for (const [family, a] of Object.entries(rectangular(seededRandom(`qr ${m} ${n}`), m, n, complex))) {
      describe(`QR of a ${complex ? 'complex' : 'real'} ${m} × ${n} matrix, ${family}`, () => {
        it('multiplies back, with orthonormal columns and a triangle', () => {
          checkFactors(a, qrComplex(a));
          if (complex) return;
          const k = Math.min(m, n);
          const { q, r } = qrReal(a.re, m, n);
          checkFactors(a, { q: asMatrix(q, m, k), r: asMatrix(r, k, n) });
        });

        it('completes Q to a full unitary', () => {
          expectBelow(orthogonalityRatio(unitaryColumns(packedComplexQR(a, true), 0, m)), SOLVE_RATIO, 'unitarity');
          if (complex) return;
          const q = asMatrix(orthogonalColumns(packedQR(a.re, m, n, true), 0, m), m);
          expectBelow(orthogonalityRatio(q), SOLVE_RATIO, 'orthogonality');
        });

        it('orders the diagonal of R when pivoting', () => {
          const { packed } = packedComplexQR(a, true);
          const size = (k: number): number => Math.hypot(packed.re[k * n + k], packed.im[k * n + k]);
          for (let k = 1; k < Math.min(m, n); k++) expect(size(k)).toBeLessThanOrEqual(size(k - 1) * (1 + 1e-14));
        });
      });
    }
  }
}

describe('packedQR', () => {
  it('applies its pivots to the columns', () => {
    const a = randomMatrix(seededRandom('pivots'), 5, 4, false);
    const { packed, pivots, scale: scales } = packedQR(a.re, 5, 4, true);
    const q = asMatrix(orthogonalColumns({ m: 5, n: 4, packed, scale: scales, pivots }, 0, 4), 5, 4);
    const r = asMatrix(packed.slice(0, 16), 4);
    for (let i = 0; i < 4; i++) for (let j = 0; j < i; j++) r.re[i * 4 + j] = 0;
    const permuted = zeros(5, 4);
    for (let i = 0; i < 5; i++) for (let j = 0; j < 4; j++) permuted.re[i * 4 + j] = a.re[i * 4 + pivots[j]];
    expectBelow(differenceRatio(permuted, multiply(q, r)), SOLVE_RATIO, 'factor ratio');
  });

  it('refuses entries that are not finite', () => {
    expect(() => packedQR(Float64Array.of(NaN), 1, 1, false)).toThrow(expect.objectContaining({ code: 'not-finite' }));
    const bad = { ...zeros(1), im: Float64Array.of(Infinity) };
    expect(() => qrComplex(bad)).toThrow(expect.objectContaining({ code: 'not-finite' }));
  });
});

function checkFactors(a: ComplexMatrix, { q, r }: { q: ComplexMatrix; r: ComplexMatrix }): void {
  const k = Math.min(a.rows, a.cols);
  expect([q.rows, q.cols, r.rows, r.cols]).toEqual([a.rows, k, k, a.cols]);
  expectBelow(orthogonalityRatio(q), SOLVE_RATIO, 'orthogonality ratio');
  expectBelow(differenceRatio(a, multiply(q, r)), SOLVE_RATIO, 'factor ratio');
  for (let i = 0; i < k; i++) {
    for (let j = 0; j < i; j++) expect([r.re[i * a.cols + j], r.im[i * a.cols + j]]).toEqual([0, 0]);
  }
}

function rectangular(random: Random, m: number, n: number, complex: boolean): Record<string, ComplexMatrix> {
  const plain = randomMatrix(random, m, n, complex);
  const column = randomMatrix(random, m, 1, complex);
  const columns = grading(n);
  return {
    'random normal': plain,
    zero: zeros(m, n),
    'all columns equal': multiply(column, { ...zeros(1, n), re: new Float64Array(n).fill(1) }),
    'graded columns': {
      ...plain,
      re: plain.re.map((x, k) => x * columns[k % n]),
      im: plain.im.map((x, k) => x * columns[k % n]),
    },
    'part of the identity': {
      rows: m,
      cols: n,
      re: identity(Math.max(m, n)).re.slice(0, m * n),
      im: new Float64Array(m * n),
    },
    'scaled by 1e-200': scale(plain, 1e-200),
    'scaled by 1e150': scale(plain, 1e150),
  };
}
