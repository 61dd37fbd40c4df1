import { existsSync, mkdtempSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseDocument } from '@thalweg/format';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { startThalweg } from '../../apps/cli/test/helpers/thalweg.js';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';

const folder = fileURLToPath(new URL('../../examples/', import.meta.url));
const examples = readdirSync(folder).filter((name) => existsSync(join(folder, name, 'example.json')));
let archives: string;

beforeAll(async () => {
  await ensureBundle();
  archives = mkdtempSync(join(tmpdir(), 'thalweg-examples-'));
});

afterAll(() => {
  rmSync(archives, { recursive: true, force: true });
});

test('there are bundled examples', () => {
  expect(examples).toContain('depolarising');
});

test.each(examples)('%s is sealed, and reproduced from its archive', async (name) => {
  const sealed = await startThalweg(['seal', join(folder, name), '-o', archives, '--json']);
  expect(sealed.exitCode, String(sealed.stderr)).toBe(0);
  const { path, name: sealedName } = JSON.parse(String(sealed.stdout)) as { path: string; name: string };
  expect(sealedName).toBe(name);

  const { exitCode, stdout, stderr } = await startThalweg(['reproduce', path, '--json']);
  const found = parseDocument(String(stdout));
  if (found.schema !== 'thalweg.reproduction/1') throw new Error(`expected a reproduction, got ${found.schema}`);
  const changes = found.points.flatMap(({ differences }) => differences.map(({ change }) => change));
  const worse = changes.filter((change) => change !== 'tighter' && change !== 'stronger-grade');
  expect(worse, stderr?.toString()).toEqual([]);
  const states = found.points.flatMap(({ claims }) => claims.map(({ state }) => state));
  expect(states).not.toContain('refuted');
  expect(states).not.toContain('open');
  expect(found.points.map(({ model, recordedModel }) => recordedModel === model)).not.toContain(false);
  expect(exitCode).toBe(0);
});
