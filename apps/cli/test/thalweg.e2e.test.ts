import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { execa } from 'execa';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { plainEnvironment, startThalweg, thalweg } from './helpers/thalweg.js';

const cliFolder = fileURLToPath(new URL('..', import.meta.url));
const models = fileURLToPath(new URL('../../../examples/models/', import.meta.url));
const qubit = join(models, 'thermal-qubit.json');
/** Enough to be in the middle of it, also on a busy machine. */
const HEAD_START_MILLISECONDS = 3000;
/** At once, on a busy machine. */
const ANSWER_MILLISECONDS = 2000;
/** Above the start of Node.js, which itself takes some 40 ms. */
const VERSION_MILLISECONDS = 100;
let folder: string;
/** A model whose search takes minutes. */
let heavy: string;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-cli-'));
  heavy = join(folder, 'heavy.json');
  writeFileSync(heavy, JSON.stringify(heavyModel(10)));
});

async function inBash(script: string) {
  await thalweg(['--version']);
  const bin = join(cliFolder, 'bin/thalweg.js');
  return execa('bash', ['-c', script, process.execPath, bin], {
    reject: false,
    env: plainEnvironment,
    extendEnv: false,
  });
}

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('--version', async () => {
  expect(await thalweg(['--version'])).toMatchObject({ exitCode: 0, stdout: '0.1.0\n', stderr: '' });
});

test('--version costs little more than starting Node.js', async () => {
  const best = async (run: () => Promise<unknown>) => {
    const times: number[] = [];
    for (let k = 0; k < 7; k += 1) {
      const begin = performance.now();
      await run();
      times.push(performance.now() - begin);
    }
    return Math.min(...times);
  };
  const bare = await best(() => execa(process.execPath, ['-e', '0'], { env: plainEnvironment, extendEnv: false }));
  const version = await best(() => startThalweg(['--version']));
  expect(version - bare, `${version} ms against ${bare} ms`).toBeLessThan(VERSION_MILLISECONDS);
});

test('a usage error leaves stdout empty and ends with 64', async () => {
  expect(await thalweg(['constnts', 'm.json'])).toMatchObject({
    exitCode: 64,
    stdout: '',
    stderr: 'thalweg: expected a verb, got "constnts"; did you mean "constants"?\n',
  });
});

test('--json turns an error into one document on stderr', async () => {
  const { exitCode, stdout, stderr } = await thalweg(['check', 'm.json', '--json']);
  expect({ exitCode, stdout }).toEqual({ exitCode: 64, stdout: '' });
  expect(JSON.parse(String(stderr))).toMatchObject({ schema: 'thalweg.error/1', code: 'usage', exitStatus: 64 });
});

test('a reader that goes away is no error', async () => {
  const { exitCode, stderr } = await inBash('set -o pipefail; "$0" "$1" completion zsh | head -c 1 >/dev/null');
  expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
});

test('results that cannot be written end with 73', async () => {
  const { exitCode, stderr } = await inBash('"$0" "$1" completion zsh >/dev/full');
  expect({ exitCode, stderr }).toEqual({
    exitCode: 73,
    stderr: expect.stringContaining('thalweg: cannot write to standard output: ENOSPC'),
  });
});

test('standard input is read for -', async () => {
  const fromFile = await thalweg(['inspect', '--json', qubit]);
  const fromStdin = await thalweg(['inspect', '--json', '-'], { inputFile: qubit });
  expect(fromFile).toMatchObject({ exitCode: 0, stderr: '' });
  expect(fromStdin.stdout).toBe(fromFile.stdout);
});

test('results are the same on any number of threads, and for the same seed', async () => {
  const sheet = async (threads: string) =>
    (await thalweg(['constants', qubit, '--json', '--only', 'gap,be,lsi', '--threads', threads])).stdout;
  const single = await sheet('1');
  expect(JSON.parse(String(single))).toMatchObject({ schema: 'thalweg.sheet/1', seed: 1 });
  expect(await sheet('4')).toBe(single);
});

test.each(['SIGINT', 'SIGTERM'] as const)(
  '%s is answered at once, with code 130 and nothing on stdout',
  async (signal) => {
    const running = startThalweg(['constants', heavy, '--only', 'ge']);
    await setTimeout(HEAD_START_MILLISECONDS);
    const begin = performance.now();
    running.kill(signal);
    const { exitCode, stdout, stderr } = await running;
    expect({ exitCode, stdout }).toEqual({ exitCode: 130, stdout: '' });
    expect(stderr).toBe('thalweg: interrupted before it finished: no result was written\n');
    expect(performance.now() - begin).toBeLessThan(ANSWER_MILLISECONDS);
  },
);

test('an interrupted wait for standard input ends as well', async () => {
  const running = startThalweg(['constants', '-'], { stdin: 'pipe' });
  await setTimeout(HEAD_START_MILLISECONDS);
  running.kill('SIGINT');
  expect(await running).toMatchObject({ exitCode: 130, stdout: '' });
});

test('an interrupt leaves no file behind', async () => {
  const target = join(folder, 'interrupted');
  mkdirSync(target);
  const running = startThalweg(['witness', heavy, 'ge', '-o', join(target, 'w.json')]);
  await setTimeout(HEAD_START_MILLISECONDS);
  running.kill('SIGINT');
  expect((await running).exitCode).toBe(130);
  expect(readdirSync(target)).toEqual([]);
});

test('a packed command installs elsewhere without any other package, and runs', async () => {
  await thalweg(['--version']);
  const env = { ...plainEnvironment, npm_config_update_notifier: 'false' };
  const npm = { cwd: folder, env, extendEnv: false } as const;
  await execa('npm', ['pack', '--silent', '--pack-destination', folder], { ...npm, cwd: cliFolder });
  const archive = readdirSync(folder).find((name) => name.endsWith('.tgz'));
  expect(archive).toBe('thalweg-0.1.0.tgz');
  await execa('npm', ['init', '-y'], npm);
  await execa('npm', ['install', '--offline', '--no-audit', '--no-fund', `./${archive}`], npm);
  expect(readdirSync(join(folder, 'node_modules')).filter((name) => !name.startsWith('.'))).toEqual(['thalweg']);
  const installed = join(folder, 'node_modules/.bin/thalweg');
  expect((await execa(installed, ['--version'], npm)).stdout).toBe('0.1.0');
  expect((await execa(installed, ['constants', '--help'], npm)).stdout).toContain('--only <constants>');
  expect((await execa(installed, ['completion', 'fish'], npm)).stdout).toContain('complete -c thalweg');
});

/** Three Hermitian jumps without any symmetry on n levels. */
function heavyModel(n: number) {
  const levels = Array.from({ length: n }, (_, k) => k + 1);
  const jumps = [1, 2, 3].map((m) => ({ matrix: levels.map((i) => levels.map((j) => Math.cos(i * j * m))) }));
  return { schema: 'thalweg.model/1', algebra: [n], generator: { form: 'lindblad', jumps } };
}
