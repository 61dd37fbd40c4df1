import { parseSheet, type SheetDocument } from '@thalweg/format';
import { beforeAll, expect, test } from 'vitest';
import { thalweg } from '../../apps/cli/test/helpers/thalweg.js';
import { folderOf, readBundled } from './support/bundled.js';

const NAME = 'squeezed-reservoir';
const WITHOUT = ['ge', 'cge', 't2', 'diameter'];

let squeezed: SheetDocument;
let thermal: SheetDocument;

beforeAll(async () => {
  squeezed = await sheet(0.5);
  thermal = await sheet(0);
}, 240_000);

test.each(WITHOUT)('symmetric in the KMS sense only: %s cannot be computed, and says why', (id) => {
  expect(squeezed.model.symmetry).toBe('kms');
  expect(rowOf(squeezed, id)).toMatchObject({ lower: null, upper: null });
  expect(rowOf(squeezed, id)?.note).toContain('needs GNS symmetry');
  expect(readBundled(NAME).notes).toContain(`\`${id}\``);
});

test('what needs no metric is computed all the same', () => {
  const gap = (1.2 ** 2 + 1.2 ** -2) / 2 - 0.5;
  expect(rowOf(squeezed, 'gap')?.upper?.value).toBeCloseTo(gap, 9);
  for (const id of ['gap', 'be', 'cbe']) expect(rowOf(squeezed, id)?.lower?.value).toBeGreaterThan(0);
});

test('without squeezing it is GNS-symmetric and has a metric', () => {
  expect(thermal.model.symmetry).toBe('gns');
  for (const id of WITHOUT) expect(rowOf(thermal, id)?.upper?.value).toBeGreaterThan(0);
});

async function sheet(squeezing: number): Promise<SheetDocument> {
  const only = ['gap', 'be', 'cbe', ...WITHOUT].join(',');
  const options = ['--set', 'u=1.2', '--set', `squeezing=${squeezing}`, '--only', only, '--threads', '1', '--json'];
  const { stdout, stderr, exitCode } = await thalweg(['constants', folderOf(NAME), ...options]);
  expect(exitCode, String(stderr)).toBe(0);
  return parseSheet(String(stdout));
}

function rowOf({ constants }: SheetDocument, wanted: string) {
  return constants.find(({ id }) => id === wanted);
}
