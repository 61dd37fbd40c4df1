import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { thalweg } from './helpers/thalweg.js';

const models = fileURLToPath(new URL('../../../examples/models/', import.meta.url));
const pair = join(models, 'pauli-pair.json');
const qubit = join(models, 'thermal-qubit.json');
let folder: string;
let file: string;

beforeAll(async () => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-certify-'));
  file = join(folder, 'c.json');
  expect(await thalweg(['certify', pair, 'cge', '-o', file])).toMatchObject({
    exitCode: 0,
    stdout: expect.stringContaining('cge ≥ 1, exact; exactly 1'),
    stderr: expect.stringContaining(`wrote ${file}`),
  });
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('verify accepts it and prints each condition', async () => {
  const { exitCode, stdout } = await thalweg(['verify', file, '--model', pair]);
  expect(exitCode).toBe(0);
  expect(stdout).toMatch(/^proved +cge ≥ 1, exact; exactly 1\nholds +shape/);
  expect(stdout).toContain('holds    left form');
});

test('verify --json gives the bracket and the checks', async () => {
  const { stdout } = await thalweg(['verify', file, '--model', pair, '--json']);
  const verdict = JSON.parse(String(stdout));
  expect(verdict.claims).toMatchObject([{ constant: 'cge', verdict: 'holds', bracket: { lower: { value: 1, grade: 'exact' } } }]); // prettier-ignore
  expect(verdict.checks.map(({ holds }: { holds: boolean }) => holds)).not.toContain(false);
});

test('verify refuses a certificate whose bound was raised, and names what fails', async () => {
  const edited = join(folder, 'edited.json');
  writeFileSync(edited, JSON.stringify({ ...JSON.parse(readFileSync(file, 'utf8')), bound: '1000001/1000000' }));
  const { exitCode, stdout } = await thalweg(['verify', edited, '--model', pair]);
  expect(exitCode).toBe(1);
  expect(stdout).toMatch(/^refused +cge ≥ 1/);
  expect(stdout).toContain('fails    left form');
});

test('verify refuses a certificate of another model', async () => {
  const { exitCode, stderr } = await thalweg(['verify', file, '--model', qubit]);
  expect(exitCode).toBe(65);
  expect(stderr).toContain('the certificate belongs to another model');
});

test('a model without a lift ends with 2 and writes nothing', async () => {
  const model = join(folder, 'none.json');
  const jumps = [[[1, 2, 0], [2, 0, 1], [0, 1, -1]], [[0, 1, 1], [1, 2, 0], [1, 0, -2]]].map((matrix) => ({ matrix })); // prettier-ignore
  writeFileSync(model, JSON.stringify({ schema: 'thalweg.model/1', algebra: [3], generator: { form: 'lindblad', jumps } })); // prettier-ignore
  const { exitCode, stdout, stderr } = await thalweg(['certify', model, 'cge', '-o', join(folder, 'never.json')]);
  expect({ exitCode, stdout }).toEqual({ exitCode: 2, stdout: '' });
  expect(stderr).toMatch(
    /^thalweg: no certificate for cge: cbe is −∞, so that no lift exists: Γ vanishes and Γ₂ does not stay positive at A_0 = [^\n]+\n$/,
  );
  expect(() => readFileSync(join(folder, 'never.json'))).toThrow();
});

test('--verbose tells the iterations on stderr', async () => {
  const { exitCode, stderr, stdout } = await thalweg(['certify', qubit, 'mlsi', '--verbose']);
  expect(exitCode).toBe(0);
  expect(stderr).toMatch(/iteration 1: objective/);
  expect(stdout).toMatch(/^proved +mlsi ≥ 0\.49999/);
});

test('the same certificate has the same bytes', async () => {
  const again = join(folder, 'again.json');
  await thalweg(['certify', pair, 'cge', '-o', again]);
  expect(readFileSync(again, 'utf8')).toBe(readFileSync(file, 'utf8'));
});
