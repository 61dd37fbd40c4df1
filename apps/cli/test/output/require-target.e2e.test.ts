import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { requireTarget } from '../../src/output/require-target.js';

let folder: string;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-target-'));
  mkdirSync(join(folder, 'taken'));
  writeFileSync(join(folder, 'old.json'), 'old');
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('a new file and one to replace are accepted, and nothing is written', async () => {
  await requireTarget(join(folder, 'new.json'));
  await requireTarget(join(folder, 'old.json'));
  expect(readdirSync(folder).sort()).toEqual(['old.json', 'taken']);
});

test.each([
  ['nowhere/w.json', 'does not exist'],
  ['old.json/w.json', 'is not a folder'],
  ['taken', 'it is a folder'],
])('%s is refused: %s', async (path, why) => {
  await expect(requireTarget(join(folder, path))).rejects.toMatchObject({
    code: 'cannot-write',
    message: expect.stringContaining(why),
  });
});
