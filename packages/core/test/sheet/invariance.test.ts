import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { depolarising } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { superoperatorGenerator } from '../../src/generator/superoperator-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { fromRows, zeros } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import type { ConstantId, End } from '../../src/sheet/bracket.js';
import { type SheetRow, nameOf } from '../../src/sheet/close-brackets.js';
import { computeSheet } from '../../src/sheet/compute-sheet.js';
import type { RowKey } from '../../src/sheet/order-relations.js';
import { FULL_SHEET } from '../../src/sheet/sheet-plan.js';
import { analyse } from '../../src/structure/structure.js';
import { type JumpModel, generatorOf, jumpModel, mixed, reordered, rescaled, rotated } from '../helpers/jump-model.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';

/** Other means on qubits only: elsewhere their infima sit at kinks of the boundary, where a search ends within 1e-8 of the gap. */
const WITH_MEANS: readonly RowKey[] = [
  ...FULL_SHEET,
  { id: 'ge', mean: 'arithmetic' },
  { id: 'ge', mean: 'geometric' },
  { id: 'ge', mean: 'harmonic' },
];

/** How much two runs of a search may differ, relative. */
const SEARCH = 1e-8;

/** The search for clsi on M ⊗ M_k is dear beyond a qubit. */
const WITHOUT_CLSI = FULL_SHEET.filter(({ id }) => id !== 'clsi');

/** Powers of the unit of time: rates 1, a length −½, a time −1. */
const POWERS: Partial<Record<ConstantId, number>> = { diameter: -0.5, mixing: -1 };

const pauli = jumpModel({
  generator: depolarising(2),
  sigma: fromRows([[0.5, 0], [0, 0.5]]), // prettier-ignore
  terms: [
    { matrix: fromRows([[0, 0.5], [0.5, 0]]), frequency: 0 }, // prettier-ignore
    { matrix: fromRows([[0, 0], [0, 0]], [[0, -0.4], [0.4, 0]]), frequency: 0 }, // prettier-ignore
    { matrix: fromRows([[0.25, 0], [0, -0.25]]), frequency: 0 }, // prettier-ignore
  ],
});
const balanced = (blocks: number[], seed: string): JumpModel =>
  jumpModel(randomBalancedGenerator(blockAlgebra(blocks), seededRandom(seed)));

const qubit = balanced([2], 'q1');
const MODELS: [string, JumpModel, readonly RowKey[]][] = [
  ['three Pauli jumps', pauli, WITH_MEANS],
  ['a qubit with frequencies', qubit, WITH_MEANS],
  ['a block of two and a point', balanced([2, 1], 'm2'), WITHOUT_CLSI],
];

describe.each(MODELS)('the constants of %s do not change under', (name, model, rows) => {
  const sheet = sheetOf(generatorOf(model), rows);

  it('a unitary of the algebra', () => {
    expectSame(sheet, sheetOf(generatorOf(rotated(model, seededRandom(`rotated ${name}`))), rows));
  });

  it('another order of the jumps', () => {
    expectSame(sheet, sheetOf(generatorOf(reordered(model, seededRandom(`reordered ${name}`))), rows));
  });

  it('unitary mixing of jumps of equal frequency', () => {
    expectSame(sheet, sheetOf(generatorOf(mixed(model, seededRandom(`mixed ${name}`))), rows));
  });

  it.each([0.003, 40])('the unit of time, except in proportion: rates times %f', (c) => {
    expectSame(sheet, sheetOf(generatorOf(rescaled(model, c)), rows), c);
  });

  // Lifts lose digits at such scales, so only what is searched for is compared.
  it.each([1e-9, 1e9])('the unit of time, in any search: rates times %f', (c) => {
    const scaled = sheetOf(generatorOf(rescaled(model, c)), rows);
    for (const [name, row] of sheet) {
      if (POWERS[row.key.id] !== undefined) continue;
      expectSameEnd(row.upper, scaled.get(name)?.upper ?? null, c, `upper end of ${name}`);
    }
  });

  it('a tensor product with one point', () => {
    expectSame(sheet, sheetOf(tensorGenerator([generatorOf(model), ratesGenerator([[0]])]), rows));
  });
});

describe('the constants of a chain', () => {
  const rates = [[0, 1, 0.5, 0], [2, 0, 1.5, 1], [1, 1.5, 0, 0], [0, 0.25, 0, 0]]; // prettier-ignore

  it('do not change when its points are permuted', () => {
    const order = [2, 0, 3, 1];
    const permuted = order.map((i) => order.map((j) => rates[i][j]));
    expectSame(sheetOf(ratesGenerator(rates), WITHOUT_CLSI), sheetOf(ratesGenerator(permuted), WITHOUT_CLSI));
  });
});

describe('L ⊗ id on M ⊗ M_2', () => {
  const idle = superoperatorGenerator({
    algebra: blockAlgebra([2]),
    matrix: zeros(4),
    picture: 'heisenberg',
    stacking: 'rows',
  });

  it.each([
    ['depolarising qubit', depolarising(2)],
    ['qubit with frequencies', generatorOf(qubit)],
  ])('keeps gap and cbe, and its mlsi is the clsi with an ancilla of two levels: %s', (_, g) => {
    const alone = sheetOf(g, [{ id: 'gap' }, { id: 'cbe' }, { id: 'clsi' }]);
    const product = sheetOf(tensorGenerator([g, idle]), [{ id: 'gap' }, { id: 'cbe' }, { id: 'mlsi' }]);
    for (const id of ['gap', 'cbe']) expectSameEnds(alone.get(id), product.get(id), 1);
    const clsi = alone.get('clsi')?.upper?.value ?? NaN;
    expectBelow(clsi, (alone.get('gap')?.upper?.value ?? NaN) * 0.9999, 'clsi, below the gap by a search');
    expectClose(product.get('mlsi')?.upper?.value ?? NaN, clsi, 1e-7 * clsi, 'mlsi of the product');
  });
});

describe('determinism', () => {
  it.each(MODELS)('the same seed gives the same bytes: %s', (_, model, rows) => {
    // Fresh objects, so that nothing is remembered from the first run.
    const bytes = (): string => JSON.stringify([...sheetOf(generatorOf(model), rows).values()], plain);
    const first = bytes();
    expect(first.length).toBeGreaterThan(1000);
    expect(bytes()).toBe(first);
  });
});

function sheetOf(g: Generator, rows: readonly RowKey[]): Map<string, SheetRow> {
  const sheet = computeSheet(analyse(g), { rows, seed: 3, randomStarts: 2, epsilon: 0.01 });
  expect(sheet.map((row) => nameOf(row.key))).toEqual(rows.map(nameOf));
  return new Map(sheet.map((row) => [nameOf(row.key), row]));
}

/** Every end of b is that of a times the right power of c, within the margins of the two and what a search leaves open. */
function expectSame(a: Map<string, SheetRow>, b: Map<string, SheetRow>, c = 1): void {
  for (const [name, row] of a) expectSameEnds(row, b.get(name), c ** (POWERS[row.key.id] ?? 1));
}

function expectSameEnds(a: SheetRow | undefined, b: SheetRow | undefined, factor: number): void {
  const name = a ? nameOf(a.key) : 'no row';
  expectSameEnd(a?.lower ?? null, b?.lower ?? null, factor, `lower end of ${name}`);
  expectSameEnd(a?.upper ?? null, b?.upper ?? null, factor, `upper end of ${name}`);
}

/** Proved or observed alike; with which arithmetic depends on the numbers: turned jumps are no longer rational. */
function expectSameEnd(a: End | null, b: End | null, factor: number, what: string): void {
  const kind = (end: End | null): object => ({ what, present: end !== null, proved: end?.grade !== 'observed' });
  expect(kind(b)).toEqual(kind(a));
  if (!a || !b || a.value === b.value) return;
  const tolerance = SEARCH * Math.abs(a.value) + (a.margin ?? 0) + (b.margin ?? 0) / factor;
  expectClose(b.value / factor, a.value, tolerance, `${what} (${a.by}; ${b.by})`);
}

function plain(_: string, value: unknown): unknown {
  if (value instanceof Float64Array) return [...value];
  return typeof value === 'number' && !Number.isFinite(value) ? String(value) : value;
}
