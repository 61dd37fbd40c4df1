import { mkdirSync, mkdtempSync, rmSync, truncateSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { FILE_BYTES_LIMIT } from '@thalweg/format';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { readSource } from '../../src/input/read-source.js';

let folder: string;
const nothing = (): Readable => Readable.from([]);

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-source-'));
  mkdirSync(join(folder, 'sub'));
  writeFileSync(join(folder, 'sub/m.json'), '{}');
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('a file, with the folder in which its own files lie', async () => {
  const path = join(folder, 'sub/m.json');
  const source = await readSource(path, nothing());
  expect(source).toMatchObject({ name: path, folder: join(folder, 'sub') });
  expect(Buffer.from(source.bytes).toString()).toBe('{}');
});

test('standard input, once', async () => {
  const stdin = Readable.from([Buffer.from('{'), Buffer.from('}')]);
  const source = await readSource('-', stdin);
  expect(source).toMatchObject({ name: 'standard input', folder: process.cwd() });
  expect(Buffer.from(source.bytes).toString()).toBe('{}');
  await expect(readSource('-', stdin)).rejects.toMatchObject({
    code: 'usage',
    message: expect.stringContaining('standard input can be read once'),
  });
});

test('what cannot be read', async () => {
  const missing = join(folder, 'nowhere.json');
  await expect(readSource(missing, nothing())).rejects.toMatchObject({
    code: 'not-found',
    message: `expected a readable file, got ${missing}: there is no such file; check its name`,
  });
  await expect(readSource(folder, nothing())).rejects.toMatchObject({ code: 'bad-file' });
});

test('a file above the limit is refused without reading it', async () => {
  const huge = join(folder, 'huge.json');
  writeFileSync(huge, '');
  truncateSync(huge, FILE_BYTES_LIMIT + 1);
  await expect(readSource(huge, nothing())).rejects.toMatchObject({ code: 'too-large' });
});
