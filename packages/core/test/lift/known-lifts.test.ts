import { describe, expect, it } from 'vitest';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import { completeBakryEmery } from '../../src/constants/bakry-emery.js';
import {
  completeGraph,
  cycle,
  dephasing,
  depolarising,
  fermionicNumber,
  hypercube,
  localDepolarising,
  pauliJumps,
  thermalQubit,
} from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { climbLadder } from '../../src/lift/lift-ladder.js';
import { seededRandom } from '../../src/random.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import { analyse } from '../../src/structure/structure.js';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectWithin } from '../helpers/bracket-of.js';

function bestLift(g: Generator) {
  const target = completeBakryEmery(carreDuChamp(g)).value;
  const canonical = analyse(g).canonical as CanonicalForm;
  const limits = { maxSide: { diagonal: 1000, full: 1000 }, maxUnknowns: 250 };
  return { target, result: climbLadder(canonical, { target, ...limits }) };
}

/** K that a lift must reach; each equals cbe, so that the bracket of cge closes. */
const CLOSED: [string, Generator, number][] = [
  ['thermal qubit, β = γ = 1: 2 cosh(1/2)', thermalQubit({ beta: 1, gamma: 1 }), 2 * Math.cosh(0.5)],
  ['qubit dephasing', dephasing(2), 1],
  [
    'Pauli pair',
    pauliJumps([
      { string: 'X', rate: 1 },
      { string: 'Z', rate: 1 },
    ]),
    1,
  ],
  ['one fermionic mode', fermionicNumber(1), 1],
  ['two fermionic modes', fermionicNumber(2), 1],
  ['depolarising qubit', depolarising(2), 0.75],
  ['depolarising qutrit', depolarising(3), 11 / 18],
  ['depolarising on four levels', depolarising(4), 9 / 16],
  ['local depolarising on two qubits', localDepolarising(2), 0.75],
  ['complete graph on three points', completeGraph(3), 5 / 6],
  ['complete graph on four points', completeGraph(4), 3 / 4],
  ['complete graph on five points', completeGraph(5), 7 / 10],
  ['four-cycle', cycle(4), 2],
  ['cube', hypercube(3), 2],
  ['dephasing of three levels', dephasing(3), 5 / 6],
  [
    'two points with rates 1 and 2',
    ratesGenerator([
      [0, 1],
      [2, 0],
    ]),
    2.5,
  ],
];

describe('lifts close the bracket of cge at known values', () => {
  it.each(CLOSED)('%s', (_, g, value) => {
    const { target, result } = bestLift(g);
    expectWithin(target, value, 1e-8, 'cbe');
    expectWithin(result?.lift.curvature, value, 1e-6, 'K of the lift');
    expect(result?.lift.curvature).toBeLessThanOrEqual(target + 1e-9);
    expect(result?.reason).toBe('closed');
    expect(result?.lift.residual).toBeLessThanOrEqual(1e-12);
  });

  it('three unequal Pauli rates and a two-qubit model with a ZZ jump close at cbe', () => {
    for (const strings of [
      [
        ['X', 1],
        ['Y', 0.5],
        ['Z', 0.3],
      ],
      [
        ['XI', 1],
        ['IX', 1],
        ['ZZ', 0.7],
      ],
    ] as [string, number][][]) {
      const { target, result } = bestLift(pauliJumps(strings.map(([string, rate]) => ({ string, rate }))));
      expectWithin(result?.lift.curvature, target, 1e-6, JSON.stringify(strings));
    }
  });
});

describe('lifts of random models', () => {
  it.each(Array.from({ length: 12 }, (_, k) => k))('never exceed cbe: seed %i', (seed) => {
    const blocks = [[2], [2, 1], [1, 1, 1], [1, 1, 1, 1]][seed % 4];
    const { generator } = randomBalancedGenerator(blockAlgebra(blocks), seededRandom(`lift ${seed}`));
    const { target, result } = bestLift(generator);
    if (target === -Infinity) expect(result).toBeNull();
    else if (result) expect(result.lift.optimum).toBeLessThanOrEqual(target + 1e-7 * (1 + Math.abs(target)));
    expect(Number.isNaN(target)).toBe(false);
  });
});
