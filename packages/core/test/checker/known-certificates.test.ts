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

/** Values of §7: closed forms, or derived and equal to cbe. */
const RATIONAL: [string, Generator, string][] = [
  ['dephasing of a qubit', dephasing(2), '1'],
  ['dephasing of three levels', dephasing(3), '5/6'],
  ['bit and phase flips', PAULI_PAIR, '1'],
  ['one fermionic mode', fermionicNumber(1), '1'],
  ['two fermionic modes', fermionicNumber(2), '1'],
  ['depolarising qubit', depolarising(2), '3/4'],
  ['local depolarising of two qubits', localDepolarising(2), '3/4'],
  ['complete graph on three points', completeGraph(3), '5/6'],
  ['complete graph on four points', completeGraph(4), '3/4'],
  ['complete graph on five points', completeGraph(5), '7/10'],
  ['cycle of four points', cycle(4), '2'],
  ['hypercube of dimension 3', hypercube(3), '2'],
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

/** Qubits with exponential frequencies. */
const IRRATIONAL: [string, Generator, number][] = [
  ['thermal qubit, β = 1', thermalQubit({ beta: 1 }), 2 * Math.cosh(0.5)],
  ['thermal qubit, β = 0.3, γ = 2', thermalQubit({ beta: 0.3, gamma: 2 }), 4 * Math.cosh(0.15)],
];

describe('certificates of other models come within 1e-6', () => {
  it.each(IRRATIONAL)('%s', (_name, g, bound) => {
    const { certificate } = madeCertificate(g);
    const verdict = checkCertificate(g, certificate);
    expect(verdict.grade).toBe('certified');
    expect(verdict.bound).toBeLessThanOrEqual(bound);
    expect(bound - verdict.bound).toBeLessThan(1e-6);
    expect(verdict.allowance).toBeLessThan(1e-11);
  });

  it('a thermal qubit with dephasing reaches cbe', () => {
    const terms = [
      { weight: 1, generator: thermalQubit({ beta: 1 }) },
      { weight: 0.3, generator: pauliJumps([{ string: 'Z', rate: 1 }]) },
    ];
    const g = sumGenerator(terms);
    const { certificate, ceiling } = madeCertificate(g);
    const { bound } = checkCertificate(g, certificate);
    expect(Math.abs(ceiling - bound)).toBeLessThan(1e-6);
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
