import { expect, test } from 'vitest';
import { thalweg } from '../../apps/cli/test/helpers/thalweg.js';
import { folderOf } from './support/bundled.js';

interface Line {
  readonly parameters: { readonly levels: number };
  readonly sheet: { readonly constants: readonly { readonly upper: { readonly value: number } }[] };
}

const SWEEP = ['sweep', folderOf('thermal-oscillator'), '--over', 'levels=2:7', '--set', 'beta=2', '--only', 'gap'];

/** Gap of the oscillator without cutoff at β = 2 (Carlen & Maas, J. Funct. Anal. 273 (2017)). */
const LIMIT = Math.sinh(1);

test('the gap of truncated oscillators comes monotonically closer to that of the oscillator', async () => {
  const { stdout, stderr, exitCode } = await thalweg([...SWEEP, '--json']);
  expect(exitCode, String(stderr)).toBe(0);
  const lines = String(stdout).trim().split('\n');
  const points = lines.map((line) => JSON.parse(line) as Line).filter((line) => 'parameters' in line);
  expect(points.map(({ parameters }) => parameters.levels)).toEqual([2, 3, 4, 5, 6, 7]);
  const distances = points.map(({ sheet }) => Math.abs((sheet.constants[0]?.upper.value ?? Infinity) - LIMIT));
  const closer = distances.slice(1).map((distance, k) => distance < (distances[k] ?? 0));
  expect(closer).toEqual([true, true, true, true, true]);
  expect(distances.at(-1)).toBeLessThan(1e-3);
});

test('its table shows the differences between cutoffs and the distance to the limit', async () => {
  const { stdout, exitCode } = await thalweg([...SWEEP, '--differences', 'levels', '--csv']);
  expect(exitCode).toBe(0);
  const [head = '', ...rows] = String(stdout).trim().split(/\r?\n/);
  const columns = head.split(',');
  const column = (name: string): number[] => {
    const at = columns.indexOf(name);
    expect(at, head).toBeGreaterThanOrEqual(0);
    return rows.map((row) => (row.split(',')[at] === '' ? NaN : Number(row.split(',')[at])));
  };
  const gaps = column('gap_upper');
  const differences = column('gap_difference');
  const toLimit = column('gap_to_limit');
  gaps.forEach((gap, k) => {
    if (k > 0) expect(differences[k]).toBeCloseTo(gap - (gaps[k - 1] ?? 0), 9);
    expect(toLimit[k]).toBeCloseTo(gap - LIMIT, 9);
  });
});
