import { describe, expect, it } from 'vitest';
import {
  multiplyAdjoint,
  multiplyBySimd,
  multiplyPlainly,
  type Panel,
  type ProductOptions,
  type ProductShape,
} from '../../../src/programme/kernels/multiply-adjoint.js';
import { SimdKernel } from '../../../src/programme/kernels/simd-kernel.js';
import { seededRandom, type Random } from '../../../src/random.js';
import { EPSILON } from '../../../src/tolerances.js';
import { expectBelow } from '../../linalg/support/expect-close.js';

/** A panel of random rows with gaps between them, and a start that is not 0. */
function randomPanel(random: Random, rows: number, length: number): Panel {
  const stride = length + 3;
  const imaginary = rows * stride + 1;
  return { data: Float64Array.from({ length: 2 * imaginary + 5 }, () => random.normal()), start: 5, stride, imaginary };
}

/** C + factor · A B* entry by entry, in the order of the definition. */
function expected(c: Panel, a: Panel, b: Panel, shape: ProductShape, options: ProductOptions): Float64Array {
  const [rows, cols, inner] = shape;
  const out = c.data.slice();
  const { factor = 1, accumulate = false, complex } = options;
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < inner; k++) {
        const p = a.start + i * a.stride + k;
        const q = b.start + j * b.stride + k;
        const y = complex ? a.data[p + a.imaginary] : 0;
        const v = complex ? b.data[q + b.imaginary] : 0;
        re += a.data[p] * b.data[q] + y * v;
        im += y * b.data[q] - a.data[p] * v;
      }
      const target = c.start + i * c.stride + j;
      out[target] = (accumulate ? out[target] : 0) + factor * re;
      if (complex) out[target + c.imaginary] = (accumulate ? out[target + c.imaginary] : 0) + factor * im;
    }
  }
  return out;
}

function largestDifference(x: Float64Array, y: Float64Array): number {
  return x.reduce((top, value, k) => Math.max(top, Math.abs(value - y[k])), 0);
}

const SHAPES: ProductShape[] = [
  [1, 1, 0],
  [1, 1, 1],
  [1, 3, 2],
  [4, 2, 6],
  [5, 7, 3],
  [8, 8, 8],
  [13, 6, 11],
  [17, 30, 29],
  [33, 34, 35],
  [3, 2, 1300],
  [0, 4, 5],
  [4, 0, 5],
];
const OPTIONS: ProductOptions[] = [
  { complex: false },
  { complex: true },
  { complex: false, factor: -2, accumulate: true },
  { complex: true, factor: 0.5, accumulate: true },
];

describe('multiplyAdjoint', () => {
  const kernel = SimdKernel.create();

  it('has its WebAssembly kernel here', () => {
    expect(kernel).not.toBeNull();
  });

  for (const shape of SHAPES) {
    it(`agrees with the definition in all paths at ${shape.join('×')}`, () => {
      const random = seededRandom(shape.join());
      const [rows, cols, inner] = shape;
      for (const options of OPTIONS) {
        const a = randomPanel(random, rows, inner);
        const b = randomPanel(random, cols, inner);
        const c = randomPanel(random, rows, cols);
        const right = expected(c, a, b, shape, options);
        const paths = {
          plain: (out: Panel) => multiplyPlainly(out, a, b, shape, options),
          wasm: (out: Panel) => multiplyBySimd(kernel!, out, a, b, shape, options),
          chosen: (out: Panel) => multiplyAdjoint(out, a, b, shape, options),
        };
        for (const [name, path] of Object.entries(paths)) {
          if (rows * cols === 0 && name === 'wasm') continue;
          const out = { ...c, data: c.data.slice() };
          path(out);
          // Sums of `inner` products of normal numbers, in another order.
          expectBelow(
            largestDifference(out.data, right),
            64 * (inner + 1) * EPSILON,
            `${name} ${JSON.stringify(options)}`,
          );
        }
      }
    });
  }

  it('takes the WebAssembly path for large products and the plain one for small: the sums differ in their last bits', () => {
    const random = seededRandom('paths');
    const bits = (n: number): boolean[] => {
      const a = randomPanel(random, n, n);
      const b = randomPanel(random, n, n);
      const run = (path: (out: Panel) => void): Float64Array => {
        const out = { data: new Float64Array(n * n), start: 0, stride: n, imaginary: 0 };
        path(out);
        return out.data;
      };
      const shape = [n, n, n] as const;
      const chosen = run((out) => multiplyAdjoint(out, a, b, shape, { complex: false }));
      const plain = run((out) => multiplyPlainly(out, a, b, shape, { complex: false }));
      const simd = run((out) => multiplyBySimd(kernel!, out, a, b, shape, { complex: false }));
      return [largestDifference(chosen, plain) > 0, largestDifference(chosen, simd) > 0];
    };
    expect(bits(40)).toEqual([true, false]);
    expect(bits(8)).toEqual([false, true]);
  });
});
