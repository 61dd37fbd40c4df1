import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { dephasing, depolarising, pauliJumps, thermalQubit } from '../../src/families/index.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { fromEntries, hermitianPart, multiply, multiplyAdjointSecond } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { geodesicTable, speedRange } from '../../src/transport/geodesic.js';
import { transportDistance } from '../../src/transport/transport-distance.js';
import { transportModel } from '../../src/transport/transport-model.js';
import { randomChain, randomDavies } from '../entropy/models.js';
import { randomState } from '../entropy/random-states.js';
import { expectError } from '../helpers/expect-error.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { expectAllClose, expectClose } from '../linalg/support/expect-close.js';
import { distance, distribution, scaled } from './support/states.js';

function models() {
  const random = seededRandom('distance models');
  return [
    analyse(depolarising(2)),
    analyse(thermalQubit({ beta: 1 })),
    randomDavies([2, 1], random),
    randomDavies([1, 1, 2], random),
    randomChain(3, random),
    randomChain(5, random),
  ];
}

describe('the transport distance', () => {
  it('is symmetric, and its ends are in order, within the width asked for', () => {
    const random = seededRandom('symmetric');
    for (const structure of models()) {
      const [a, b] = [0, 1].map(() => randomState(structure.algebra, random));
      const [there, back] = [distance(structure, a, b, 1e-4), distance(structure, b, a, 1e-4)];
      for (const { lower, upper, reached } of [there, back]) {
        expect(reached).toBe(true);
        expect(upper.value).toBeGreaterThanOrEqual(lower.value);
        expect(lower.value).toBeGreaterThan(0);
      }
      expectClose(back.upper.value, there.upper.value, 1e-9, 'upper ends');
      expectClose(back.lower.value, there.lower.value, 1e-6, 'lower ends');
    }
  });

  it('satisfies the triangle inequality on 200 seeded triples', () => {
    const random = seededRandom('triangles');
    const cheap = [
      analyse(depolarising(2)),
      analyse(thermalQubit({ beta: 1 })),
      randomChain(3, random),
      randomChain(4, random),
    ];
    for (let k = 0; k < 200; k++) {
      const structure = cheap[k % cheap.length];
      const [a, b, c] = [0, 1, 2].map(() => randomState(structure.algebra, random));
      const [ab, bc, ac] = [
        distance(structure, a, b, 1e-2),
        distance(structure, b, c, 1e-2),
        distance(structure, a, c, 1e-2),
      ];
      const slack = ab.upper.value + bc.upper.value - ac.lower.value;
      expect(slack, `triple ${k}: ${ac.lower.value} ≤ ${ab.upper.value} + ${bc.upper.value}`).toBeGreaterThanOrEqual(0);
    }
  });

  it('is found next to the boundary, where plain Newton steps leave state space', () => {
    // Three points around one; almost all mass on the first of them, then on the second.
    const star = analyse(
      ratesGenerator([
        [0, 1.95, 0, 0],
        [1.95, 0, 0.89, 0.23],
        [0, 0.48, 0, 0],
        [0, 0.0126, 0, 0],
      ]),
    );
    const start = distribution(0.9941447, 0.0058552, 9.4e-8, 6e-9);
    const { lower, upper, reached } = distance(star, start, distribution(0.18, 0.01, 0.68, 0.13), 1e-2);
    expect(reached, `${lower.value} to ${upper.value}`).toBe(true);
    expectClose(upper.value, 2.37, 0.05, 'distance');
  });

  it('scales with the inverse root of the rates', () => {
    const random = seededRandom('scaling');
    for (const generator of [depolarising(2), thermalQubit({ beta: 0.7 })]) {
      const [a, b] = [0, 1].map(() => randomState(generator.algebra, random));
      const [slow, quick] = [scaled(generator, 1), scaled(generator, 9)].map((s) => distance(s, a, b, 1e-4));
      expectClose(3 * quick.upper.value, slow.upper.value, 1e-9, 'upper ends');
      expectClose(3 * quick.lower.value, slow.lower.value, 1e-7, 'lower ends');
    }
  });

  it('does not change under a symmetry of the generator', () => {
    const random = seededRandom('covariance');
    const structure = analyse(depolarising(2));
    const u = randomUnitary(random, 2);
    const turn = (a: ReturnType<typeof randomState>) => hermitianPart(multiplyAdjointSecond(multiply(u, a), u));
    const [a, b] = [0, 1].map(() => randomState(structure.algebra, random));
    const [plain, turned] = [distance(structure, a, b, 1e-4), distance(structure, turn(a), turn(b), 1e-4)];
    expectClose(turned.upper.value, plain.upper.value, 1e-9, 'upper ends');
    expectClose(turned.lower.value, plain.lower.value, 1e-7, 'lower ends');
  });

  it('has geodesics of constant speed, between the states asked for', () => {
    const random = seededRandom('geodesics');
    for (const structure of models().slice(0, 3)) {
      const model = transportModel(structure);
      const [a, b] = [0, 1].map(() => randomState(structure.algebra, random));
      const found = transportDistance(model, a, b, { relativeWidth: 1e-4 });
      const table = geodesicTable(model, found, 9);
      expect(table.map(({ time }) => time)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8].map((k) => k / 8));
      expectAllClose(table[0].state.re, a.re, 1e-14, 'first state');
      expectAllClose(table[8].state.re, b.re, 1e-14, 'last state');
      if (!found.path) throw new Error('expected a path');
      const { least, most } = speedRange(found.path);
      expectClose(least, found.upper.value, 1e-2 * found.upper.value, 'least speed');
      expectClose(most, found.upper.value, 1e-2 * found.upper.value, 'largest speed');
    }
  });

  it('is zero between equal states and infinite between states with different conserved parts', () => {
    const structure = analyse(dephasing(2));
    const [a, b] = [distribution(0.5, 0.5), distribution(0.25, 0.75)];
    const same = distance(structure, a, a, 1e-4);
    expect([same.lower.value, same.upper.value, same.lower.grade]).toEqual([0, 0, 'exact']);
    const apart = distance(structure, a, b, 1e-4);
    expect([apart.lower.value, apart.upper.value]).toEqual([Infinity, Infinity]);
    expect(apart.lower.by).toMatch(/E†ρ₀ ≠ E†ρ₁/);
    const tilted = hermitianPart(fromEntries(2, 2, (i, j) => [i === j ? 0.5 : 0.2, 0]));
    expect(distance(structure, a, tilted, 1e-4).reached).toBe(true);
  });

  it('is finite inside one component of a chain with two', () => {
    const two = analyse(
      ratesGenerator([
        [0, 1, 0, 0],
        [1, 0, 0, 0],
        [0, 0, 0, 2],
        [0, 0, 2, 0],
      ]),
    );
    const joint = distance(two, distribution(0.3, 0.2, 0.4, 0.1), distribution(0.1, 0.4, 0.2, 0.3), 1e-4);
    expect(joint.reached).toBe(true);
    // The components do not see each other: the squares of their own distances add, each weighted with its mass.
    const part = (rate: number, from: number, to: number) =>
      distance(
        analyse(
          ratesGenerator([
            [0, rate],
            [rate, 0],
          ]),
        ),
        distribution(from, 1 - from),
        distribution(to, 1 - to),
        1e-6,
      ).upper.value;
    const expected = Math.sqrt(0.5 * part(1, 0.6, 0.2) ** 2 + 0.5 * part(2, 0.8, 0.4) ** 2);
    expectClose(joint.upper.value, expected, 1e-4, 'sum of squares');
    const shifted = distance(two, distribution(0.3, 0.2, 0.4, 0.1), distribution(0.3, 0.3, 0.3, 0.1), 1e-4);
    expect(shifted.upper.value).toBe(Infinity);
    expectError(
      () => distance(two, distribution(0.3, 0.7, 0, 0), distribution(0.6, 0.4, 0, 0), 1e-4),
      'not-supported',
      /without mass/,
    );
  });
});

describe('the transport distance refuses', () => {
  const structure = analyse(
    pauliJumps([
      { string: 'X', rate: 1 },
      { string: 'Z', rate: 1 },
    ]),
  );
  const good = distribution(0.5, 0.5);

  it('matrices that are no states of the algebra', () => {
    const refuse = (matrix: Parameters<typeof distance>[1], code: Parameters<typeof expectError>[1], text: RegExp) =>
      expectError(() => distance(structure, good, matrix, 1e-3), code, text);
    refuse(distribution(0.5, 0.3, 0.2), 'dimension-mismatch', /2×2/);
    refuse(distribution(0.7, 0.7), 'state-not-positive', /trace 1, got 1\.4/);
    refuse(distribution(1.2, -0.2), 'state-not-positive', /eigenvalue -0\.2/);
    refuse(
      fromEntries(2, 2, (i, j) => [i === j ? 0.5 : i * 0.3, 0]),
      'not-hermitian',
      /Hermitian/,
    );
  });

  it('generators without GNS symmetry', () => {
    const driven = analyse(
      lindbladGenerator({
        algebra: blockAlgebra([2]),
        hamiltonian: fromEntries(2, 2, (i, j) => [i === j ? 0 : 1, 0]),
        jumps: [{ matrix: fromEntries(2, 2, (i, j) => [i === 0 && j === 1 ? 1 : 0, 0]) }],
      }),
    );
    expectError(() => distance(driven, good, good, 1e-3), 'not-symmetric', /GNS-symmetric/);
  });
});
