import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseDocument, type DistanceDocument } from '@thalweg/format';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { thalweg } from './helpers/thalweg.js';

const qubit = fileURLToPath(new URL('../../../examples/models/pauli-pair.json', import.meta.url));
const chain = fileURLToPath(new URL('../../../examples/models/five-point-chain.json', import.meta.url));
let folder: string;
const file = (name: string): string => join(folder, name);

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-distance-'));
  const write = (name: string, value: unknown) => writeFileSync(file(name), JSON.stringify(value));
  write('a.json', [
    [0.9, 0],
    [0, 0.1],
  ]);
  write('b.json', {
    schema: 'thalweg.state/1',
    matrix: {
      re: [
        [0.4, 0.2],
        [0.2, 0.6],
      ],
      im: [
        [0, -0.1],
        [0.1, 0],
      ],
    },
  });
  write('even.json', [
    [0.5, 0],
    [0, 0.5],
  ]);
  write('two-points.json', {
    schema: 'thalweg.model/1',
    algebra: [1, 1],
    generator: {
      form: 'rates',
      rates: [
        [0, 1],
        [2, 0],
      ],
    },
  });
  write('trace.json', [
    [0.5, 0],
    [0, 0.6],
  ]);
  write('negative.json', [
    [1.5, 0],
    [0, -0.5],
  ]);
  write('three.json', [
    [1, 0, 0],
    [0, 0, 0],
    [0, 0, 0],
  ]);
  write('coherent.json', { shape: [5, 5], entries: [[0, 0, 0.5, 0], [1, 1, 0.5, 0], [0, 1, 0.1, 0], [1, 0, 0.1, 0]] }); // prettier-ignore
  write('point.json', { shape: [5, 5], entries: [[0, 0, 1, 0]] });
  write('dephasing.json', {
    schema: 'thalweg.model/1',
    algebra: [2],
    generator: { form: 'expectation', onto: { diagonal: true } },
  });
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

describe('distance', () => {
  test('prints a bracket and the geodesic', async () => {
    const { exitCode, stdout } = await thalweg(['distance', qubit, file('a.json'), file('b.json')]);
    expect(exitCode).toBe(0);
    expect(stdout).toMatch(/1\.13\d+ ≤ W ≤ 1\.13\d+\n {2}lower +certified: dual path/);
    expect(stdout).toMatch(/\n {2}t +D\(ρ_t‖E†ρ\) +speed\n {2}0 /);
  });

  test('--json is a document with both ends, the same with -o', async () => {
    const output = file('d.json');
    const args = ['distance', qubit, file('a.json'), file('b.json'), '--width', '1e-6', '--points', '5', '--json'];
    const { exitCode, stdout } = await thalweg([...args, '-o', output]);
    expect(exitCode).toBe(0);
    const document = parseDocument(String(stdout)) as DistanceDocument;
    expect(parseDocument(readFileSync(output, 'utf8'))).toEqual(document);
    const { lower, upper } = document.distance;
    expect(lower?.grade).toBe('certified');
    expect((upper.value ?? 0) - (lower?.value ?? 0)).toBeLessThanOrEqual(1e-6 * (upper.value ?? 0));
    expect(document.geodesic?.points.map(({ time }) => time)).toEqual([0, 0.25, 0.5, 0.75, 1]);
  });

  test('says that a distance is infinite, and why', async () => {
    const { exitCode, stdout } = await thalweg(['distance', file('dephasing.json'), file('a.json'), file('b.json')]);
    expect(exitCode).toBe(0);
    expect(stdout).toContain('W = ∞');
    expect(stdout).toContain('E†ρ₀ ≠ E†ρ₁');
  });

  test('is zero between equal states, and takes states on the boundary', async () => {
    const same = await thalweg(['distance', qubit, file('a.json'), file('a.json')]);
    expect(same).toMatchObject({ exitCode: 0, stdout: expect.stringContaining('W = 0') });
    const boundary = await thalweg(['distance', chain, file('point.json'), file('point.json')]);
    expect(boundary.exitCode).toBe(0);
  });

  test('is undecided when the width asked for is out of reach', async () => {
    const args = ['distance', file('two-points.json'), file('a.json'), file('even.json'), '--width', '1e-10'];
    const { exitCode, stderr } = await thalweg(args);
    expect(exitCode).toBe(2);
    expect(stderr).toContain('wider than was asked for');
  });

  test.each([
    ['trace.json', 65, 'expected a state of trace 1, got 1.1'],
    ['negative.json', 65, 'got the eigenvalue -0.5'],
    ['three.json', 65, 'expected a 2×2 density matrix for this model, got 3×3'],
    ['missing.json', 66, 'missing.json'],
  ])('refuses %s', async (name, code, text) => {
    const { exitCode, stderr, stdout } = await thalweg(['distance', qubit, file('a.json'), file(name)]);
    expect(exitCode).toBe(code);
    expect(stderr).toContain(text);
    expect(stdout).toBe('');
  });

  test('refuses a state outside the algebra', async () => {
    const { exitCode, stderr } = await thalweg(['distance', chain, file('point.json'), file('coherent.json')]);
    expect(exitCode).toBe(65);
    expect(stderr).toContain('expected a state inside the blocks');
  });

  test('refuses a width of one or more', async () => {
    const { exitCode, stderr } = await thalweg(['distance', qubit, 'a', 'b', '--width', '1']);
    expect(exitCode).toBe(64);
    expect(stderr).toContain('--width');
  });
});
