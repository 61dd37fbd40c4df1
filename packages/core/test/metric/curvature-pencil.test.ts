import { describe, expect, it } from 'vitest';
import { blockAlgebra, fromCoordinates } from '../../src/algebra/block-algebra.js';
import { zeros } from '../../src/linalg/complex-matrix.js';
import { chainPencil } from '../../src/metric/chain-pencil.js';
import { curvaturePencil, densePencil } from '../../src/metric/curvature-pencil.js';
import { metricModel } from '../../src/metric/metric-model.js';
import { MEAN_NAMES, operatorMean } from '../../src/metric/operator-mean.js';
import { quotientAt } from '../../src/metric/quotient.js';
import { hermitianParameters } from '../../src/metric/state-parameters.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import type { FixedPoints } from '../../src/structure/fixed-points.js';
import { expectWithin } from '../helpers/bracket-of.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';

const ALGEBRAS = [[2], [3], [4], [2, 1], [2, 2], [1, 1, 2]];

function modelOf(blocks: number[], seed: number) {
  const algebra = blockAlgebra(blocks);
  const { canonical, fixedPoints } = analyse(randomBalancedGenerator(algebra, seededRandom(seed)).generator);
  const model = metricModel(canonical as CanonicalForm, fixedPoints as FixedPoints);
  return { algebra, model, parameters: hermitianParameters(algebra) };
}

describe.each(MEAN_NAMES)('the curvature pencil, %s mean', (mean) => {
  it.each(ALGEBRAS.map((blocks, k) => [blocks, k] as const))('agrees on %j with the plain evaluation', (blocks, k) => {
    const { model, parameters } = modelOf(blocks, 11 + k);
    const random = seededRandom(`state ${k}`);
    const frame = parameters.frame(Float64Array.from({ length: parameters.count }, () => random.normal()));
    const { kappa, observable } = curvaturePencil(model, mean).at(frame);
    const q = quotientAt(model, operatorMean(mean), frame, observable);
    expectWithin(q.metric, 1, 1e-10, 'norm of the minimiser');
    expectWithin(q.curvature / q.metric, kappa, 1e-10 * (1 + Math.abs(kappa)), 'κ');
    // No other observable does better: κ is the smallest eigenvalue.
    for (let trial = 0; trial < 5; trial++) {
      const x = Float64Array.from({ length: parameters.count }, () => random.normal());
      const other = quotientAt(model, operatorMean(mean), frame, fromCoordinates(model.algebra, x));
      expect(other.curvature / other.metric).toBeGreaterThanOrEqual(kappa - 1e-9);
    }
  });

  it('has the gradient of its central difference', () => {
    const { model, parameters } = modelOf([3], 5);
    const random = seededRandom('gradient');
    const x = Float64Array.from({ length: parameters.count }, () => 0.7 * random.normal());
    const pencil = curvaturePencil(model, mean);
    const slope = zeros(3);
    const gradient = new Float64Array(parameters.count);
    const frame = parameters.frame(x);
    pencil.withGradient(frame, slope);
    parameters.pullBack(frame, slope, gradient);
    gradient.forEach((value, k) => {
      const at = (h: number): number => pencil.at(parameters.frame(x.map((v, i) => (i === k ? v + h : v)))).kappa;
      expectWithin(value, (at(1e-5) - at(-1e-5)) / 2e-5, 1e-7 * (1 + Math.abs(value)), `component ${k}`);
    });
  });

  it('takes the chain path on commutative algebras, equal to the dense one', () => {
    const { model } = modelOf([1, 1, 1, 1], 3);
    const random = seededRandom('chain');
    const lambda = Float64Array.from({ length: 4 }, () => Math.exp(random.normal()));
    const chain = chainPencil(model, mean);
    const dense = densePencil(model, mean);
    expect(curvaturePencil(model, mean).at.toString()).toBe(chain.at.toString());
    expectWithin(chain.at({ lambda, u: null }).kappa, dense.at({ lambda, u: null }).kappa, 1e-11, 'κ');
    const [a, b] = [zeros(4), zeros(4)];
    chain.withGradient({ lambda, u: null }, a);
    dense.withGradient({ lambda, u: null }, b);
    for (let i = 0; i < 16; i += 5) expectWithin(a.re[i], b.re[i], 1e-7, `gradient ${i}`);
  });
});
