import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { parsePoint } from '@thalweg/format';
import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { ensureBundle } from '../../../../packages/setup/lib/build.mjs';
import { startThalweg } from '../helpers/thalweg.js';

const depolarising = fileURLToPath(new URL('../../../../examples/depolarising', import.meta.url));
const ARGUMENTS = ['sweep', depolarising, '--over', 'rate=1:80:1', '--only', 'gap,be', '--threads', '2'];
/** A build may come first, and a busy machine starts processes slowly. */
const PATIENCE_MILLISECONDS = 300_000;
vi.setConfig({ testTimeout: PATIENCE_MILLISECONDS });
let folder: string;

beforeAll(async () => {
  await ensureBundle();
  folder = mkdtempSync(join(tmpdir(), 'thalweg-sweep-'));
}, PATIENCE_MILLISECONDS);

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

function lines(file: string): string[] {
  try {
    return readFileSync(join(folder, file), 'utf8').split('\n').slice(0, -1);
  } catch {
    return [];
  }
}

/** A sweep that is ended by a signal after some points; resolves to how it ended, and the lines it left. */
async function ended(file: string, signal: 'SIGINT' | 'SIGKILL') {
  const running = startThalweg([...ARGUMENTS, '-o', file], { cwd: folder });
  const enough = lines(file).length + 4;
  while (lines(file).length < enough) await sleep(20);
  running.kill(signal);
  const { exitCode, stdout, stderr } = await running;
  return { exitCode, stdout, stderr: String(stderr), before: lines(file) };
}

test('a sweep goes on after SIGKILL and SIGINT: what was finished stays as it is, and nothing is there twice', async () => {
  const killed = await ended('s.jsonl', 'SIGKILL');
  expect(killed.stdout).toBe('');
  expect(killed.before.length).toBeLessThan(81);
  const interrupted = await ended('s.jsonl', 'SIGINT');
  expect(interrupted).toMatchObject({ exitCode: 130, stdout: '' });
  expect(interrupted.stderr).toMatch(/of 80 points are in s\.jsonl; the same command goes on\n$/);
  expect(interrupted.before.slice(0, killed.before.length)).toEqual(killed.before);

  const finished = await startThalweg([...ARGUMENTS, '-o', 's.jsonl', '--json'], { cwd: folder });
  expect(finished.exitCode, String(finished.stderr)).toBe(0);
  const after = lines('s.jsonl');
  expect(after.slice(1).map((line) => parsePoint(line).parameters['rate'])).toEqual(
    Array.from({ length: 80 }, (_, k) => k + 1),
  );
  expect(after).toEqual(expect.arrayContaining(interrupted.before));
  expect(finished.stdout).toBe(`${after.join('\n')}\n`);
});

test('a time limit leaves what was done by then, and says how to go on', async () => {
  const limited = await startThalweg([...ARGUMENTS, '-o', 't.jsonl', '--time-limit', '0.001'], { cwd: folder });
  expect(limited.exitCode).toBe(75);
  expect(String(limited.stderr)).toMatch(
    /^The time limit passed with [0-2] of 80 points done: the same command goes on\.\n$/,
  );
});
