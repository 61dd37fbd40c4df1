import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import type { Generator } from '../../src/generator/generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { depolarising } from '../../src/families/index.js';
import { directSum, multiply, multiplyAdjointFirst } from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { scaleSparse } from '../../src/generator/lindblad-generator.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { expectAllClose, expectClose } from '../linalg/support/expect-close.js';

/** What must not depend on how a model is written: weights, kind, fixed points, and Σ‖V‖² at each frequency. */
function invariants(g: Generator) {
  const { state, symmetry, fixedPoints, canonical } = analyse(g);
  const byFrequency = new Map<string, number>();
  for (const { frequency, norm } of canonical?.jumps ?? []) {
    const key = (Math.abs(frequency) < 1e-6 ? 0 : frequency).toFixed(5);
    byFrequency.set(key, (byFrequency.get(key) ?? 0) + norm * norm);
  }
  const sorted = [...byFrequency].sort((a, b) => Number(a[0]) - Number(b[0]));
  return {
    weights: [...(state?.values ?? [])].sort((a, b) => a - b),
    kind: symmetry.kind,
    blocks: fixedPoints?.blocks,
    primitive: fixedPoints?.primitive,
    frequencies: sorted.map(([key]) => key),
    strengths: sorted.map(([, value]) => value),
  };
}

function expectSame(a: Generator, b: Generator, strength = 1): void {
  const [x, y] = [invariants(a), invariants(b)];
  expect({ kind: y.kind, blocks: y.blocks, primitive: y.primitive, frequencies: y.frequencies }).toEqual({
    kind: x.kind,
    blocks: x.blocks,
    primitive: x.primitive,
    frequencies: x.frequencies,
  });
  expectAllClose(y.weights, x.weights, 1e-11, 'weight');
  expectAllClose(y.strengths.map((v) => v / strength), x.strengths, 1e-9 * (1 + Math.max(0, ...x.strengths)), 'strength'); // prettier-ignore
}

const MODELS = Array.from({ length: 12 }, (_, seed) => {
  const random = seededRandom(`invariance ${seed}`);
  const blocks = [[3], [2, 1], [2, 2], [4]][seed % 4];
  return { random, g: randomBalancedGenerator(blockAlgebra(blocks), random).generator };
});

describe('the structure does not depend on', () => {
  it('a unitary of the algebra', () => {
    for (const { random, g } of MODELS) {
      const u = directSum(g.algebra.blocks.map((n) => randomUnitary(random, n)));
      const rotated: Generator = {
        ...g,
        declaredState: g.declaredState && multiplyAdjointFirst(u, multiply(g.declaredState, u)),
        jumps: g.jumps.map(({ matrix }) => ({
          matrix: sparseFromDense(multiplyAdjointFirst(u, multiply(denseFromSparse(matrix), u))),
        })),
      };
      expectSame(g, rotated);
    }
  });

  it('the order of the jumps, their phases and their mixing', () => {
    for (const { random, g } of MODELS) {
      expectSame(g, { ...g, jumps: [...g.jumps].reverse() });
      const [c, s] = [Math.cos(1), Math.sin(1)];
      const turned = g.jumps.map(({ matrix: r }) => ({
        matrix: { ...r, re: r.re.map((x, k) => c * x - s * r.im[k]), im: r.im.map((y, k) => c * y + s * r.re[k]) },
      }));
      expectSame(g, { ...g, jumps: turned });
      if (g.algebra.blocks.length > 1) continue;
      const n = g.algebra.size;
      const mixing = randomUnitary(random, g.jumps.length);
      const mixed = g.jumps.map((_, k) => {
        const out = { rows: n, cols: n, re: new Float64Array(n * n), im: new Float64Array(n * n) };
        g.jumps.forEach(({ matrix }, j) => {
          const r = denseFromSparse(matrix);
          const [x, y] = [mixing.re[k * mixing.cols + j], mixing.im[k * mixing.cols + j]];
          r.re.forEach((value, at) => {
            out.re[at] += x * value - y * r.im[at];
            out.im[at] += x * r.im[at] + y * value;
          });
        });
        return { matrix: sparseFromDense(out) };
      });
      expectSame(g, { ...g, jumps: mixed });
    }
  });

  it('the unit of time, except in proportion', () => {
    for (const { g } of MODELS) {
      for (const factor of [1e-8, 7, 1e8]) {
        const jumps = g.jumps.map(({ matrix }) => ({ matrix: scaleSparse(matrix, Math.sqrt(factor)) }));
        expectSame(g, { ...g, jumps }, factor);
      }
    }
  });
});

describe('a tensor product', () => {
  it('is symmetric and primitive when its factors are, with jumps of both', () => {
    for (const { g } of MODELS.slice(0, 4)) {
      const product = analyse(tensorGenerator([g, depolarising(2)]));
      const factor = analyse(g);
      expect(product.fixedPoints?.blocks).toEqual(factor.fixedPoints?.blocks);
      expect(['tracial', 'GNS']).toContain(product.symmetry.kind);
      const strength = (jumps: readonly { norm: number }[] = []) =>
        jumps.reduce((sum, jump) => sum + jump.norm ** 2, 0);
      const expected = 2 * strength(factor.canonical?.jumps) + g.algebra.size * 0.75;
      expectClose(strength(product.canonical?.jumps), expected, 1e-10 * expected, 'Σ‖V‖²');
    }
  });

  it('has the fixed points of the product', () => {
    const half = randomBalancedGenerator(blockAlgebra([2]), seededRandom('left alone')).generator;
    const idle = { ...half, jumps: [], declaredState: null };
    const product = analyse(tensorGenerator([depolarising(2), idle]));
    expect(product.fixedPoints).toMatchObject({ dimension: 4, blocks: [2], primitive: false });
  });
});
