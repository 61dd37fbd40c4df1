import { expect } from 'vitest';
import type { Generator } from '../../src/generator/generator.js';
import type { ConstantId } from '../../src/sheet/bracket.js';
import type { SheetRow } from '../../src/sheet/close-brackets.js';
import { computeSheet } from '../../src/sheet/compute-sheet.js';
import { analyse } from '../../src/structure/structure.js';

/** One row of the sheet of a generator, searches with a fixed seed. */
export function bracketOf(
  g: Generator,
  id: ConstantId,
  mean: 'logarithmic' | 'left' | 'arithmetic' = 'logarithmic',
): SheetRow {
  const key = id === 'ge' ? { id, mean } : { id };
  const [row] = computeSheet(analyse(g), { rows: [key], seed: 7, randomStarts: null, epsilon: 0.01 });
  if (row === undefined) throw new Error(`no row for ${id}`);
  return row;
}

/** Assert |actual − expected| ≤ tolerance, with all three in the message. */
export function expectWithin(actual: number | undefined, expected: number, tolerance: number, what: string): void {
  const delta = Math.abs((actual ?? NaN) - expected);
  expect(
    delta,
    `${what}: actual ${actual}, expected ${expected}, delta ${delta}, tolerance ${tolerance}`,
  ).toBeLessThanOrEqual(tolerance);
}
