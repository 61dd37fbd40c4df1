import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { PointDocument, SweepDocument } from '@thalweg/format';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { lineOf, openJournal, rewriteJournal } from '../../src/sweep/journal.js';
import { end, row, sheet } from '../render/support/sheets.js';

const sweep: SweepDocument = {
  schema: 'thalweg.sweep/1',
  example: { name: 'e', version: '1.0.0', generator: 'a'.repeat(64) },
  constants: [{ id: 'gap' }],
  convention: 'two-alpha',
  seed: 1,
  tool: { name: 'thalweg', version: '0.1.0' },
};
let folder: string;
let path: string;

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'thalweg-journal-'));
  path = join(folder, 's.jsonl');
});

afterEach(() => {
  rmSync(folder, { recursive: true, force: true });
});

function point(n: number): PointDocument {
  const gap = end(n / 3, 'eigenvalue problem');
  return { schema: 'thalweg.point/1', parameters: { n }, sheet: sheet([row('gap', gap, gap, { closed: true })]) };
}

async function written(points: readonly PointDocument[]): Promise<void> {
  const journal = await openJournal(path, sweep);
  await Promise.all(points.map((one) => journal.append(one)));
  await journal.close();
}

test('points come back as they went, also from a second and third run', async () => {
  await written([point(1), point(2)]);
  await written([point(3)]);
  const journal = await openJournal(path, sweep);
  await journal.close();
  expect([...journal.finished.values()]).toEqual([point(1), point(2), point(3)]);
  expect(readFileSync(path, 'utf8')).toBe([sweep, point(1), point(2), point(3)].map(lineOf).join(''));
});

test('wherever a kill cuts the file off, whole points stay and the next one follows on a line of its own', async () => {
  const whole = [sweep, point(1), point(2)].map(lineOf).join('');
  for (let length = 0; length <= whole.length; length += 37) {
    writeFileSync(path, whole.slice(0, length));
    await written([point(3)]);
    const before = whole.slice(0, whole.slice(0, length).lastIndexOf('\n') + 1);
    const expected = (before === '' ? lineOf(sweep) : before) + lineOf(point(3));
    expect(readFileSync(path, 'utf8'), `cut at ${length}`).toBe(expected);
  }
});

test('a cut inside a letter of several bytes is no harm', async () => {
  const named = { ...sweep, example: { ...sweep.example, name: 'é' } };
  const bytes = Buffer.from(lineOf(named) + lineOf(point(1)));
  writeFileSync(path, bytes.subarray(0, bytes.length - 4));
  const journal = await openJournal(path, named);
  await journal.append(point(2));
  await journal.close();
  expect(readFileSync(path, 'utf8')).toBe(lineOf(named) + lineOf(point(2)));
});

test.each<[string, string, string]>([
  ['text', 'my notes\n', 'expected the points of a sweep in'],
  ['text without an end', 'my notes', 'expected the points of a sweep in'],
  ['another document', '{"schema":"thalweg.model/1"}\n', 'expected the points of a sweep in'],
  ['another seed', lineOf({ ...sweep, seed: 2 }), 'with 1, got 2 as its seed'],
  ['other constants', lineOf({ ...sweep, constants: [{ id: 'be' }] }), 'as its constants'],
  [
    'another generator',
    lineOf({ ...sweep, example: { ...sweep.example, generator: 'b'.repeat(64) } }),
    'as its example',
  ],
  ['a broken line', `${lineOf(sweep)}{"schema":\n`, 'got the end of the text'],
])('refused, and left as it is: %s', async (_title, text, says) => {
  writeFileSync(path, text);
  await expect(openJournal(path, sweep)).rejects.toThrow(says);
  expect(readFileSync(path, 'utf8')).toBe(text);
});

test('a finished file has its points in the order of the sweep', async () => {
  await written([point(2), point(1)]);
  await rewriteJournal(path, sweep, [point(1), point(2)]);
  expect(readFileSync(path, 'utf8')).toBe([sweep, point(1), point(2)].map(lineOf).join(''));
});
