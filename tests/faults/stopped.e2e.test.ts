import { setTimeout } from 'node:timers/promises';
import { parseSheet } from '@thalweg/format';
import { execa } from 'execa';
import { beforeAll, expect, test } from 'vitest';
import { plainEnvironment, startThalweg } from '../../apps/cli/test/helpers/thalweg.js';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { flips, heavyModel } from './support/models.js';
import { FLIP, folderWith, qubit } from './support/refusal.js';

beforeAll(ensureBundle);

/** Enough to be in the middle of the search, also on a busy machine. */
const HEAD_START_MILLISECONDS = 4000;

test('an interrupted search ends with 130 and one message; an older result stays as it was', async () => {
  const { folder, list, remove } = folderWith({ 'm.json': heavyModel(10), 'w.json': 'older\n' });
  const running = startThalweg(['witness', 'm.json', 'ge', '-o', 'w.json'], { cwd: folder });
  await setTimeout(HEAD_START_MILLISECONDS);
  running.kill('SIGINT');
  const { exitCode, stdout, stderr } = await running;
  expect({ exitCode, stdout, stderr }).toEqual({
    exitCode: 130,
    stdout: '',
    stderr: 'thalweg: interrupted before it finished: no result was written\n',
  });
  expect(list()).toEqual(['m.json', 'w.json']);
  expect((await execa('cat', ['w.json'], { cwd: folder })).stdout).toBe('older');
  remove();
});

test('a time limit during the searches leaves what they had, and says so', async () => {
  const { run, remove } = folderWith({ 'm.json': heavyModel(8) });
  const { exitCode, stdout, stderr } = await run([
    'constants',
    'm.json',
    '--only',
    'gap,ge',
    '--time-limit',
    '1',
    '--json',
  ]);
  remove();
  expect(exitCode).toBe(0);
  expect(stderr).toMatch(/^The time limit ended (some searches early|the eigenvalue problems)[^\n]*\n$/);
  expect(parseSheet(stdout).constants.map(({ id }) => id)).toEqual(['gap', 'ge']);
});

test('a time limit during the eigenvalue problems leaves what theorems give, and says so', async () => {
  const { run, remove } = folderWith({ 'm.json': flips(4) });
  const { exitCode, stdout, stderr } = await run(['constants', 'm.json', '--only', 'gap,cge', '--time-limit', '0.001']);
  remove();
  expect(exitCode).toBe(0);
  expect(stderr).toMatch(/^The time limit ended /);
  expect(stdout).toMatch(/^ {2}cge +2\.0000\d* {2}certified/m);
});

test('a time limit before anything is known ends with 75 and one message', async () => {
  const { run, remove } = folderWith({ 'm.json': flips(9) });
  const { exitCode, stdout, stderr } = await run(['inspect', 'm.json', '--time-limit', '0.001']);
  remove();
  expect({ exitCode, stdout, stderr }).toEqual({
    exitCode: 75,
    stdout: '',
    stderr: 'thalweg: the time limit passed before there was a result; give more with --time-limit\n',
  });
});

test('a reader that goes away is no error', async () => {
  const { folder, remove } = folderWith({ 'm.json': qubit([{ matrix: FLIP }]) });
  const bin = new URL('../../apps/cli/bin/thalweg.js', import.meta.url).pathname;
  const { exitCode, stdout, stderr } = await execa(
    'bash',
    ['-c', 'set -o pipefail; "$0" "$1" inspect m.json | head -n 1', process.execPath, bin],
    { cwd: folder, env: plainEnvironment, extendEnv: false, reject: false },
  );
  remove();
  expect({ exitCode, stdout, stderr }).toEqual({ exitCode: 0, stdout: '  Untitled model', stderr: '' });
});
