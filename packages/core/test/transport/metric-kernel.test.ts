import { describe, expect, it } from 'vitest';
import { blockAlgebra, fromCoordinates, toCoordinates } from '../../src/algebra/block-algebra.js';
import { blockEigen } from '../../src/algebra/block-eigen.js';
import { operatorMean } from '../../src/metric/operator-mean.js';
import { quotientAt } from '../../src/metric/quotient.js';
import { type Random, seededRandom } from '../../src/random.js';
import { metricOf } from '../../src/sheet/run-sheet-task.js';
import { analyse } from '../../src/structure/structure.js';
import { matrixKernel } from '../../src/transport/matrix-kernel.js';
import { type MetricKernel, metricKernel } from '../../src/transport/metric-kernel.js';
import { secondSlope } from '../../src/transport/second-differences.js';
import { randomChain } from '../entropy/models.js';
import { randomState } from '../entropy/random-states.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectAllClose, expectClose } from '../linalg/support/expect-close.js';

const BLOCKS = [[2], [3], [2, 1], [1, 1, 2], [1, 1, 1, 1]];
const STEP = 1e-5;

interface Case {
  readonly kernel: MetricKernel;
  readonly rho: Float64Array;
  readonly a: Float64Array;
  readonly eta: Float64Array;
}

const vector = (length: number, random: Random): Float64Array => Float64Array.from({ length }, () => random.normal());

function cases(): Case[] {
  const random = seededRandom('metric kernel');
  return BLOCKS.flatMap((blocks) =>
    [0, 1].map(() => {
      const algebra = blockAlgebra(blocks);
      const structure = analyse(randomBalancedGenerator(algebra, random).generator);
      const d = algebra.dimension;
      const rho = toCoordinates(algebra, randomState(algebra, random, 0.5));
      return { kernel: metricKernel(metricOf(structure)), rho, a: vector(d, random), eta: vector(d, random) };
    }),
  );
}

function along(kernel: MetricKernel, rho: Float64Array, eta: Float64Array, step: number) {
  const at = kernel.at(rho.map((x, i) => x + step * eta[i]));
  if (!at) throw new Error('the step left the faithful states');
  return at;
}

const times = (m: Float64Array, x: Float64Array): Float64Array =>
  x.map((_, i) => x.reduce((sum, value, j) => sum + m[i * x.length + j] * value, 0));

const dot = (x: Float64Array, y: Float64Array): number => x.reduce((sum, value, i) => sum + value * y[i], 0);

describe('the metric kernel', () => {
  it('is the metric form of the curvature pencil', () => {
    for (const { kernel, rho, a } of cases()) {
      const { algebra } = kernel.model;
      const { values, vectors } = blockEigen(algebra, fromCoordinates(algebra, rho));
      const frame = { lambda: values, u: vectors };
      const { metric } = quotientAt(kernel.model, operatorMean('logarithmic'), frame, fromCoordinates(algebra, a));
      const at = along(kernel, rho, rho, 0);
      expectClose(dot(a, times(at.metric(), a)), metric, 1e-12 * metric, 'form');
      expectClose(dot(at.gradient(a), rho), metric, 1e-12 * metric, 'homogeneity');
    }
  });

  it('has the derivatives that differences show', () => {
    for (const { kernel, rho, a, eta } of cases()) {
      const at = along(kernel, rho, eta, 0);
      const [ahead, behind] = [along(kernel, rho, eta, STEP), along(kernel, rho, eta, -STEP)];
      const half = (x: Float64Array, y: Float64Array) => x.map((value, i) => (value - y[i]) / (2 * STEP));
      const [gradient, hessian] = [at.gradient(a), times(at.hessian(a), eta)];
      const slopes = half(ahead.gradient(a), behind.gradient(a));
      const size = 1e-6 * Math.max(1, ...slopes.map(Math.abs));
      expectAllClose(hessian, slopes, size, 'hessian');
      expectAllClose(times(at.mixed(a), eta), half(times(ahead.metric(), a), times(behind.metric(), a)), size, 'mixed');
      const [above, below] = [ahead, behind].map((end) => dot(a, times(end.metric(), a)));
      expectClose(dot(gradient, eta), (above - below) / (2 * STEP), size, 'gradient');
    }
  });

  it('on chains agrees with the kernel of matrices', () => {
    const random = seededRandom('chains');
    for (const n of [2, 3, 5]) {
      const model = metricOf(randomChain(n, random));
      const [rho, a] = [Float64Array.from({ length: n }, () => 0.1 + random.uniform()), vector(n, random)];
      const [quick, plain] = [metricKernel(model).at(rho), matrixKernel(model).at(rho)];
      if (!quick || !plain) throw new Error('expected a faithful state');
      expectAllClose(quick.metric(), plain.metric(), 1e-12, 'metric');
      expectAllClose(quick.gradient(a), plain.gradient(a), 1e-11, 'gradient');
      expectAllClose(quick.mixed(a), plain.mixed(a), 1e-11, 'mixed');
      expectAllClose(quick.hessian(a), plain.hessian(a), 1e-4, 'hessian');
    }
  });

  it('refuses matrices that are not positive definite', () => {
    const [{ kernel, rho }] = cases();
    expect(kernel.at(rho.map((x) => -x))).toBeNull();
    expect(kernel.isFaithful(rho.map((x) => -x))).toBe(false);
    expect(kernel.isFaithful(rho)).toBe(true);
  });

  it('joins the series of the second derivative of Λ to its closed form', () => {
    for (const z of [1.9999, 2.0001]) {
      const [x, y] = [1, Math.exp(z)];
      const h = 1e-4;
      const mean = (s: number) => (s - y) / Math.log(s / y);
      expectClose(secondSlope(x, y), (mean(x + h) - 2 * mean(x) + mean(x - h)) / (h * h), 1e-6, `at ${z}`);
    }
    // Λ_xx(x,x) = −1/(6x).
    expectClose(secondSlope(2, 2), -1 / 12, 1e-15, 'on the diagonal');
  });
});
