import { mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { execa } from 'execa';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { plainEnvironment, thalweg } from './helpers/thalweg.js';

const cliFolder = fileURLToPath(new URL('..', import.meta.url));
let folder: string;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-cli-'));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('--version', async () => {
  expect(await thalweg(['--version'])).toMatchObject({ exitCode: 0, stdout: '0.1.0\n', stderr: '' });
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
  const bin = join(cliFolder, 'bin/thalweg.js');
  const script =
    'set -o pipefail; "$0" "$1" --help 2>&1 >/dev/full | head -c 0; "$0" "$1" completion zsh | head -c 1 >/dev/null';
  await thalweg(['--version']);
  const { exitCode, stderr } = await execa('bash', ['-c', script, process.execPath, bin], { reject: false });
  expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
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
