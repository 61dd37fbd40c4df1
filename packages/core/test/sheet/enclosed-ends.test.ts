import { describe, expect, test } from 'vitest';
import { completeGraph } from '../../src/families/complete-graph.js';
import { cycle } from '../../src/families/cycle.js';
import { dephasing } from '../../src/families/dephasing.js';
import { depolarising } from '../../src/families/depolarising.js';
import { hypercube } from '../../src/families/hypercube.js';
import { pauliJumps } from '../../src/families/pauli-jumps.js';
import { thermalQubit } from '../../src/families/thermal-qubit.js';
import type { Generator } from '../../src/generator/generator.js';
import type { ConstantId, End } from '../../src/sheet/bracket.js';
import { computeSheet } from '../../src/sheet/compute-sheet.js';
import { FULL_SHEET } from '../../src/sheet/sheet-plan.js';
import { analyse } from '../../src/structure/structure.js';
import { verifyWitness } from '../../src/witness/verify-witness.js';

/** Models with what is known of them in closed form (sources: known-values.test.ts). */
const MODELS: readonly (readonly [string, Generator, Partial<Record<ConstantId, number>>])[] = [
  ['depolarising qubit', depolarising(2), { gap: 1, be: 5 / 6, cbe: 3 / 4 }],
  ['depolarising three levels', depolarising(3), { gap: 1, be: 3 / 4, cbe: 11 / 18 }],
  ['dephasing qubit', dephasing(2), { gap: 1, cbe: 1 }],
  ['thermal qubit', thermalQubit({ beta: 1.5 }), { gap: 2 * Math.cosh(0.75), cbe: 2 * Math.cosh(0.75) }],
  ['Pauli pair', pauliJumps([{ string: 'X', rate: 1 }, { string: 'Z', rate: 1 }]), { gap: 1, cbe: 1 }], // prettier-ignore
  ['cycle of five points', cycle(5), { gap: 2 - 2 * Math.cos((2 * Math.PI) / 5), be: 0, cbe: 0 }],
  ['complete graph of three points', completeGraph(3), { gap: 1, be: 5 / 6, cbe: 5 / 6 }],
  ['cube', hypercube(3), { gap: 2, be: 2, cbe: 2 }],
];

const EIGENVALUE_ROWS = FULL_SHEET.filter(({ id }) => id === 'gap' || id === 'be' || id === 'cbe');

const proved = (end: End | null | undefined): boolean => end?.grade === 'enclosed' || end?.grade === 'exact';

describe.each(MODELS)('the sheet of a %s', (_, generator, known) => {
  const structure = analyse(generator);
  // Searches and lifts of larger models take long, and their eigenvalue problems do not need them.
  const rows = computeSheet(structure, {
    rows: structure.algebra.dimension > 5 ? EIGENVALUE_ROWS : FULL_SHEET,
    seed: 1,
    randomStarts: 1,
    epsilon: 0.01,
  });

  test.each(Object.entries(known))('%s = %f lies between ends that are enclosed', (id, value) => {
    const { lower, upper } = rows.find(({ key }) => key.id === id) ?? {};
    expect({ lower: proved(lower), upper: proved(upper) }).toEqual({ lower: true, upper: true });
    expect(lower?.value).toBeLessThanOrEqual(value + Number.EPSILON * value);
    expect(upper?.value).toBeGreaterThanOrEqual(value - Number.EPSILON * value);
    expect((upper?.value ?? NaN) - (lower?.value ?? NaN)).toBeLessThan(1e-10);
  });

  test('ends that are proved never cross', () => {
    let compared = 0;
    for (const { key, lower, upper } of rows) {
      if (!lower || !upper || !proved(lower) || !proved(upper)) continue;
      expect(lower.value, key.id).toBeLessThanOrEqual(upper.value);
      compared++;
    }
    expect(compared).toBeGreaterThan(0);
  });

  test('every witness verifies to the grade of its end', () => {
    for (const { key, upper } of rows) {
      if (!upper?.evidence) continue;
      const { grade, holds } = verifyWitness(structure, upper.evidence);
      expect({ id: key.id, grade, holds }).toEqual({ id: key.id, grade: upper.grade, holds: true });
    }
  });

  test('no upper end is only observed', () => {
    expect(rows.filter(({ upper }) => upper?.grade === 'observed').map(({ key }) => key.id)).toEqual([]);
  });
});
