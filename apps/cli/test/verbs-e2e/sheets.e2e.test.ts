import { readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { CONSTANT_IDS } from '@thalweg/core';
import { endValue, parseReport, parseSheet, type ConstantDocument, type SheetDocument } from '@thalweg/format';
import { beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../../../packages/setup/lib/build.mjs';
import { startThalweg } from '../helpers/thalweg.js';

const models = fileURLToPath(new URL('../../../../examples/models/', import.meta.url));

beforeAll(ensureBundle);

async function run(...args: string[]) {
  const { exitCode, stdout, stderr } = await startThalweg(args, { cwd: models });
  return { exitCode, stdout: String(stdout), stderr: String(stderr) };
}

async function sheetOf(...args: string[]): Promise<SheetDocument> {
  const { exitCode, stdout, stderr } = await run('constants', ...args, '--json');
  expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
  return parseSheet(stdout);
}

function rowOf({ constants }: SheetDocument, id: string): ConstantDocument {
  const found = constants.find((row) => row.id === id);
  if (found === undefined) throw new Error(`no row ${id}`);
  return found;
}

function lowerOf(row: ConstantDocument): number {
  return row.lower === null ? Number.NaN : endValue(row.id, row.lower);
}

function upperOf(row: ConstantDocument): number {
  return row.upper === null ? Number.NaN : endValue(row.id, row.upper);
}

describe('inspect', () => {
  test.each(readdirSync(models))('%s is a Markov semigroup', async (file) => {
    const { exitCode, stdout } = await run('inspect', file, '--json');
    expect(exitCode).toBe(0);
    const { markov, model, tool } = parseReport(stdout);
    expect([markov.hermitian.holds, markov.unital.holds, markov.completelyPositive.holds]).toEqual([true, true, true]);
    expect(model.primitive).toBe(true);
    expect(model.title).not.toBe('');
    expect(tool.name).toBe('thalweg');
  });
});

describe('constants', () => {
  test('of the bit and phase flips closes every rate at 1', async () => {
    const sheet = await sheetOf('pauli-pair.json');
    expect(sheet.constants.map(({ id }) => id)).toEqual([...CONSTANT_IDS]);
    for (const row of sheet.constants) {
      if (row.id === 'diameter' || row.id === 'mixing') continue;
      expect(row.closed, row.id).toBe(true);
      expect(lowerOf(row)).toBeCloseTo(1, 8);
      expect(upperOf(row)).toBeCloseTo(1, 8);
    }
  });

  test('for people: a line a constant, no progress and no colours on a pipe', async () => {
    const { exitCode, stdout, stderr } = await run('constants', 'thermal-qubit.json');
    expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
    expect(stdout).toMatch(
      /^ {2}Qubit in contact with a thermal bath, inverse temperature 1\n {2}blocks \[2\] · dimension 4 · GNS/,
    );
    expect(stdout).toMatch(/^ {2}gap +0\.500000000 {2}enclosed +0\.500000000 {2}enclosed +closed$/m);
    expect(stdout).toMatch(/^ {2}lsi +— +0\.4898\d\d +enclosed$/m);
    expect(stdout).not.toContain('\u001b');
    for (const line of stdout.split('\n')) expect(line.length, line).toBeLessThanOrEqual(80);
  });

  test('in the order asked for, with other means and conventions', async () => {
    const args = ['thermal-qubit.json', '--only', 'mlsi,ge:left,gap'];
    const [two, four] = [await sheetOf(...args), await sheetOf(...args, '--convention', 'four-alpha')];
    expect(two.constants.map(({ id, mean }) => [id, mean])).toEqual([['mlsi', undefined], ['ge', 'left'], ['gap', undefined]]); // prettier-ignore
    expect(four.convention).toBe('four-alpha');
    expect(upperOf(rowOf(four, 'mlsi'))).toBeCloseTo(upperOf(rowOf(two, 'mlsi')) / 2, 12);
    expect(upperOf(rowOf(four, 'gap'))).toBe(upperOf(rowOf(two, 'gap')));
    expect(rowOf(four, 'mlsi').definition).toContain('4α');
  });

  test.each([
    ['depolarising-qutrit.json', ['ge', 'cge', 'be', 'cbe']],
    ['five-point-chain.json', ['gap', 'ge', 'mlsi', 'lsi', 'mixing']],
    ['two-blocks.json', ['ge', 'cge', 'mlsi', 'clsi', 't2']],
    ['two-qubit-heisenberg-bath.json', ['gap', 'be', 'cbe', 'mixing']],
  ])('%s: the same bytes on one thread and two, every lower end below its upper one', async (file, only) => {
    const args = ['constants', file, '--only', only.join(), '--json'];
    const [one, two] = [await run(...args, '--threads', '1'), await run(...args, '--threads', '2')];
    expect(one.exitCode).toBe(0);
    expect(two.stdout).toBe(one.stdout);
    const { constants } = parseSheet(one.stdout);
    expect(constants.map(({ id }) => id)).toEqual(only);
    for (const row of constants) {
      const { id, lower, upper } = row;
      expect(upper, id).not.toBeNull();
      if (lower !== null) expect(lowerOf(row), id).toBeLessThanOrEqual(upperOf(row) * (1 + 1e-9) + 1e-9);
    }
  });

  test('of three depolarised levels reaches the known values', async () => {
    const sheet = await sheetOf('depolarising-qutrit.json', '--only', 'cge,cbe,be');
    expect(upperOf(rowOf(sheet, 'cbe'))).toBeCloseTo(1 / 2 + 1 / 9, 8);
    expect(upperOf(rowOf(sheet, 'be'))).toBeCloseTo(1 / 2 + 1 / 4, 8);
    expect(lowerOf(rowOf(sheet, 'cge'))).toBeCloseTo(11 / 18, 6);
  });
});
