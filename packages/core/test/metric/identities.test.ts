import { describe, expect, it } from 'vitest';
import { type BlockAlgebra, blockAlgebra, fromCoordinates, toCoordinates } from '../../src/algebra/block-algebra.js';
import { entropyProduction } from '../../src/entropy/entropy-production.js';
import { relativeEntropy } from '../../src/entropy/relative-entropy.js';
import { applyGeneratorAdjoint, generatorMatrix } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  adjoint,
  commutator,
  frobeniusNorm,
  fromEntries,
  innerProduct,
  multiply,
  scale,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { expmReal } from '../../src/linalg/expm-real.js';
import { hermitianLog } from '../../src/linalg/matrix-function.js';
import { metricModel } from '../../src/metric/metric-model.js';
import { operatorMean } from '../../src/metric/operator-mean.js';
import { type Quotient, quotientAt } from '../../src/metric/quotient.js';
import { fromFrame } from '../../src/metric/state-frame.js';
import { hermitianParameters } from '../../src/metric/state-parameters.js';
import { type Random, seededRandom } from '../../src/random.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import type { FixedPoints } from '../../src/structure/fixed-points.js';
import { analyse } from '../../src/structure/structure.js';
import { derivativeAtZero } from '../helpers/derivative-at-zero.js';
import { metricForm, multiplication } from '../helpers/plain-metric.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectBelow } from '../linalg/support/expect-close.js';

const BLOCKS = [[2], [3], [4], [2, 1], [2, 2], [1, 1, 2], [1, 1, 1, 1]];
const COUNT = 50;

/** Bound on every residual, relative to the size of what is compared. */
const RESIDUAL = 1e-11;

const SAMPLES = Array.from({ length: COUNT }, (_, seed) => sample(seed));

describe(`on ${COUNT} random GNS-symmetric generators`, () => {
  it('chain rule: [ρ]_ω[V, log ρ − log σ] = e^{−ω/2}Vρ − e^{ω/2}ρV for every jump', () => {
    everywhere(({ algebra, jumps, rho, potential }) =>
      Math.max(
        ...jumps.map(({ matrix: v, frequency }) => {
          const left = multiplication(algebra, rho, frequency, commutator(v, potential));
          const right = scale(multiply(v, rho), Math.exp(-frequency / 2));
          addScaledInto(right, multiply(rho, v), -Math.exp(frequency / 2));
          return frobeniusNorm(subtract(left, right)) / (frobeniusNorm(v) * frobeniusNorm(rho));
        }),
      ),
    );
  });

  it('gradient flow: L†ρ = −Σ_j [V_j*, [ρ]_{ω_j}[V_j, log ρ − log σ]]', () => {
    everywhere(({ algebra, jumps, rho, flow, potential }) => {
      const sum = zeros(algebra.size);
      for (const { matrix: v, frequency } of jumps) {
        const moved = multiplication(algebra, rho, frequency, commutator(v, potential));
        addScaledInto(sum, commutator(adjoint(v), moved), 1);
      }
      return frobeniusNorm(addScaledInto(sum, flow, 1)) / frobeniusNorm(flow);
    });
  });

  it('entropy production: −Tr L†ρ(log ρ − log σ) = ‖log ρ − log σ‖²_ρ, in the library as by hand', () => {
    everywhere(({ algebra, structure, jumps, rho, potential, production, quotient }) =>
      Math.max(
        ...[
          metricForm(algebra, jumps, rho, potential),
          quotient(potential).metric,
          entropyProduction(structure, rho),
        ].map((value) => Math.abs(value / production - 1)),
      ),
    );
  });

  it('dD/dt = −I along the flow', () => {
    everywhere(({ sigma, production, radius, stateAt }) => {
      const slope = derivativeAtZero((t) => relativeEntropy(stateAt(t), sigma), radius);
      return Math.abs(slope / production + 1);
    });
  });

  it('d²D/dt² = 2q_ρ(log ρ − log σ) along the flow', () => {
    everywhere(({ structure, potential, production, norm, radius, stateAt, quotient }) => {
      const slope = derivativeAtZero((t) => entropyProduction(structure, stateAt(t)), radius);
      const { curvature } = quotient(potential);
      return Math.abs(slope + 2 * curvature) / (norm * production);
    });
  });

  it('−log(‖P_tA‖²_ρ/‖A‖²_{P_t†ρ})/(2t) → q_ρ(A)/‖A‖²_ρ as t → 0', () => {
    everywhere(({ algebra, jumps, rho, observable, norm, radius, stateAt, observableAt, quotient }) => {
      const rate = derivativeAtZero((t) => {
        const ahead = metricForm(algebra, jumps, rho, observableAt(t));
        return -0.5 * Math.log(ahead / metricForm(algebra, jumps, stateAt(t), observable));
      }, radius);
      const { curvature, metric } = quotient(observable);
      return Math.abs(rate - curvature / metric) / norm;
    });
  });
});

/** Hold the largest residual to the bound; a failure names the seed. */
function everywhere(residual: (s: Sample) => number): void {
  expect(SAMPLES.length).toBe(COUNT);
  SAMPLES.forEach((s, seed) => expectBelow(residual(s), RESIDUAL, `seed ${seed}, blocks [${s.algebra.blocks.join()}]`));
}

type Sample = ReturnType<typeof sample>;

/** A random model that moves something, with a random state and a random observable that is not self-adjoint. */
function sample(seed: number) {
  const algebra = blockAlgebra(BLOCKS[seed % BLOCKS.length]);
  const random = seededRandom(`identities ${seed}`);
  const structure = movingModel(algebra, random);
  const canonical = structure.canonical as CanonicalForm;
  const { sigma } = canonical.state;
  const model = metricModel(canonical, structure.fixedPoints as FixedPoints);
  const parameters = hermitianParameters(algebra);
  const frame = parameters.frame(Float64Array.from({ length: parameters.count }, () => 0.7 * random.normal()));
  const rho = fromFrame(frame);
  const observable = randomElement(algebra, random);
  const flow = applyGeneratorAdjoint(structure.generator, rho);
  const potential = subtract(fromFrame({ ...frame, lambda: frame.lambda.map(Math.log) }), hermitianLog(sigma));
  const norm = Math.hypot(...generatorMatrix(structure.generator));
  const evolve = evolution(structure.generator);
  return {
    algebra,
    structure,
    jumps: canonical.jumps,
    sigma,
    rho,
    observable,
    flow,
    /** log ρ − log σ. */
    potential,
    /** −Tr L†ρ(log ρ − log σ). */
    production: -innerProduct(flow, potential).re,
    /** ‖L‖_F. */
    norm,
    /** A fifth of the time in which the flow could reach the boundary, and of 1/‖L‖: all below is analytic well beyond. */
    radius: 0.2 / Math.max(norm, frobeniusNorm(flow) / Math.min(...frame.lambda)),
    stateAt: (t: number) => evolve(t, rho, true),
    observableAt: (t: number) => evolve(t, observable, false),
    quotient: (a: ComplexMatrix): Quotient => quotientAt(model, operatorMean('logarithmic'), frame, a),
  };
}

function movingModel(algebra: BlockAlgebra, random: Random) {
  for (;;) {
    const structure = analyse(randomBalancedGenerator(algebra, random).generator);
    if (structure.canonical && structure.canonical.jumps.length > 0) return structure;
  }
}

function randomElement(algebra: BlockAlgebra, random: Random): ComplexMatrix {
  const n = algebra.size;
  return fromEntries(n, n, (i, j) =>
    algebra.blockOf[i] === algebra.blockOf[j] ? [random.normal(), random.normal()] : [0, 0],
  );
}

/** P_t A, or P_t†ρ, by the exponential of the D×D matrix of L; t may be negative. */
function evolution(generator: Generator): (t: number, a: ComplexMatrix, onStates: boolean) => ComplexMatrix {
  const { algebra } = generator;
  const d = algebra.dimension;
  const l = generatorMatrix(generator);
  return (t, a, onStates) => {
    const e = expmReal(
      l.map((x) => t * x),
      d,
    );
    const moved = (x: Float64Array): ComplexMatrix => {
      const y = new Float64Array(d);
      for (let k = 0; k < d; k++) for (let i = 0; i < d; i++) y[k] += (onStates ? e[i * d + k] : e[k * d + i]) * x[i];
      return fromCoordinates(algebra, y);
    };
    const imaginary = scale(a, 0, -1);
    return addScaledInto(moved(toCoordinates(algebra, a)), moved(toCoordinates(algebra, imaginary)), 0, 1);
  };
}
