import { describe, expect, test } from 'vitest';
import { blockEigen } from '../../src/algebra/block-eigen.js';
import { encloseEntropyQuotient } from '../../src/enclosure/enclose-entropy.js';
import { encloseGradientEstimate } from '../../src/enclosure/enclose-gradient-estimate.js';
import { depolarising } from '../../src/families/depolarising.js';
import { thermalQubit } from '../../src/families/thermal-qubit.js';
import { truncatedOscillator } from '../../src/families/truncated-oscillator.js';
import { hermitianPart } from '../../src/linalg/complex-matrix.js';
import { fromFrame } from '../../src/metric/state-frame.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { over } from '../checker/arithmetic/big-float.js';
import { bigQuotient } from '../checker/arithmetic/big-quotient.js';
import { expectEnclosed } from '../checker/arithmetic/enclosure-checks.js';
import { graded, randomMatrix, randomUnitary } from '../checker/arithmetic/witness-models.js';
import { bigEntropyQuotients } from './big-entropy.js';

const MODELS = [
  ['depolarising qubit', depolarising(2)],
  ['thermal qubit', thermalQubit({ beta: 2 })],
  ['oscillator of three levels', truncatedOscillator({ levels: 3, beta: 1 })],
] as const;

describe.each(MODELS)('near the boundary of state space: %s', (name, generator) => {
  const structure = analyse(generator);
  const { algebra } = structure;
  const jumps = structure.canonical?.jumps ?? [];

  // Both forms are of the size of the smallest eigenvalue for some observables; the enclosure must then be wide, not wrong.
  test.each([1e-4, 1e-8, 1e-12])('smallest eigenvalue %e: values in 700 bits are enclosed', (smallest) => {
    const random = seededRandom(`boundary ${name} ${smallest}`);
    const lambda = Float64Array.from(graded(random, algebra.size, smallest));
    const total = lambda.reduce((sum, x) => sum + x, 0);
    const rho = fromFrame({ lambda: lambda.map((x) => x / total), u: randomUnitary(random, algebra.size) });
    const { values, vectors } = blockEigen(algebra, rho);
    const observable = hermitianPart(randomMatrix(random, algebra.size));
    const estimate = encloseGradientEstimate(structure, 'logarithmic', rho, observable);
    if (!estimate) throw new Error('expected an enclosure');
    const model = { blocks: algebra.blocks, jumps, mean: 'logarithmic' as const };
    const { curvature, metric } = bigQuotient(model, { lambda: [...values], u: vectors }, observable);
    expectEnclosed(estimate, over(curvature, metric), 'ge');
    expect((estimate.hi - estimate.lo) / Math.abs(estimate.hi)).toBeLessThan(1e-9);
    const tracial = structure.symmetry.kind === 'tracial';
    const sigma = tracial ? values.map(() => 1) : (structure.state?.values ?? []);
    const exact = bigEntropyQuotients({ jumps, sigma, frame: null }, { lambda: values, u: vectors, k: 1 });
    for (const constant of ['mlsi', 'lsi'] as const) {
      const found = encloseEntropyQuotient(structure, constant, rho, 1);
      if (!found) throw new Error('expected an enclosure');
      expectEnclosed(found, exact[constant], constant);
      expect((found.hi - found.lo) / found.hi).toBeLessThan(1e-9);
    }
  });

  test('nothing is claimed at a state that is not faithful', () => {
    const lambda = Float64Array.from({ length: algebra.size }, (_, k) => (k === 0 ? 1 : 0));
    const rho = fromFrame({ lambda, u: null });
    const observable = hermitianPart(randomMatrix(seededRandom(name), algebra.size));
    expect(encloseGradientEstimate(structure, 'logarithmic', rho, observable)).toBeNull();
    expect(encloseEntropyQuotient(structure, 'mlsi', rho, 1)).toBeNull();
  });
});
