import { cpSync, existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { execa } from 'execa';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { plainEnvironment } from '../../apps/cli/test/helpers/thalweg.js';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { root } from './helpers/repository.js';

const SHOWN = [
  ...['certify', 'check', 'constants', 'inspect', 'verify', 'witness'],
  ...['draft', 'model', 'reproduce', 'seal', 'sweep'],
  ...['compare', 'distance', 'flow', 'relief'],
];
const COMMAND = 'npx thalweg ';
const commands = shellLines(readFileSync(join(root, 'README.md'), 'utf8'));
/** A copy of what a reader has: the examples. */
let folder: string;

beforeAll(async () => {
  await ensureBundle();
  folder = mkdtempSync(join(tmpdir(), 'thalweg-readme-'));
  cpSync(join(root, 'examples'), join(folder, 'examples'), { recursive: true });
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('the README shows every verb that computes', () => {
  const verbs = new Set(commands.map((line) => line.slice(COMMAND.length).split(' ')[0]));
  for (const verb of SHOWN) expect(verbs, verb).toContain(verb);
});

test.each(commands)('%s', async (line) => {
  expect(line.startsWith(COMMAND), 'a command of this repository').toBe(true);
  const bin = join(root, 'apps/cli/bin/thalweg.js');
  const { exitCode, stdout, stderr } = await execa(
    'bash',
    ['-c', `"$0" "$1" ${line.slice(COMMAND.length)}`, process.execPath, bin],
    { cwd: folder, env: plainEnvironment, extendEnv: false, reject: false },
  );
  expect(exitCode, stderr).toBe(0);
  expect(stdout).not.toBe('');
  const written = / -o (\S+)/.exec(line)?.[1];
  if (written !== undefined) expect(existsSync(join(folder, written))).toBe(true);
});

/** The lines of all ```sh blocks. */
function shellLines(markdown: string): string[] {
  return [...markdown.matchAll(/^```sh\n(.*?)^```$/gms)].flatMap(([, block = '']) => block.trim().split('\n'));
}
