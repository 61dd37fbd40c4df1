import { mkdtempSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { ensureBundle } from '../../packages/setup/lib/build.mjs';
import { npyBytes } from './support/npy-bytes.js';
import { expectOneMessage, expectRefusal, folderWith, model, qubit } from './support/refusal.js';

/** A good matrix file in another folder. */
let outside: string;

beforeAll(async () => {
  await ensureBundle();
  outside = mkdtempSync(join(tmpdir(), 'thalweg-outside-'));
  writeFileSync(join(outside, 'v.npy'), npyBytes('(2, 2)', [0, 1, 1, 0]));
});

afterAll(() => {
  rmSync(outside, { recursive: true, force: true });
});

const withFile = (file: string): object => qubit([{ matrix: { file } }]);
const AT_FILE = '(at /generator/jumps/0/matrix/file of m.json)';

describe('files that a model names', () => {
  test.each(['../v.npy', '/etc/passwd', 'sub/../../v.npy', 'sub\\v.npy'])('the path %s is refused', async (path) => {
    await expectRefusal({ 'm.json': withFile(path) }, ['inspect', 'm.json'], {
      exitCode: 65,
      says: ['expected a path beside or below the document', `got the text ${JSON.stringify(path)}`, '; move', AT_FILE],
    });
  });

  test('a link that leaves the folder is refused', async () => {
    const { folder, run, remove } = folderWith({ 'm.json': withFile('link.npy') });
    symlinkSync(join(outside, 'v.npy'), join(folder, 'link.npy'));
    const { exitCode, stdout, stderr } = await run(['inspect', 'm.json']);
    remove();
    expect({ exitCode, stdout }).toEqual({ exitCode: 65, stdout: '' });
    const says = [
      'expected a file inside the folder of the document, got "link.npy", a link that leaves it; copy',
      AT_FILE,
    ];
    expectOneMessage(stderr, says);
  });

  test.each([
    ['missing.npy', {}, 66, ['expected a readable file "missing.npy", got none: there is no such file; check']],
    [
      'short.npy',
      { 'short.npy': npyBytes('(2, 2)', [0, 1, 1]) },
      65,
      ['expected 32 bytes of entries after the NumPy header, got 24; copy'],
    ],
    [
      'huge.npy',
      { 'huge.npy': npyBytes('(1000000, 1000000)', [0, 1]) },
      65,
      ['of at most 4096 rows and columns', 'got 1000000×1000000; write'],
    ],
    ['not.npy', { 'not.npy': 'text' }, 65, ['got']],
    [
      'out.mtx',
      { 'out.mtx': '%%MatrixMarket matrix coordinate real general\n2 2 1\n3 1 5\n' },
      65,
      ['expected a row between 1 and 2, got 3 (line 3); correct'],
    ],
    [
      'claims.mtx',
      { 'claims.mtx': '%%MatrixMarket matrix coordinate real general\n1000000 1000000 1000000000000\n' },
      65,
      ['got', ';'],
    ],
    ['v.txt', { 'v.txt': '0 1' }, 65, ['expected a file name ending in .npy (NumPy) or .mtx (Matrix Market), got']],
  ] as const)('%s', async (name, files, exitCode, says) => {
    await expectRefusal({ 'm.json': withFile(name), ...files }, ['inspect', 'm.json'], {
      exitCode,
      says: [...says, AT_FILE],
    });
  });

  test('a NumPy file in place of a model is explained', async () => {
    await expectRefusal({ 'l.npy': npyBytes('(2, 2)', [0, 1, 1, 0]) }, ['inspect', 'l.npy'], {
      exitCode: 65,
      says: ['expected a model document, got the NumPy file l.npy', '{"file":"l.npy"}', 'beside it and name that'],
    });
  });
});

describe('models too large are refused before anything is allocated, saying how large', () => {
  const expectation = (n: number): object =>
    model({ algebra: [n], generator: { form: 'expectation', onto: { scalars: true } } });
  const factor = { algebra: [16], generator: { form: 'expectation', onto: { scalars: true } } };
  test.each([
    [
      'levels',
      model({ algebra: [100_000], generator: { form: 'lindblad', jumps: [] } }),
      [
        'expected at most 4096 levels',
        'got 100000: one complex matrix would take 149 GiB; reduce',
        '(at /algebra of m.json)',
      ],
    ],
    [
      'a conditional expectation',
      expectation(4000),
      [
        'expected an algebra of dimension at most 1024',
        'got 16000000 (a matrix would take 1.82 PiB); give it by jumps',
      ],
    ],
    [
      'a tensor product',
      model({ generator: { form: 'tensor', factors: [factor, factor, factor, factor] } }),
      ['expected a tensor product of size at most 1024, got 65536;', '(at /generator/factors of m.json)'],
    ],
    [
      'a group',
      model({ generator: { form: 'length', group: { symmetric: 9 }, length: 'word' } }),
      ['expected a group of order at most 128, got 362880;', '(at /generator/group/symmetric of m.json)'],
    ],
  ] as const)('%s', async (_, document, says) => {
    const begin = performance.now();
    await expectRefusal({ 'm.json': document }, ['constants', 'm.json'], { exitCode: 65, says });
    expect(performance.now() - begin, 'milliseconds').toBeLessThan(20_000);
  });
});
