import { describe, expect, it } from 'vitest';
import { printRational } from '../../src/checker/arithmetic/rational-text.js';
import { checkCertificate } from '../../src/checker/check-certificate.js';
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
import { sumGenerator } from '../../src/generator/sum-generator.js';
import { madeCertificate } from '../helpers/made-certificate.js';

const PAULI_PAIR = pauliJumps([
  { string: 'X', rate: 1 },
  { string: 'Z', rate: 1 },
]);

const FIVE_POINTS = ratesGenerator([
  [0, 1, 0, 0, 0],
  [2, 0, 1, 0, 0],
  [0, 2, 0, 1, 0],
  [0, 0, 2, 0, 1],
  [0, 0, 0, 2, 0],
]);

const PAULI_RATES = pauliJumps([
  { string: 'X', rate: 0.3 },
  { string: 'Y', rate: 0.5 },
  { string: 'Z', rate: 0.7 },
]);

const ISING_PAIR = pauliJumps([
  { string: 'XI', rate: 1 },
  { string: 'IX', rate: 1 },
  { string: 'ZZ', rate: 0.7 },
]);

/** Values of §7: closed forms, or derived and equal to cbe. */
const RATIONAL: [string, Generator, string][] = [
  ['dephasing of a qubit', dephasing(2), '1'],
  ['dephasing of three levels', dephasing(3), '5/6'],
  ['bit and phase flips', PAULI_PAIR, '1'],
  ['one fermionic mode', fermionicNumber(1), '1'],
  ['two fermionic modes', fermionicNumber(2), '1'],
  ['depolarising qubit', depolarising(2), '3/4'],
  ['local depolarising of two qubits', localDepolarising(2), '3/4'],
  ['depolarising qutrit', depolarising(3), '11/18'],
  ['depolarising on four levels', depolarising(4), '9/16'],
  ['three Pauli rates', PAULI_RATES, '71/100'],
  ['a ZZ jump between two qubits', ISING_PAIR, '7/10'],
  ['complete graph on three points', completeGraph(3), '5/6'],
  ['complete graph on four points', completeGraph(4), '3/4'],
  ['complete graph on five points', completeGraph(5), '7/10'],
  ['cycle of four points', cycle(4), '2'],
  ['hypercube of dimension 3', hypercube(3), '2'],
  ['birth and death on five points', FIVE_POINTS, '0'],
  ['two points with rates 1 and 2', ratesGenerator([[0, 1], [2, 0]]), '5/2'], // prettier-ignore
];

describe('certificates of rational models are exact', () => {
  it.each(RATIONAL)('%s', (_name, g, bound) => {
    const { certificate, ceiling } = madeCertificate(g);
    const verdict = checkCertificate(g, certificate);
    expect(verdict.conditions.filter(({ holds }) => !holds)).toEqual([]);
    expect(verdict.grade).toBe('exact');
    expect(verdict.exactBound && printRational(verdict.exactBound)).toBe(bound);
    expect(verdict.bound).toBeLessThanOrEqual(ceiling + 1e-12);
  });
});

/** Qubits and chains with irrational rates: the value, or null for cbe, which is no closed form. */
const IRRATIONAL: [string, Generator, number | null][] = [
  ['thermal qubit, β = 1', thermalQubit({ beta: 1 }), 2 * Math.cosh(0.5)],
  ['thermal qubit, β = 0.3, γ = 2', thermalQubit({ beta: 0.3, gamma: 2 }), 4 * Math.cosh(0.15)],
  ['thermal qubit with dephasing', sumGenerator([{ weight: 1, generator: thermalQubit({ beta: 1 }) }, { weight: 0.3, generator: pauliJumps([{ string: 'Z', rate: 1 }]) }]), null], // prettier-ignore
  ['Pauli jumps with irrational rates', pauliJumps([{ string: 'X', rate: Math.SQRT2 }, { string: 'Y', rate: Math.PI / 5 }, { string: 'Z', rate: 0.7 }]), null], // prettier-ignore
  ['three points with irrational rates', ratesGenerator([[0, Math.SQRT2, 0], [Math.E, 0, 1], [0, Math.PI, 0]]), null], // prettier-ignore
];

describe('certificates of models with irrational rates are enclosed and come within 1e-6', () => {
  it.each(IRRATIONAL)('%s', (_name, g, value) => {
    const { certificate, ceiling } = madeCertificate(g);
    const verdict = checkCertificate(g, certificate);
    const bound = value ?? ceiling;
    expect(verdict.grade).toBe('enclosed');
    expect(verdict.bound).toBeLessThanOrEqual(bound);
    expect(bound - verdict.bound).toBeLessThan(1e-6);
    expect(verdict.allowance).toBeLessThan(1e-11);
  });
});

it('a certificate is refused for another generator of the same shape', () => {
  const { certificate } = madeCertificate(PAULI_PAIR);
  const verdict = checkCertificate(depolarising(2), certificate);
  expect(verdict).toMatchObject({ holds: false, grade: null });
  expect(verdict.conditions.find(({ holds }) => !holds)?.name).toBe(
    'L from the jumps, against the doubles of the model',
  );
});

it('a certificate is refused for a generator on other blocks', () => {
  const { certificate } = madeCertificate(PAULI_PAIR);
  expect(checkCertificate(completeGraph(4), certificate).conditions).toMatchObject([
    { name: 'shape of the certificate', holds: false },
  ]);
});
