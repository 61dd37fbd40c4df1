import { parseReport, parseSheet } from '@thalweg/format';
import { beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { CIRCULATING, DECAY, kmsQubit } from './support/models.js';
import { expectOneMessage, folderWith } from './support/refusal.js';

beforeAll(ensureBundle);

async function run(document: object, args: readonly string[]) {
  const { run: start, remove } = folderWith({ 'm.json': document });
  const result = await start(args);
  remove();
  return result;
}

describe('a chain that is not reversible', () => {
  test('inspect names the pair of points where detailed balance fails', async () => {
    const { exitCode, stdout } = await run(CIRCULATING, ['inspect', 'm.json']);
    expect(exitCode).toBe(0);
    expect(stdout).toMatch(/Symmetry +none/);
    expect(stdout).toMatch(
      /not reversible: it flows from point 0 to point 1 at σ_0 L_01 =\s+0\.6667, and back at 0\.3333/,
    );
  });

  test('constants gives what makes sense and says which constants are not given, and why', async () => {
    const { exitCode, stdout } = await run(CIRCULATING, ['constants', 'm.json']);
    expect(exitCode).toBe(0);
    expect(stdout).toMatch(/^ {2}gap +4\.500000000 {2}certified +4\.500000000 {2}certified +closed$/m);
    expect(stdout).toMatch(/^ {2}cbe +3\.470789008/m);
    expect(stdout).toMatch(
      / {2}Not given\n {4}ge, cge, t2, diameter: the gradient-flow metric\s+needs GNS symmetry; this generator has none/,
    );
    expect(stdout).toMatch(/ {4}mixing\(0\.01\): the bounds on it need KMS symmetry/);
  });

  test('a claim on a constant that is not given is undecided', async () => {
    const { exitCode, stdout } = await run(CIRCULATING, ['check', 'm.json', '--at-least', 'ge=0']);
    expect({ exitCode, stdout }).toEqual({ exitCode: 2, stdout: 'undecided  ge ≥ 0  lower —   upper —\n' });
  });
});

describe('KMS symmetry only', () => {
  test('inspect says what GNS symmetry lacks', async () => {
    const { exitCode, stdout } = await run(kmsQubit(), ['inspect', 'm.json', '--json']);
    expect(exitCode).toBe(0);
    const { symmetry, jumps, notes } = parseReport(stdout);
    expect(symmetry.kind).toBe('kms');
    expect(symmetry.residuals.kms).toBeLessThan(1e-12);
    expect(symmetry.residuals.gns).toBeGreaterThan(0.1);
    expect(jumps).toBeNull();
    expect(notes?.join()).toContain('does not commute with the modular group of σ');
  });

  test('constants gives gap, be, cbe, the entropy constants and mixing', async () => {
    const { exitCode, stdout } = await run(kmsQubit(), ['constants', 'm.json', '--json']);
    expect(exitCode).toBe(0);
    const { constants } = parseSheet(stdout);
    const given = constants.filter(({ lower, upper }) => lower !== null || upper !== null).map(({ id }) => id);
    expect(given).toEqual(['gap', 'be', 'cbe', 'mlsi', 'clsi', 'lsi', 'mixing']);
    const missing = constants.filter(({ lower, upper }) => lower === null && upper === null);
    for (const { note } of missing) expect(note).toContain('this generator has KMS symmetry only');
  });

  test('a witness for ge is refused, with what is still given', async () => {
    const { exitCode, stdout, stderr } = await run(kmsQubit(), ['witness', 'm.json', 'ge']);
    expect({ exitCode, stdout }).toEqual({ exitCode: 65, stdout: '' });
    expectOneMessage(stderr, ['expected a witness for ge', 'needs GNS symmetry', 'which constants are given']);
  });
});

test('no faithful invariant state: only be and cbe are given', async () => {
  const { exitCode, stdout } = await run(DECAY, ['constants', 'm.json', '--json']);
  expect(exitCode).toBe(0);
  for (const { id, lower, upper, note } of parseSheet(stdout).constants) {
    expect(lower !== null || upper !== null, id).toBe(id === 'be' || id === 'cbe');
    if (lower === null && upper === null) expect(note, id).toContain('no faithful invariant state');
  }
  const report = await run(DECAY, ['inspect', 'm.json']);
  expect(report.stdout).toMatch(/Symmetry +not defined without a faithful invariant state/);
});

test('a generator that is no Markov semigroup is described by inspect, which ends with 1', async () => {
  const matrix = [[0, 0, 0, 0], [0, -1, 1, 0], [0, 1, -1, 0], [0, 0, 0, 0]]; // prettier-ignore
  const generator = { form: 'superoperator', picture: 'heisenberg', stacking: 'rows', matrix };
  const { exitCode, stdout, stderr } = await run({ schema: 'thalweg.model/1', algebra: [2], generator }, [
    'inspect',
    'm.json',
  ]);
  expect({ exitCode, stderr }).toEqual({ exitCode: 1, stderr: '' });
  expect(stdout).toMatch(/^ {2}Markov semigroup +no$/m);
  expect(stdout).toMatch(/completely positive +no, smallest eigenvalue of the\s+projected Choi matrix −1\.00$/m);
});
