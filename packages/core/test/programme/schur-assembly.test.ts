import { describe, expect, it } from 'vitest';
import { adjoint, innerProduct, multiply, type ComplexMatrix } from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { conePattern, type ConePattern } from '../../src/programme/cone-pattern.js';
import { type ProgrammeBlock } from '../../src/programme/programme.js';
import { SchurAssembly } from '../../src/programme/schur-assembly.js';
import { schurPlan } from '../../src/programme/schur-plan.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectBelow } from '../linalg/support/expect-close.js';
import { randomHermitian, randomPositive } from './support/random-programme.js';

interface Case {
  readonly kind: 'symmetric' | 'hermitian';
  readonly size: number;
  readonly densities: readonly number[];
}

const CASES: Record<string, Case> = {
  'sparse real': { kind: 'symmetric', size: 12, densities: Array<number>(9).fill(0.03) },
  'sparse complex': { kind: 'hermitian', size: 12, densities: Array<number>(9).fill(0.03) },
  'full real': { kind: 'symmetric', size: 9, densities: Array<number>(5).fill(1) },
  'full complex': { kind: 'hermitian', size: 9, densities: Array<number>(5).fill(1) },
  'mixed real': { kind: 'symmetric', size: 25, densities: [1, 0.7, 0.4, 0.2, 0.1, 0.05, 0.02, 0.01, 1, 0.3] },
  'mixed complex': { kind: 'hermitian', size: 25, densities: [1, 0.7, 0.4, 0.2, 0.1, 0.05, 0.02, 0.01, 1, 0.3] },
  'more unknowns than one batch': {
    kind: 'hermitian',
    size: 10,
    densities: Array.from({ length: 71 }, (_, i) => (i % 7 === 0 ? 0.9 : 0.05)),
  },
};

function randomBlock({ kind, size, densities }: Case, random: Random): ProgrammeBlock {
  const matrices = densities.map((density) => randomHermitian(size, kind, density, random));
  // One entry each at least, so that every unknown occurs.
  matrices.forEach((a, i) => (a.re[(i % size) * (size + 1)] = 1 + i));
  return {
    kind,
    size,
    constant: sparseFromDense(randomHermitian(size, kind, 1, random)),
    coefficients: matrices.map((a, unknown) => ({ unknown, matrix: sparseFromDense(a) })),
  };
}

/** In the numbering of the pattern. */
function flat(a: ComplexMatrix, { indices, size, complex }: ConePattern): Float64Array {
  const out = new Float64Array(size * size * (complex ? 2 : 1));
  for (let p = 0; p < size; p++) {
    for (let q = 0; q < size; q++) {
      out[p * size + q] = a.re[indices[p] * a.cols + indices[q]];
      if (complex) out[size * size + p * size + q] = a.im[indices[p] * a.cols + indices[q]];
    }
  }
  return out;
}

describe('SchurAssembly', () => {
  it.each(Object.keys(CASES))('%s: every pair is Re Tr A_i X A_j S⁻¹', (name) => {
    const random = seededRandom(name);
    const { kind, size, densities } = CASES[name];
    const block = randomBlock(CASES[name], random);
    const indices = Int32Array.from({ length: size }, (_, p) => p);
    const pattern = conePattern(block, { block: 0, indices }, () => true);
    expect(pattern.complex).toBe(kind === 'hermitian');
    const x = randomPositive(size, kind, size, random);
    const inverse = randomPositive(size, kind, size, random);
    const m = densities.length;
    const matrix = new Float64Array(m * m);
    new SchurAssembly(pattern).add(flat(x, pattern), flat(inverse, pattern), matrix, m);
    const coefficients = block.coefficients.map((c) => denseFromSparse(c.matrix));
    let largest = 0;
    let worst = 0;
    for (let i = 0; i < m; i++) {
      for (let j = 0; j <= i; j++) {
        const product = multiply(multiply(x, coefficients[j]), inverse);
        const right = innerProduct(adjoint(coefficients[i]), product).re;
        const found = i === j ? matrix[i * m + i] : matrix[i * m + j] + matrix[j * m + i];
        if (i !== j) expect(Math.min(Math.abs(matrix[i * m + j]), Math.abs(matrix[j * m + i]))).toBe(0);
        largest = Math.max(largest, Math.abs(right));
        worst = Math.max(worst, Math.abs(found - right));
      }
    }
    expectBelow(worst / largest, 1e-13, 'error relative to the largest entry');
  });

  it('takes each of the ways in these cases', () => {
    const plans = Object.keys(CASES).map((name) => {
      const block = randomBlock(CASES[name], seededRandom(name));
      const indices = Int32Array.from({ length: block.size }, (_, p) => p);
      return schurPlan(conePattern(block, { block: 0, indices }, () => true));
    });
    for (const choice of ['denseProduct', 'wholeMatrix'] as const) {
      const taken = new Set(plans.flatMap((plan) => [...plan[choice]]));
      expect(taken, choice).toEqual(new Set([0, 1]));
    }
  });
});
