import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseDocument, type FlowDocument } from '@thalweg/format';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { thalweg } from './helpers/thalweg.js';

const qubit = fileURLToPath(new URL('../../../examples/models/thermal-qubit.json', import.meta.url));
let folder: string;
const path = (name: string) => join(folder, name);

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-flow-'));
  writeFileSync(path('excited.json'), '[[0, 0], [0, 1]]');
  writeFileSync(path('mixed.json'), '[[0.5, 0.2], [0.2, 0.5]]');
  writeFileSync(path('three.json'), '[[1, 0, 0], [0, 0, 0], [0, 0, 0]]');
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('flow prints a table of at most 80 columns and draws the descent', async () => {
  const args = ['flow', qubit, '--from', path('mixed.json'), '--svg', path('descent.svg')];
  const { exitCode, stdout, stderr } = await thalweg(args);
  expect(stderr).toContain(`wrote ${path('descent.svg')}`);
  expect(exitCode).toBe(0);
  expect(stdout).toMatch(/t +D\(ρ_t‖E†ρ\) +at most +I\(ρ_t\) +at most +‖ρ_t−E†ρ‖₁ +at most/);
  expect(stdout).toContain('every 5th of 101 times');
  expect(
    String(stdout)
      .split('\n')
      .filter((line) => [...line].length > 80),
  ).toEqual([]);
  expect(readFileSync(path('descent.svg'), 'utf8')).toMatch(/^<svg .*<title id="descent-title">Descent: /s);
});

test('flow --json follows the closed form of a thermal qubit, below bounds of proved constants', async () => {
  const args = ['flow', qubit, '--from', path('excited.json'), '--until', '2', '--points', '5', '--json'];
  const { exitCode, stdout } = await thalweg(args);
  expect(exitCode).toBe(0);
  const { points, bounds, method, limit } = parseDocument(String(stdout)) as FlowDocument;
  expect(method).toBe('eigenvectors');
  const ground = (limit as number[][])[0]?.[0] ?? NaN;
  expect(Math.abs(ground - 1 / (1 + Math.exp(-1)))).toBeLessThan(1e-14);
  expect(points.map(({ time }) => time)).toEqual([0, 0.5, 1, 1.5, 2]);
  expect(points[0]?.production).toBeNull();
  // Populations of the bundled model decay at rate 1.
  for (const { time, distance } of points)
    expect(Math.abs(distance - 2 * ground * Math.exp(-time))).toBeLessThan(1e-13);
  expect(new Set(bounds.map(({ constant }) => constant))).toEqual(new Set(['mlsi', 'clsi', 'gap', 'ge', 'cge']));
  for (const { quantity, values } of bounds) {
    points.forEach((point, k) => {
      const allowed = values[k];
      if (typeof allowed === 'number') expect(point[quantity]).toBeLessThanOrEqual(allowed * (1 + 1e-12) + 1e-15);
    });
  }
});

test('flow --csv has one line a time and all digits', async () => {
  const { stdout } = await thalweg(['flow', qubit, '--from', path('excited.json'), '--points', '3', '--csv']);
  const [head, first, ...rest] = String(stdout).trimEnd().split('\n');
  expect(head).toMatch(/^time,entropy,production,distance,state_error,entropy_bound_mlsi,/);
  expect(first).toMatch(/^0,\d\.\d{10,},inf,/);
  expect(rest).toHaveLength(2);
});

test.each([
  [['--from', 'mixed.json', '--until', '-1'], 64, /--until: expected a number above 0, got "-1"/],
  [['--from', 'three.json'], 65, /expected a 2×2 density matrix for this model, got 3×3/],
  [['--from', 'missing.json'], 66, /missing\.json: there is no such file/],
  [['--from', 'mixed.json', '--svg', 'nowhere/d.svg'], 73, /nowhere\/d\.svg: the folder nowhere does not exist/],
])('flow %s ends with %s', async (args, status, message) => {
  const { exitCode, stdout, stderr } = await thalweg(['flow', qubit, ...args], { cwd: folder });
  expect(stderr).toMatch(message);
  expect(stdout).toBe('');
  expect(exitCode).toBe(status);
});
