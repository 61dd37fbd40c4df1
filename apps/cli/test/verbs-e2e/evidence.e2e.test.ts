import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseVerdict, parseWitness } from '@thalweg/format';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../../../packages/setup/lib/build.mjs';
import { startThalweg } from '../helpers/thalweg.js';

const models = fileURLToPath(new URL('../../../../examples/models/', import.meta.url));
const qubit = join(models, 'thermal-qubit.json');
const chain = join(models, 'five-point-chain.json');
const qutrit = join(models, 'depolarising-qutrit.json');
let folder: string;

beforeAll(async () => {
  await ensureBundle();
  folder = mkdtempSync(join(tmpdir(), 'thalweg-evidence-'));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

async function run(...args: string[]) {
  const { exitCode, stdout, stderr } = await startThalweg(args, { cwd: folder });
  return { exitCode, stdout: String(stdout), stderr: String(stderr) };
}

describe('check', () => {
  test.each([
    [['--at-least', 'gap=1/2', '--at-most', 'mlsi=0.5'], 0, /^holds +gap +≥ 0\.5 .*\nholds +mlsi +≤ 0\.5 .*\n$/],
    [['--at-least', 'ge=0.51'], 1, /^refuted +ge +≥ 0\.51 +lower 0\.5000\d* enclosed +upper 0\.5000\d* enclosed\n$/],
    [['--at-least', 'lsi=0.48'], 2, /^undecided +lsi +≥ 0\.48 +lower — +upper 0\.4898\d\d enclosed\n$/],
    [['--at-least', 'lsi=0.49', '--at-least', 'gap=0.1'], 1, /^refuted +lsi .*\nholds +gap .*\n$/],
    [['--at-most', 'ge:left=0.6'], 0, /^holds +ge:left ≤ 0\.6 /],
  ] as const)('%s ends with %d', async (claims, code, text) => {
    const { exitCode, stdout, stderr } = await run('check', qubit, ...claims);
    expect({ exitCode, stderr }).toEqual({ exitCode: code, stderr: '' });
    expect(stdout).toMatch(text);
  });

  test('--json gives a verdict with the bracket that decides, in the convention asked for', async () => {
    const claims = ['--at-most', 'mlsi=0.3', '--at-least', 'gap=0.5'];
    const { exitCode, stdout } = await run('check', qubit, ...claims, '--convention', 'four-alpha', '--json');
    expect(exitCode).toBe(0);
    const verdict = parseVerdict(stdout);
    expect(verdict).toMatchObject({ verb: 'check', convention: 'four-alpha', seed: 1 });
    expect(verdict.claims.map(({ constant, verdict: answer }) => [constant, answer])).toEqual([['gap', 'holds'], ['mlsi', 'holds']]); // prettier-ignore
    expect(verdict.claims[1]?.bracket.upper?.value).toBeCloseTo(0.25, 8);
  });
});

describe('witness and verify', () => {
  test.each([
    ['ge', qutrit, 0.96271099, 7],
    ['ge:left', qutrit, 0.75, 7],
    ['mlsi', qutrit, 0.98082457, 7],
    ['clsi', qutrit, 0.87063382, 3],
    ['lsi', chain, 0.566407, 4],
  ] as const)('%s: found, written, and confirmed from the file alone', async (constant, model, value, digits) => {
    const found = await run('witness', model, constant, '-o', 'w.json');
    expect(found.exitCode).toBe(0);
    expect(found.stdout).toMatch(new RegExp(`^ {2}${constant} ≤ 0\\.\\d+, shown by this state`));
    expect(found.stderr).toBe(`wrote w.json; check it with: thalweg verify w.json --model ${model}\n`);
    const witness = parseWitness(readFileSync(join(folder, 'w.json'), 'utf8'));
    expect(witness.value).toBeCloseTo(value, digits);
    const { exitCode, stdout } = await run('verify', 'w.json', '--model', model);
    expect(stdout).toMatch(/^holds +\S+ ≤ 0\.\d+: evaluated afresh in interval arithmetic\n$/);
    expect(exitCode).toBe(0);
  });

  test('the witness at a given state, which may come from a file of any kind', async () => {
    writeFileSync(join(folder, 'rho.json'), JSON.stringify([[0.75, 0], [0, 0.25]])); // prettier-ignore
    writeFileSync(join(folder, 'rho.mtx'), '%%MatrixMarket matrix array real general\n2 2\n0.75\n0\n0\n0.25\n');
    const fromJson = await run('witness', qubit, 'ge', '--at', 'rho.json', '--json');
    const fromMtx = await run('witness', qubit, 'ge', '--at', 'rho.mtx', '--json');
    expect(fromJson.exitCode).toBe(0);
    expect(fromMtx.stdout).toBe(fromJson.stdout);
    const witness = parseWitness(fromJson.stdout);
    expect(witness).toMatchObject({ constant: 'ge', mean: 'logarithmic', state: [[0.75, 0], [0, 0.25]] }); // prettier-ignore
    expect(witness.value).toBeGreaterThanOrEqual(0.5 - 1e-12);
  });

  test('--json of verify is a verdict, and --quiet says nothing but the result', async () => {
    const quiet = await run('witness', qubit, 'mlsi', '-o', 'q.json', '--quiet');
    expect({ exitCode: quiet.exitCode, stderr: quiet.stderr }).toEqual({ exitCode: 0, stderr: '' });
    const { exitCode, stdout } = await run('verify', 'q.json', '--model', qubit, '--json');
    expect(exitCode).toBe(0);
    const verdict = parseVerdict(stdout);
    expect(verdict).toMatchObject({
      verb: 'verify',
      claims: [{ constant: 'mlsi', relation: 'at-most', verdict: 'holds', bracket: { upper: { grade: 'enclosed' } } }],
    });
  });
});
