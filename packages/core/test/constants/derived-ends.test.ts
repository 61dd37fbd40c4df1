import { describe, expect, it } from 'vitest';
import { diameterUpper } from '../../src/constants/diameter.js';
import { mixingLower, mixingUpper } from '../../src/constants/mixing.js';
import { transportEntropyLower, transportEntropyUpper } from '../../src/constants/transport-entropy.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import type { End } from '../../src/sheet/bracket.js';
import { analyse } from '../../src/structure/structure.js';
import { dephasing, depolarising, generalisedDepolarising } from '../entropy/models.js';

const end = (value: number, grade: End['grade'] = 'certified'): End => ({ value, grade, by: 'test', margin: 1e-6 });

const CYCLE = analyse(
  ratesGenerator([
    [0, 1, 0],
    [0, 0, 1],
    [1, 0, 0],
  ]),
);

describe('transport-entropy constant', () => {
  it('lies between mlsi and the gap for primitive GNS-symmetric generators', () => {
    const structure = depolarising(3);
    expect(transportEntropyLower(structure, end(0.9))).toEqual({
      ...end(0.9),
      by: 'mlsi (primitive, GNS-symmetric): test',
    });
    expect(transportEntropyUpper(structure, end(1, 'observed'))).toEqual({
      ...end(1, 'observed'),
      by: 't2 ≤ gap; test',
    });
  });

  it('is not given elsewhere, nor from an observation or a bound that is not positive', () => {
    expect(transportEntropyLower(dephasing(2), end(1))).toBeNull();
    expect(transportEntropyUpper(dephasing(2), end(1))).toBeNull();
    expect(transportEntropyLower(CYCLE, end(1))).toBeNull();
    expect(transportEntropyLower(depolarising(2), end(1, 'observed'))).toBeNull();
    expect(transportEntropyLower(depolarising(2), end(-1))).toBeNull();
  });
});

describe('diameterUpper', () => {
  it('is 2√(2 log(1/σ_min)/κ)', () => {
    const found = diameterUpper(generalisedDepolarising([0.2, 0.8]), end(0.5))!;
    expect(Math.abs(found.value - 2 * Math.sqrt((2 * Math.log(5)) / 0.5))).toBeLessThan(1e-13);
    expect(Math.abs(found.margin! - (found.value * 1e-6) / (2 * 0.5))).toBeLessThan(1e-15);
    expect(diameterUpper(dephasing(2), end(1))).toBeNull();
    expect(diameterUpper(depolarising(2), null)).toBeNull();
  });
});

describe('mixing time', () => {
  it('brackets the mixing time of the depolarising qubit, log(1/ε)', () => {
    // ‖P_t†ρ − 1/2‖₁ = e^{−t} for pure ρ.
    const structure = depolarising(2);
    const epsilon = 0.01;
    const exact = Math.log(1 / epsilon);
    const lower = mixingLower(structure, epsilon, end(1))!;
    const upper = mixingUpper(structure, epsilon, { mlsi: end(1), gap: end(1) })!;
    expect(Math.abs(lower.value - exact)).toBeLessThan(1e-14);
    expect(upper.value).toBeGreaterThan(exact);
    // √(2 log 2) < √2, so the bound from mlsi is the better one.
    expect(Math.abs(upper.value - Math.log(Math.sqrt(2 * Math.LN2) / epsilon))).toBeLessThan(1e-14);
    expect(upper.by).toContain('mlsi');
    expect(mixingUpper(structure, epsilon, { mlsi: null, gap: end(1) })!.by).toContain('gap');
  });

  it('brackets that of dephasing, whose gap and mlsi refer to the projection', () => {
    // ‖P_t†ρ − E†ρ‖₁ = e^{−t} for (|0> + |1>)/√2.
    const exact = Math.log(10);
    const structure = dephasing(2);
    expect(mixingLower(structure, 0.1, end(1))!.value).toBeLessThanOrEqual(exact + 1e-14);
    expect(mixingUpper(structure, 0.1, { mlsi: end(1), gap: end(1) })!.value).toBeGreaterThan(exact);
  });

  it('is never negative, and the lower end is silent where it says nothing', () => {
    expect(mixingUpper(depolarising(2), 1.9, { mlsi: end(1), gap: null })!.value).toBe(0);
    expect(mixingLower(depolarising(2), 1, end(1))).toBeNull();
    expect(mixingLower(depolarising(2), 0.1, end(1, 'observed'))).toBeNull();
    expect(mixingLower(CYCLE, 0.1, end(1))).toBeNull();
    expect(mixingUpper(depolarising(2), 0.1, { mlsi: end(-1), gap: null })).toBeNull();
  });

  it('refuses distances outside (0, 2)', () => {
    for (const epsilon of [0, -1, 2, NaN]) {
      expect(() => mixingLower(depolarising(2), epsilon, end(1))).toThrowError(/0 < ε < 2/);
      expect(() => mixingUpper(depolarising(2), epsilon, { mlsi: end(1), gap: null })).toThrowError(/0 < ε < 2/);
    }
  });
});
