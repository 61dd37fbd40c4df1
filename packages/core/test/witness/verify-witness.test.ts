import { describe, expect, test } from 'vitest';
import { depolarising } from '../../src/families/depolarising.js';
import { thermalQubit } from '../../src/families/thermal-qubit.js';
import { diagonal, hermitianPart, kronecker } from '../../src/linalg/complex-matrix.js';
import { fromFrame } from '../../src/metric/state-frame.js';
import { seededRandom } from '../../src/random.js';
import type { Witness } from '../../src/sheet/bracket.js';
import { analyse } from '../../src/structure/structure.js';
import { encloseWitness, provedWitness } from '../../src/witness/enclose-witness.js';
import { verifyWitness } from '../../src/witness/verify-witness.js';
import { neighbour } from '../checker/arithmetic/enclosure-checks.js';
import { randomMatrix, randomUnitary } from '../checker/arithmetic/witness-models.js';

const structure = analyse(thermalQubit({ beta: 1 }));
const random = seededRandom('verified witnesses');
const rho = fromFrame({ lambda: Float64Array.of(0.65, 0.35), u: randomUnitary(random, 2) });
const observable = hermitianPart(randomMatrix(random, 2));

const WITNESSES: readonly (readonly [string, Witness])[] = [
  ['ge', { constant: 'ge', mean: 'logarithmic', value: NaN, state: rho, observable, amplification: 1 }],
  ['ge:left', { constant: 'ge', mean: 'left', value: NaN, state: rho, observable, amplification: 1 }],
  ['mlsi', { constant: 'mlsi', value: NaN, state: rho, observable: null, amplification: 1 }],
  ['lsi', { constant: 'lsi', value: NaN, state: rho, observable: null, amplification: 1 }],
  ['clsi', { constant: 'clsi', value: NaN, state: kronecker(rho, diagonal([0.25, 0.75])), observable: null, amplification: 2 }], // prettier-ignore
];

describe.each(WITNESSES)('a witness of %s', (_, witness) => {
  const { lo, hi } = encloseWitness(structure, witness) ?? { lo: NaN, hi: NaN };

  test('holds as enclosed from the upper end of its enclosure on', () => {
    expect(provedWitness(structure, witness).value).toBe(hi);
    for (const value of [hi, hi * 1.01]) {
      expect(verifyWitness(structure, { ...witness, value })).toMatchObject({
        grade: 'enclosed',
        upper: hi,
        holds: true,
      });
    }
  });

  test('holds as certified inside it', () => {
    for (const value of [lo, (lo + hi) / 2, neighbour(hi, -1)]) {
      expect(verifyWitness(structure, { ...witness, value })).toMatchObject({ grade: 'certified', holds: true });
    }
  });

  test('is refused just below it', () => {
    for (const value of [neighbour(lo, -1), lo * 0.999, -1]) {
      expect(verifyWitness(structure, { ...witness, value })).toMatchObject({ grade: 'enclosed', holds: false });
    }
    expect(hi - lo).toBeLessThan(1e-10);
  });
});

test('where nothing is enclosed, rounding decides, and the grade is certified', () => {
  const large = analyse(depolarising(7));
  const lambda = Float64Array.from({ length: 7 }, (_, k) => (k + 1) / 28);
  const witness: Witness = {
    constant: 'mlsi',
    value: NaN,
    state: fromFrame({ lambda, u: randomUnitary(seededRandom('seven'), 7) }),
    observable: null,
    amplification: 1,
  };
  expect(encloseWitness(large, witness)).toBeNull();
  expect(provedWitness(large, witness)).toBe(witness);
  const { value, margin } = verifyWitness(large, { ...witness, value: 1 });
  expect(verifyWitness(large, { ...witness, value })).toMatchObject({
    grade: 'certified',
    holds: true,
    upper: value + margin,
  });
  expect(verifyWitness(large, { ...witness, value: value - 1e-9 })).toMatchObject({ grade: 'certified', holds: false });
});
