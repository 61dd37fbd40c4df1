import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseDocument, type ReliefDocument } from '@thalweg/format';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { thalweg } from './helpers/thalweg.js';

const models = fileURLToPath(new URL('../../../examples/models/', import.meta.url));
const qubit = join(models, 'pauli-pair.json');
const chain = join(models, 'five-point-chain.json');
let folder: string;
const path = (name: string) => join(folder, name);

beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-relief-'));
  writeFileSync(path('pure.json'), '[[1, 0], [0, 0]]');
  writeFileSync(path('other.json'), '[[0.5, 0.3], [0.3, 0.5]]');
  writeFileSync(path('beyond.json'), '[[1.2, 0], [0, -0.2]]');
  const two = { schema: 'thalweg.model/1', algebra: [1, 1], generator: { form: 'rates', rates: [[0, 1], [1, 0]] } }; // prettier-ignore
  writeFileSync(path('two-points.json'), JSON.stringify(two));
});

afterAll(() => {
  rmSync(folder, { recursive: true, force: true });
});

test('relief draws a qubit, and says what is lowest', async () => {
  const { exitCode, stdout, stderr } = await thalweg(['relief', qubit, '-o', path('relief.svg')]);
  expect(stderr).toContain(`wrote ${path('relief.svg')}`);
  expect(exitCode).toBe(0);
  expect(stdout).toMatch(/lowest κ met: 1 at \(0\.00000, 0\.00000\), observed/);
  expect(
    String(stdout)
      .split('\n')
      .filter((line) => [...line].length > 80),
  ).toEqual([]);
  expect(readFileSync(path('relief.svg'), 'utf8')).toMatch(
    /^<svg .*<title id="relief-title">Relief of κ: .*<\/svg>\n$/s,
  );
});

test('relief --json holds the grid, whatever the threads', async () => {
  const run = async (threads: string) =>
    (await thalweg(['relief', qubit, '--axes', 'x,y', '--points', '200', '--threads', threads, '--json'])).stdout;
  const text = await run('1');
  expect(await run('2')).toBe(text);
  const { grid, slice, lowest, reference } = parseDocument(String(text)) as ReliefDocument;
  expect(slice).toMatchObject({ kind: 'bloch disc', axes: ['x', 'y'] });
  expect(grid.kappa).toHaveLength(grid.rings * grid.rays);
  expect(lowest?.kappa).toBeCloseTo(1, 12);
  expect(reference).toEqual({ x: 0, y: 0 });
});

test('relief lays a plane through the witness of a larger model', async () => {
  const { exitCode, stdout } = await thalweg(['relief', chain, '--points', '300', '--table']);
  expect(exitCode).toBe(0);
  expect(stdout).toContain('the plane through σ, witness and slow mode');
  // The five-point chain's ge, met again on the slice through its witness.
  expect(stdout).toMatch(/lowest κ met: 0\.3535\d+ at/);
  expect(stdout).toMatch(/\n {2}x +y +κ\n/);
});

test('relief --csv gives the values, and a state on the boundary may span the slice', async () => {
  const args = ['relief', qubit, '--through', path('pure.json'), '--through', path('other.json'), '--points', '100'];
  const { exitCode, stdout } = await thalweg([...args, '--csv']);
  expect(exitCode).toBe(0);
  const [head, ...lines] = String(stdout).trimEnd().split('\n');
  expect(head).toBe('x,y,kappa');
  // Three rings of 24 rays and the centre.
  expect(lines).toHaveLength(73);
  expect(lines.every((line) => line.split(',').length === 3)).toBe(true);
});

test('inspect and constants draw what they print', async () => {
  const spectrum = await thalweg(['inspect', qubit, '--svg', path('spectrum.svg')]);
  const sheet = await thalweg(['constants', qubit, '--only', 'gap,cbe', '--svg', path('sheet.svg')]);
  expect([spectrum.exitCode, sheet.exitCode]).toEqual([0, 0]);
  expect(readFileSync(path('spectrum.svg'), 'utf8')).toContain('Spectrum of −L');
  expect(readFileSync(path('sheet.svg'), 'utf8')).toMatch(/<desc [^>]*>[^<]*gap = 1\.0+, closed/);
});

test.each([
  ['three axes', [qubit, '--axes', 'x,y,z'], 64, /--axes: expected two different axes such as x,z/],
  ['axes of a chain', [chain, '--axes', 'x,z'], 64, /expected a qubit for Bloch axes, got blocks \[1,1,1,1,1\]/],
  ['too many points', [qubit, '--points', '1000000'], 64, /--points: expected a whole number from 100 to 40000/],
  ['states on a line', [qubit, '--through', 'pure.json', '--through', 'pure.json'], 64, /lie on a line; give others/],
  ['what is no state', [qubit, '--through', 'beyond.json'], 65, /positive state.*beyond\.json/s],
  ['a state of another model', [chain, '--through', 'pure.json'], 65, /expected a 5×5 density matrix.*pure\.json/s],
  ['two points', ['two-points.json'], 65, /whose states are a segment; thalweg witness M ge --at/],
  [
    'a folder that is not there',
    [qubit, '-o', 'nowhere/r.svg'],
    73,
    /nowhere\/r\.svg: the folder nowhere does not exist/,
  ],
])('relief refuses %s', async (_what, args, status, message) => {
  const { exitCode, stdout, stderr } = await thalweg(['relief', ...args], { cwd: folder });
  expect(stderr).toMatch(message);
  expect(stdout).toBe('');
  expect(exitCode).toBe(status);
});
