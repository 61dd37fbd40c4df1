import { describe, expect, it } from 'vitest';
import {
  completeGraph,
  dephasing,
  depolarising,
  fermionicNumber,
  hypercube,
  pauliJumps,
  thermalQubit,
} from '../../src/families/index.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { seededRandom } from '../../src/random.js';
import type { Structure } from '../../src/structure/structure.js';
import { analyse } from '../../src/structure/structure.js';
import { notionsAgree, worstNotion } from '../../src/transport/compare-notions.js';
import { comparePair } from '../../src/transport/compare-pair.js';
import { comparisonStarts } from '../../src/transport/comparison-starts.js';
import { inequalitiesAt } from '../../src/transport/inequalities.js';
import { transportModel } from '../../src/transport/transport-model.js';
import { randomDavies } from '../entropy/models.js';
import { randomState } from '../entropy/random-states.js';
import { provedCurvature, searchedCurvature } from './support/curvature.js';

const flips = (rates: readonly [number, number, number]): Generator =>
  pauliJumps(['X', 'Y', 'Z'].map((string, k) => ({ string, rate: rates[k] ?? 0 })));

/** Ten models with a curvature that is proved by a theorem or a lift. */
const TEN: readonly (readonly [string, Generator])[] = [
  ['depolarising qubit', depolarising(2)],
  ['depolarising qutrit', depolarising(3)],
  ['thermal qubit, β = 0.5', thermalQubit({ beta: 0.5 })],
  ['thermal qubit, β = 2', thermalQubit({ beta: 2 })],
  ['dephasing qubit', dephasing(2)],
  ['Pauli flips at rates 1, 1, 0', flips([1, 1, 0])],
  ['Pauli flips at rates 1, 2, 3', flips([1, 2, 3])],
  ['one fermionic mode', fermionicNumber(1)],
  ['square', hypercube(2)],
  ['complete graph on three points', completeGraph(3)],
];

describe('entropy along geodesics', () => {
  it.each(TEN)('of the %s is as convex as is proved', (_name, generator) => {
    const structure = analyse(generator);
    const [model, proved] = [transportModel(structure), provedCurvature(structure)];
    expect(proved).toBeGreaterThan(0);
    for (const start of comparisonStarts(model, null, 2, 'ten models')) {
      const { convexity, evi } = comparePair(model, start, proved);
      for (const seen of [convexity, evi]) {
        if (!seen) throw new Error('expected a geodesic');
        expect(seen.error, 'error').toBeLessThan(0.05 * proved);
        expect(seen.value, `${seen.value} ± ${seen.error} against ${proved}`).toBeGreaterThanOrEqual(
          proved - seen.error,
        );
      }
    }
  });
});

describe('the notions of curvature', () => {
  // On matrix algebras the gradient estimate, EVI and geodesic convexity hold for the same K (Carlen & Maas, J. Funct. Anal. 273 (2017);
  // Wirth & Zhang, Commun. Math. Phys. 387 (2021)).
  const random = seededRandom('notions');
  const models: readonly (readonly [string, Structure])[] = [
    ['depolarising qubit', analyse(depolarising(2))],
    ['thermal qubit', analyse(thermalQubit({ beta: 1 }))],
    ['thermal generator of two levels', randomDavies([2], random)],
    ['thermal generator of three levels', randomDavies([3], random)],
    ['depolarising qutrit', analyse(depolarising(3))],
  ];

  it.each(models)('agree within their errors on the %s', (_name, structure) => {
    const model = transportModel(structure);
    const { witness, gap } = searchedCurvature(structure);
    if (!witness.observable) throw new Error('expected an observable');
    const through = { state: witness.state, observable: witness.observable };
    const pairs = comparisonStarts(model, through, 1, 1).map((start) => comparePair(model, start, gap));
    const [evi, convexity] = [worstNotion('evi', pairs), worstNotion('convexity', pairs)];
    if (!evi || !convexity) throw new Error('expected both');
    const gradient = { value: witness.value, error: 1e-9 };
    const text = [gradient, evi, convexity].map(({ value, error }) => `${value} ± ${error}`).join(', ');
    expect(notionsAgree([gradient, evi, convexity]), text).toBe(true);
    expect(evi.error, text).toBeLessThan(2e-3 * gap);
    expect(convexity.error, text).toBeLessThan(1e-4 * gap);
  });

  it('disagree when one is wrong by more than its error', () => {
    expect(notionsAgree([{ value: 1, error: 0.01 }, { value: 1.03, error: 0.01 }])).toBe(false); // prettier-ignore
    expect(notionsAgree([{ value: 1, error: 0.01 }, { value: 1.015, error: 0.01 }])).toBe(true); // prettier-ignore
  });
});

describe('what curvature promises of distances', () => {
  const K = 2 * Math.cosh(0.5);
  const end = (value: number) => ({ value, grade: 'certified', by: 'a theorem' }) as const;

  it('holds on a thermal qubit and on two points', () => {
    const random = seededRandom('promises');
    const chain = analyse(
      ratesGenerator([
        [0, 1],
        [1, 0],
      ]),
    );
    // Two points at rate 1: ge = 2 (Maas, J. Funct. Anal. 261 (2011)).
    for (const [structure, k] of [
      [analyse(thermalQubit({ beta: 1 })), K],
      [chain, 2],
    ] as const) {
      const model = transportModel(structure);
      for (let i = 0; i < 4; i++) {
        const [rho, nu] = [0, 1].map(() => randomState(structure.algebra, random));
        const found = inequalitiesAt(model, rho, nu, { ge: end(k), t2: end(k), diameter: end(10) }, k);
        expect(found.map(({ name }) => name)).toEqual(['contraction', 'diameter', 'hwi', 't2']);
        for (const { name, status, slack, error } of found)
          expect(status, `${name}: ${slack} ± ${error}`).toBe('holds');
      }
    }
  });

  it('is seen to fail for constants that are too large', () => {
    const structure = analyse(thermalQubit({ beta: 1 }));
    const model = transportModel(structure);
    const random = seededRandom('broken');
    const broken = new Set<string>();
    for (let i = 0; i < 4; i++) {
      const [rho, nu] = [0, 1].map(() => randomState(structure.algebra, random));
      const wrong = { ge: end(4 * K), t2: end(4 * K), diameter: end(0.1) };
      for (const { name, status } of inequalitiesAt(model, rho, nu, wrong, K))
        if (status === 'violated') broken.add(name);
    }
    expect([...broken].sort()).toEqual(['contraction', 'diameter', 'hwi', 't2']);
  });
});
