import { execFileSync } from 'node:child_process';
import {
  chmodSync,
  mkdirSync,
  mkdtempSync,
  readFileSync,
  readdirSync,
  rmSync,
  statSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { writeFileAtomically } from '../../src/output/write-file-atomically.js';

let folder: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-write-'));
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('writes a new file and leaves nothing else behind', async () => {
  await writeFileAtomically(join(folder, 'w.json'), '{}\n');
  expect(readFileSync(join(folder, 'w.json'), 'utf8')).toBe('{}\n');
  expect(readdirSync(folder)).toEqual(['w.json']);
});

test('replaces a file as a whole and keeps its mode', async () => {
  const path = join(folder, 'w.json');
  writeFileSync(path, 'a much longer text than the new one');
  chmodSync(path, 0o600);
  await writeFileAtomically(path, 'new');
  expect(readFileSync(path, 'utf8')).toBe('new');
  expect(statSync(path).mode & 0o777).toBe(0o600);
});

test('follows a link instead of replacing it', async () => {
  writeFileSync(join(folder, 'target'), 'old');
  symlinkSync('target', join(folder, 'link'));
  await writeFileAtomically(join(folder, 'link'), 'new');
  expect(readFileSync(join(folder, 'target'), 'utf8')).toBe('new');
  expect(readdirSync(folder).sort()).toEqual(['link', 'target']);
});

test('a folder, or a path without its folder, cannot be written', async () => {
  mkdirSync(join(folder, 'taken'));
  await expect(writeFileAtomically(join(folder, 'taken'), 'x')).rejects.toMatchObject({
    code: 'cannot-write',
    message: expect.stringContaining('it is a folder'),
  });
  await expect(writeFileAtomically(join(folder, 'no', 'such', 'w.json'), 'x')).rejects.toMatchObject({
    code: 'cannot-write',
    message: expect.stringContaining('its folder does not exist'),
  });
  expect(readdirSync(folder)).toEqual(['taken']);
});

test('a failed write leaves the old file as it was and no partial file', async () => {
  const path = join(folder, 'w.json');
  writeFileSync(path, 'old');
  const notText = Symbol('not text') as unknown as string;
  await expect(writeFileAtomically(path, notText)).rejects.toMatchObject({ code: 'cannot-write' });
  expect(readFileSync(path, 'utf8')).toBe('old');
  expect(readdirSync(folder)).toEqual(['w.json']);
});

test('a device is written to, not replaced', async () => {
  const fifo = join(folder, 'pipe');
  execFileSync('mkfifo', [fifo]);
  const reading = import('node:fs/promises').then(({ readFile }) => readFile(fifo, 'utf8'));
  await writeFileAtomically(fifo, 'through the pipe');
  expect(await reading).toBe('through the pipe');
  expect(statSync(fifo).isFIFO()).toBe(true);
});
