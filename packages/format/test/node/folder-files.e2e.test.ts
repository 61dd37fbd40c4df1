import { mkdirSync, mkdtempSync, rmSync, symlinkSync, truncateSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { FILE_BYTES_LIMIT } from '../../src/limits.js';
import { filesBeside, filesInFolder } from '../../src/node/folder-files.js';
import { refusal } from '../support/caught-error.js';
import { runPython } from '../support/run-python.js';

const top = mkdtempSync(join(tmpdir(), 'thalweg-files-'));
const folder = join(top, 'model');
const read = filesInFolder(folder);

beforeAll(() => {
  mkdirSync(join(folder, 'sub'), { recursive: true });
  mkdirSync(join(top, 'model-other'));
  writeFileSync(join(folder, 'a.npy'), 'a');
  writeFileSync(join(folder, 'sub', 'b.npy'), 'b');
  writeFileSync(join(folder, '..odd.npy'), 'odd');
  writeFileSync(join(top, 'secret.npy'), 'secret');
  writeFileSync(join(top, 'model-other', 'c.npy'), 'c');
  symlinkSync('sub/b.npy', join(folder, 'inner.npy'));
  symlinkSync('../secret.npy', join(folder, 'outer.npy'));
  symlinkSync('../model-other', join(folder, 'sideways'));
  symlinkSync('inner.npy', join(folder, 'twice.npy'));
  symlinkSync('outer.npy', join(folder, 'twice-outer.npy'));
  symlinkSync('loop.npy', join(folder, 'loop.npy'));
  symlinkSync('/dev/zero', join(folder, 'zero.npy'));
  symlinkSync('model', join(top, 'link-to-model'));
  writeFileSync(join(folder, 'huge.npy'), '');
  truncateSync(join(folder, 'huge.npy'), FILE_BYTES_LIMIT + 1);
  runPython(new URL('make_pipe.py', import.meta.url), [join(folder, 'pipe.npy')]);
});

afterAll(() => rmSync(top, { recursive: true }));

const text = (bytes: Uint8Array) => Buffer.from(bytes).toString('latin1');

describe('filesInFolder', () => {
  it('reads files beside and below, through links that stay inside', () => {
    expect(text(read('a.npy'))).toBe('a');
    expect(text(read('sub/b.npy'))).toBe('b');
    expect(text(read('./sub/./b.npy'))).toBe('b');
    expect(text(read('inner.npy'))).toBe('b');
    expect(text(read('twice.npy'))).toBe('b');
    expect(text(read('..odd.npy'))).toBe('odd');
  });

  it('reads beside a document, also when its folder is reached through a link', () => {
    expect(text(filesBeside(join(folder, 'model.json'))('a.npy'))).toBe('a');
    expect(text(filesBeside(join(top, 'link-to-model', 'model.json'))('sub/b.npy'))).toBe('b');
  });

  it.each(['outer.npy', 'twice-outer.npy', 'sideways/c.npy', 'zero.npy'])(
    'refuses %s, a link out of the folder',
    (path) => {
      expect(refusal(() => read(path))).toEqual([
        'outside-folder',
        undefined,
        `expected a file inside the folder of the document, got ${JSON.stringify(path)}, a link that leaves it; copy the file there`,
      ]);
    },
  );

  it.each(['../secret.npy', 'sub/../../secret.npy', join(top, 'secret.npy')])('refuses the path %s', (path) => {
    expect(refusal(() => read(path))[0]).toBe('outside-folder');
  });

  it.each([
    ['missing.npy', 'there is no such file'],
    ['a.npy/b.npy', 'a part of its path is not a folder'],
    ['loop.npy', 'its links go round in a circle'],
  ])('refuses %s: %s', (path, reason) => {
    expect(refusal(() => read(path))).toEqual([
      'not-found',
      undefined,
      `expected a readable file "${path}", got none: ${reason}; check its name and permissions`,
    ]);
  });

  it('refuses folders and pipes without waiting', () => {
    for (const path of ['sub', 'pipe.npy']) {
      expect(refusal(() => read(path))).toEqual([
        'bad-file',
        undefined,
        `expected a file, got "${path}", which is a folder or a device; correct the path`,
      ]);
    }
  });

  it('refuses a huge file before reading it', () => {
    expect(refusal(() => read('huge.npy'))).toEqual([
      'too-large',
      undefined,
      `expected a file of at most ${FILE_BYTES_LIMIT} bytes, got ${FILE_BYTES_LIMIT + 1} in "huge.npy"; reduce the model`,
    ]);
  });
});
