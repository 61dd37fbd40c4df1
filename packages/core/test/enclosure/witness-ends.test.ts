import { describe, expect, test } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { blockEigen } from '../../src/algebra/block-eigen.js';
import { mlsiAt } from '../../src/constants/mlsi-quotient.js';
import { lsiAt } from '../../src/constants/lsi-quotient.js';
import { encloseEntropyQuotient } from '../../src/enclosure/enclose-entropy.js';
import { encloseGradientEstimate } from '../../src/enclosure/enclose-gradient-estimate.js';
import { BOX_RADIUS } from '../../src/enclosure/limits.js';
import { modelBox } from '../../src/enclosure/model-box.js';
import { dephasing } from '../../src/families/dephasing.js';
import { depolarising } from '../../src/families/depolarising.js';
import { thermalQubit } from '../../src/families/thermal-qubit.js';
import { completeGraph } from '../../src/families/complete-graph.js';
import {
  type ComplexMatrix,
  addScaledInto,
  copy,
  directSum,
  hermitianPart,
  kronecker,
} from '../../src/linalg/complex-matrix.js';
import { fromFrame } from '../../src/metric/state-frame.js';
import { seededRandom, type Random } from '../../src/random.js';
import { analyse, type Structure } from '../../src/structure/structure.js';
import { bigQuotient } from '../checker/arithmetic/big-quotient.js';
import { over } from '../checker/arithmetic/big-float.js';
import { expectEnclosed, relativeWidth } from '../checker/arithmetic/enclosure-checks.js';
import { graded, randomMatrix, randomUnitary } from '../checker/arithmetic/witness-models.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { bigDephasingQuotient, bigEntropyQuotients } from './big-entropy.js';

const WELL_CONDITIONED = 1e-10;

/** Models with a box, among them random ones with frequencies in a random basis. */
function models(): [string, Structure][] {
  const random = seededRandom('enclosed witnesses');
  const fixed: [string, Structure][] = [
    ['depolarising qubit', analyse(depolarising(2))],
    ['depolarising three levels', analyse(depolarising(3))],
    ['thermal qubit', analyse(thermalQubit({ beta: 1.3 }))],
    ['complete graph', analyse(completeGraph(3))],
  ];
  for (const blocks of [[2], [2, 1], [3], [1, 1, 1, 1]]) {
    for (let tries = 0, found = 0; found < 2 && tries < 40; tries++) {
      const structure = analyse(randomBalancedGenerator(blockAlgebra(blocks), random).generator);
      if (!modelBox(structure) || !structure.fixedPoints?.primitive) continue;
      found++;
      fixed.push([`random [${blocks}] ${found}`, structure]);
    }
  }
  return fixed;
}

function randomState(random: Random, { algebra }: Structure, smallest: number): ComplexMatrix {
  const lambda = Float64Array.from(graded(random, algebra.size, smallest));
  const total = lambda.reduce((sum, x) => sum + x, 0);
  const u = directSum(algebra.blocks.map((size) => randomUnitary(random, size)));
  return fromFrame({ lambda: lambda.map((x) => x / total), u });
}

function randomObservable(random: Random, { algebra }: Structure): ComplexMatrix {
  return directSum(algebra.blocks.map((size) => hermitianPart(randomMatrix(random, size))));
}

/** A member of the box of a model: every jump moved, its partner alike, every frequency that may move. */
function member(random: Random, structure: Structure) {
  const box = modelBox(structure);
  const { jumps = [] } = structure.canonical ?? {};
  const moved = jumps.map(({ matrix, frequency }, j) => {
    const { radius = 0, frequency: range = { lo: 0, hi: 0 } } = box?.jumps[j] ?? {};
    const noise = randomMatrix(random, matrix.rows);
    for (let k = 0; k < noise.re.length; k++)
      if (matrix.re[k] === 0 && matrix.im[k] === 0) noise.re[k] = noise.im[k] = 0;
    const size = Math.hypot(...noise.re, ...noise.im);
    const shifted = frequency + (range.hi - range.lo) * 0.49 * (2 * random.uniform() - 1);
    return { matrix: addScaledInto(copy(matrix), noise, (0.99 * radius) / size), frequency: shifted };
  });
  return { blocks: structure.algebra.blocks, jumps: moved };
}

describe.each(models())('%s', (name, structure) => {
  const random = seededRandom(`witness of ${name}`);

  test('the enclosure of the gradient estimate holds the value in 700 bits, of the model and of others in its box', () => {
    for (const mean of ['logarithmic', 'left'] as const) {
      const rho = randomState(random, structure, 0.1);
      const observable = randomObservable(random, structure);
      const found = encloseGradientEstimate(structure, mean, rho, observable);
      if (!found) throw new Error('expected an enclosure');
      const { values, vectors } = blockEigen(structure.algebra, rho);
      for (const model of [
        { blocks: structure.algebra.blocks, jumps: structure.canonical?.jumps ?? [] },
        member(random, structure),
      ]) {
        const { curvature, metric } = bigQuotient({ ...model, mean }, { lambda: [...values], u: vectors }, observable);
        expectEnclosed(found, over(curvature, metric), mean);
        expect(relativeWidth(found, over(curvature, metric))).toBeLessThan(WELL_CONDITIONED);
      }
    }
  });

  test('the enclosures of mlsi and lsi hold the values in 700 bits, of the model and of others in its box', () => {
    const rho = randomState(random, structure, 0.05);
    const { values, vectors } = blockEigen(structure.algebra, rho);
    const tracial = structure.symmetry.kind === 'tracial';
    const sigma = tracial ? values.map(() => 1) : (structure.state?.values ?? values);
    const frame = tracial ? null : (structure.state?.vectors ?? null);
    // Of trace one to twice the distance of the others, well inside the box.
    const moved = tracial ? sigma : sigma.map((x) => x * (1 + BOX_RADIUS * 0.4 * (2 * random.uniform() - 1)));
    for (const model of [
      { jumps: structure.canonical?.jumps ?? [], sigma, frame },
      { jumps: member(random, structure).jumps, sigma: moved, frame },
    ]) {
      const exact = bigEntropyQuotients(model, { lambda: values, u: vectors, k: 1 });
      for (const constant of ['mlsi', 'lsi'] as const) {
        const found = encloseEntropyQuotient(structure, constant, rho, 1);
        if (!found) throw new Error('expected an enclosure');
        expectEnclosed(found, exact[constant], constant);
        expect(relativeWidth(found, exact[constant])).toBeLessThan(WELL_CONDITIONED);
      }
    }
  });

  test('the enclosures of mlsi and lsi agree with the plain evaluation', () => {
    const rho = randomState(random, structure, 0.02);
    for (const constant of ['mlsi', 'lsi'] as const) {
      const found = encloseEntropyQuotient(structure, constant, rho, 1);
      const { value, margin } = constant === 'mlsi' ? mlsiAt(structure, rho) : lsiAt(structure, rho);
      expect(value).toBeGreaterThan((found?.lo ?? NaN) - margin);
      expect(value).toBeLessThan((found?.hi ?? NaN) + margin);
    }
  });

  test('clsi at a product with an ancilla state has the value of mlsi', () => {
    const rho = randomState(random, structure, 0.05);
    const ancilla = fromFrame({ lambda: Float64Array.of(0.7, 0.3), u: randomUnitary(random, 2) });
    const alone = encloseEntropyQuotient(structure, 'mlsi', rho, 1);
    const product = encloseEntropyQuotient(structure, 'clsi', kronecker(rho, ancilla), 2);
    if (!alone || !product) throw new Error('expected enclosures');
    // The product is rounded to a matrix of doubles, which moves the state a little.
    expect(Math.abs(product.hi / alone.hi - 1)).toBeLessThan(1e-11);
    expect((product.hi - product.lo) / alone.hi).toBeLessThan(WELL_CONDITIONED);
  });
});

test('clsi at an entangled state agrees with the plain evaluation', () => {
  const random = seededRandom('entangled');
  for (const generator of [depolarising(2), thermalQubit({ beta: 0.8 }), depolarising(3)]) {
    const structure = analyse(generator);
    const side = 2 * structure.algebra.size;
    const lambda = Float64Array.from(graded(random, side, 0.02));
    const total = lambda.reduce((sum, x) => sum + x, 0);
    const rho = fromFrame({ lambda: lambda.map((x) => x / total), u: randomUnitary(random, side) });
    const found = encloseEntropyQuotient(structure, 'clsi', rho, 2);
    if (!found) throw new Error('expected an enclosure');
    const { value, margin } = mlsiAt(structure, rho, 2);
    expect(value).toBeGreaterThan(found.lo - margin);
    expect(value).toBeLessThan(found.hi + margin);
    expect((found.hi - found.lo) / value).toBeLessThan(WELL_CONDITIONED);
  }
});

test.each([2, 3])('mlsi of dephasing on %d levels, where the projection of a state is its diagonal', (n) => {
  const random = seededRandom(`dephasing ${n}`);
  const structure = analyse(dephasing(n));
  for (const smallest of [0.1, 1e-3]) {
    const rho = randomState(random, structure, smallest);
    const { values, vectors } = blockEigen(structure.algebra, rho);
    const found = encloseEntropyQuotient(structure, 'mlsi', rho, 1);
    if (!found) throw new Error('expected an enclosure');
    const jumps = structure.canonical?.jumps ?? [];
    const exact = bigDephasingQuotient({ jumps }, { lambda: values, u: vectors, k: 1 });
    expectEnclosed(found, exact, 'mlsi');
    expect(relativeWidth(found, exact)).toBeLessThan(WELL_CONDITIONED);
    const ancilla = fromFrame({ lambda: Float64Array.of(0.6, 0.4), u: randomUnitary(random, 2) });
    const product = encloseEntropyQuotient(structure, 'clsi', kronecker(rho, ancilla), 2);
    expect(Math.abs((product?.hi ?? NaN) / found.hi - 1)).toBeLessThan(1e-11);
  }
});
