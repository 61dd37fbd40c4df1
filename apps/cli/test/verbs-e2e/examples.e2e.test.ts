import { cpSync, mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseDocument, parseModel, parsePoint, parseSheet, readArchive, sha256Hex } from '@thalweg/format';
import { execa } from 'execa';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { ensureBundle } from '../../../../packages/setup/lib/build.mjs';
import { plainEnvironment, startThalweg } from '../helpers/thalweg.js';

const depolarising = fileURLToPath(new URL('../../../../examples/depolarising', import.meta.url));
const bin = fileURLToPath(new URL('../../bin/thalweg.js', import.meta.url));
/** A build may come first, and a busy machine starts processes slowly. */
const PATIENCE_MILLISECONDS = 300_000;
vi.setConfig({ testTimeout: PATIENCE_MILLISECONDS });
let folder: string;

beforeAll(async () => {
  await ensureBundle();
  folder = mkdtempSync(join(tmpdir(), 'thalweg-examples-'));
}, PATIENCE_MILLISECONDS);

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

async function run(...args: string[]) {
  const { exitCode, stdout, stderr } = await startThalweg(args, { cwd: folder, input: '' });
  return { exitCode, stdout: String(stdout), stderr: String(stderr) };
}

test('a written model and the example at the same parameters have one sheet', async () => {
  const written = await run('model', depolarising, '--set', 'n=3', '-o', 'm.json', '--quiet');
  expect(written).toEqual({ exitCode: 0, stdout: '', stderr: '' });
  expect(parseModel(readFileSync(join(folder, 'm.json')))).toMatchObject({ algebra: [3] });
  const fromFile = await run('constants', 'm.json', '--only', 'gap,be', '--json');
  const fromExample = await run('constants', depolarising, '--set', 'n=3', '--only', 'gap,be', '--json');
  expect(fromExample).toEqual(fromFile);
  expect(parseSheet(fromFile.stdout).constants.map(({ id }) => id)).toEqual(['gap', 'be']);
});

test('an archive has the same digest in every time zone, under every umask and in every order of files', async () => {
  const names = ['LICENSE', 'NOTES.md', 'example.json', 'generate.js'];
  const digests = new Set<string>();
  const places: [string, string, string[]][] = [
    ['UTC', '022', names],
    ['Pacific/Kiritimati', '077', [...names].reverse()],
    ['America/St_Johns', '002', ['example.json', 'LICENSE', 'generate.js', 'NOTES.md']],
  ];
  for (const [zone, umask, order] of places) {
    const script = `umask ${umask}; mkdir -p "$1"; shift; cd "$1"; shift; for f in "$@"; do cp "$DATA/$f" .; done; exec "$NODE" "$BIN" seal . -o .. --json`;
    const copy = join(folder, `copy-${umask}`);
    const env = { ...plainEnvironment, TZ: zone, DATA: depolarising, NODE: process.execPath, BIN: bin };
    const { stdout } = await execa('sh', ['-c', script, 'sh', copy, copy, ...order], { env, extendEnv: false });
    const { digest, path } = JSON.parse(stdout) as { digest: string; path: string };
    const bytes = readFileSync(join(copy, path));
    expect(sha256Hex(bytes)).toBe(digest);
    expect([...readArchive(bytes, digest).keys()]).toEqual(names);
    digests.add(digest);
  }
  expect(digests.size).toBe(1);
  const [digest = ''] = digests;
  const { exitCode, stdout } = await run('model', `${digest}.zip`, '--set', 'n=2', '--quiet');
  expect(exitCode).toBe(0);
  expect(parseModel(stdout).algebra).toEqual([2]);
});

test('a draft is reproduced and sealed unchanged; a changed generator is found out', async () => {
  const drafted = await run('draft', 'family', '--title', 'My family', '--author', 'Ada Example', '--quiet');
  expect(drafted.exitCode, drafted.stderr).toBe(0);
  expect(readdirSync(join(folder, 'family')).sort()).toEqual([
    'LICENSE',
    'NOTES.md',
    'evidence',
    'example.json',
    'generate.js',
  ]);
  const reproduced = await run('reproduce', 'family', '--json');
  expect(reproduced.exitCode, reproduced.stderr).toBe(0);
  expect(parseDocument(reproduced.stdout)).toMatchObject({ schema: 'thalweg.reproduction/1', verdict: 'same' });
  expect((await run('seal', 'family', '--quiet')).exitCode).toBe(0);

  cpSync(join(folder, 'family'), join(folder, 'changed'), { recursive: true });
  const path = join(folder, 'changed/generate.js');
  writeFileSync(path, readFileSync(path, 'utf8').replace('rate: flip', 'rate: 2 * flip'));
  const changed = await run('reproduce', 'changed');
  expect(changed.exitCode).toBe(1);
  expect(changed.stdout).toMatch(/differs +model\s[^]*recorded/);
  expect(changed.stdout).toMatch(/refuted +gap = 1/);
  const sealed = await run('seal', 'changed');
  expect(sealed).toMatchObject({ exitCode: 65, stdout: '' });
  expect(sealed.stderr).toContain('expected evidence/showcase.json to be of this generator');
});

test('a draft from a model has its digest', async () => {
  const model = fileURLToPath(new URL('../../../../examples/models/five-point-chain.json', import.meta.url));
  writeFileSync(join(folder, 'chain.json'), readFileSync(model));
  const args = ['--from', 'chain.json', '--author', 'Ada Example', '--licence', 'CC-BY-4.0'];
  expect((await run('draft', 'chain-family', ...args, '--quiet')).exitCode).toBe(0);
  const digestOf = async (path: string) =>
    parseSheet((await run('constants', path, '--only', 'gap', '--json')).stdout).model.digest;
  expect(await digestOf('chain-family')).toBe(await digestOf('chain.json'));
});

test('a sweep prints lines, a table and comma-separated values of the same points, on any number of threads', async () => {
  const args = ['sweep', depolarising, '--over', 'n=2:3', '--only', 'gap,be'];
  const [one, two] = [await run(...args, '--json', '--threads', '1'), await run(...args, '--json', '--threads', '2')];
  expect(two).toEqual(one);
  const [head = '', ...points] = one.stdout.trimEnd().split('\n');
  expect(parseDocument(head)).toMatchObject({ schema: 'thalweg.sweep/1', constants: [{ id: 'gap' }, { id: 'be' }] });
  expect(points.map((line) => parsePoint(line).parameters)).toEqual([
    { n: 2, rate: 1 },
    { n: 3, rate: 1 },
  ]);
  const table = (await run(...args, '-o', 's.jsonl')).stdout;
  expect(table).toMatch(/^ {2}n {2}gap +be$/m);
  expect(table).toMatch(/^ {2}3 {2}1\.000000000 {2}0\.750000000$/m);
  expect(readFileSync(join(folder, 's.jsonl'), 'utf8')).toBe(one.stdout);
  const again = await run(...args, '-o', 's.jsonl', '--csv');
  expect(again.stdout.split('\n')[0]).toMatch(/^n,rate,gap_lower,gap_lower_grade/);
});
