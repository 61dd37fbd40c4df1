import { execa } from 'execa';
import { beforeAll, expect, test } from 'vitest';
import { thalweg } from '../helpers/thalweg.js';

let script: string;

beforeAll(async () => {
  script = String((await thalweg(['completion', 'bash'])).stdout);
});

/** What bash would offer for the last of these words. */
async function offers(...words: string[]): Promise<string[]> {
  const probe = `
COMP_WORDS=("$@"); COMP_CWORD=$(($# - 1)); COMP_TYPE=9
_thalweg thalweg "\${COMP_WORDS[COMP_CWORD]}" "\${COMP_WORDS[COMP_CWORD-1]}"
printf '%s\\n' "\${COMPREPLY[@]}"`;
  const { stdout } = await execa('bash', [
    '--noprofile',
    '--norc',
    '-euc',
    `${script}\n${probe}`,
    'bash',
    'thalweg',
    ...words,
  ]);
  return stdout.split('\n').filter((line) => line !== '');
}

test('verbs', async () => {
  expect(await offers('')).toEqual([
    'inspect',
    'constants',
    'check',
    'witness',
    'certify',
    'verify',
    'flow',
    'relief',
    'distance',
    'compare',
    'draft',
    'model',
    'sweep',
    'seal',
    'reproduce',
    'sign-in',
    'sign-out',
    'publish',
    'browse',
    'read',
    'download',
    'withdraw',
    'completion',
    'help',
  ]);
  expect(await offers('c')).toEqual(['constants', 'check', 'certify', 'compare', 'completion']);
  expect(await offers('--json', 'w')).toEqual(['witness', 'withdraw']);
  expect(await offers('--seed', '3', 'w')).toEqual(['witness', 'withdraw']);
});

test('options of a verb and of all verbs', async () => {
  expect(await offers('check', 'm.json', '--at')).toEqual(['--at-least', '--at-most']);
  expect(await offers('check', 'm.json', '--t')).toEqual(['--threads', '--time-limit']);
  expect(await offers('inspect', '--on')).toEqual([]);
});

test('values', async () => {
  expect(await offers('constants', 'm.json', '--mean', 'l')).toEqual(['logarithmic', 'left']);
  expect(await offers('constants', 'm.json', '--convention', 'f')).toEqual(['four-alpha']);
  expect(await offers('constants', 'm.json', '--seed', '')).toEqual([]);
  expect(await offers('completion', '')).toEqual(['bash', 'zsh', 'fish']);
  expect(await offers('witness', 'm.json', 'cg')).toEqual(['cge']);
});

test('file arguments are left to bash', async () => {
  expect(await offers('inspect', '')).toEqual([]);
  expect(await offers('witness', '')).toEqual([]);
  expect(await offers('verify', 'w.json', '--model', '')).toEqual([]);
});
