import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseDocument, type ComparisonDocument } from '@thalweg/format';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { thalweg } from './helpers/thalweg.js';

const qubit = fileURLToPath(new URL('../../../examples/models/thermal-qubit.json', import.meta.url));
let folder: string;

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-compare-'));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('compare puts three notions beside the proved bracket, and they agree', async () => {
  const output = join(folder, 'c.json');
  const { exitCode, stdout } = await thalweg(['compare', qubit, '--pairs', '2', '-o', output]);
  expect(exitCode).toBe(0);
  expect(stdout).toContain('The notions agree within their errors.');
  expect(stdout).toMatch(/geodesic convexity +0\.5000\d+ .*not below the proved end/);
  expect(stdout).toMatch(/\n {2}contraction .* holds\n {2}hwi .* holds\n {2}t2 .* holds\n {2}diameter .* holds\n/);
  const document = parseDocument(readFileSync(output, 'utf8')) as ComparisonDocument;
  expect(document.agree).toBe(true);
  expect(document.notions.map(({ notion }) => notion)).toEqual(['gradient', 'evi', 'convexity']);
  for (const { aboveProved } of document.notions) expect(aboveProved).toBe(true);
  expect(document.curvature.lower?.grade).not.toBe('observed');
});

test('compare gives the same bytes for the same seed, whatever the threads', async () => {
  const run = async (threads: string) =>
    (await thalweg(['compare', qubit, '--pairs', '1', '--seed', '5', '--threads', threads, '--json'])).stdout;
  expect(await run('1')).toBe(await run('2'));
});

test('compare refuses a model without a transport metric', async () => {
  const driven = join(folder, 'driven.json');
  const model = {
    schema: 'thalweg.model/1',
    algebra: [2],
    generator: {
      form: 'lindblad',
      hamiltonian: { pauli: 'X' },
      jumps: [
        {
          matrix: [
            [0, 1],
            [0, 0],
          ],
        },
      ],
    },
  };
  writeFileSync(driven, JSON.stringify(model));
  const { exitCode, stderr } = await thalweg(['compare', driven]);
  expect(exitCode).toBe(65);
  expect(stderr).toContain('GNS-symmetric');
});
