import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { lockPath, withLock } from '../lib/lock.mjs';

const lockModule = new URL('../lib/lock.mjs', import.meta.url).href;
let folder;
let path;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-lock-'));
  path = join(folder, 'lock');
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

/** A process that holds the lock while it counts a file up by one, slowly. */
function counter() {
  const script = `
    import { withLock } from ${JSON.stringify(lockModule)};
    import { readFileSync, writeFileSync } from 'node:fs';
    import { setTimeout as sleep } from 'node:timers/promises';
    await withLock(async () => {
      const count = Number(readFileSync(${JSON.stringify(join(folder, 'count'))}, 'utf8'));
      await sleep(30);
      writeFileSync(${JSON.stringify(join(folder, 'count'))}, String(count + 1));
    }, ${JSON.stringify(path)});`;
  return new Promise((resolve) => {
    spawn(process.execPath, ['--input-type=module', '-e', script], { stdio: 'ignore' }).on('close', resolve);
  });
}

test('processes take turns', async () => {
  writeFileSync(join(folder, 'count'), '0');
  expect(await Promise.all([counter(), counter(), counter(), counter()])).toEqual([0, 0, 0, 0]);
  expect(readFileSync(join(folder, 'count'), 'utf8')).toBe('4');
  expect(existsSync(path)).toBe(false);
});

test('the lock of a process that died is taken over', async () => {
  const dead = await new Promise((resolve) => {
    const child = spawn(process.execPath, ['-e', '']);
    child.on('close', () => resolve(child.pid));
  });
  writeFileSync(path, String(dead));
  expect(await withLock(async () => 'done', path)).toBe('done');
  expect(existsSync(path)).toBe(false);
});

test('a nested call does not wait for itself, and a failure releases the lock', async () => {
  expect(await withLock(() => withLock(async () => 'inner', path), path)).toBe('inner');
  await expect(withLock(async () => Promise.reject(new Error('no')), path)).rejects.toThrow('no');
  expect(existsSync(path)).toBe(false);
});

test('every clone has its own lock', () => {
  expect(lockPath('/a')).not.toBe(lockPath('/b'));
  expect(lockPath('/a')).toBe(lockPath('/a'));
});
