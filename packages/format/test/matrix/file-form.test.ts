import { describe, expect, it } from 'vitest';
import { ThalwegError } from '@thalweg/core';
import { decodeMatrix } from '../../src/matrix/decode-matrix.js';
import { encodeMatrix } from '../../src/matrix/encode-matrix.js';
import { refusal } from '../support/caught-error.js';

const mtx = new TextEncoder().encode('%%MatrixMarket matrix array real general\n1 2\n3\n4\n');

describe('matrices in files', () => {
  it('hands the path to the reader it was given', () => {
    const asked: string[] = [];
    const readFile = (path: string) => {
      asked.push(path);
      return mtx;
    };
    const matrix = decodeMatrix({ file: 'data/./v.mtx' }, { readFile });
    expect(asked).toEqual(['data/./v.mtx']);
    expect(encodeMatrix(matrix)).toEqual([[3, 4]]);
  });

  it('points at the field when the file is broken', () => {
    const readFile = () => mtx.subarray(0, 44);
    expect(refusal(() => decodeMatrix({ file: 'v.mtx' }, { readFile, pointer: '/state' }))).toEqual([
      'truncated-file',
      '/state/file',
      'expected 2 entries as the size line says, got 0; copy the file again or correct the size line',
    ]);
    const missing = () => {
      throw new ThalwegError('not-found', 'expected a file');
    };
    expect(refusal(() => decodeMatrix({ file: 'v.npy' }, { readFile: missing }))).toEqual([
      'not-found',
      '/file',
      'expected a file',
    ]);
  });

  it('lets a reader that fails otherwise fail loudly', () => {
    const readFile = () => {
      throw new RangeError('a bug');
    };
    expect(() => decodeMatrix({ file: 'v.npy' }, { readFile })).toThrow(RangeError);
  });

  it('refuses files without a reader', () => {
    expect(refusal(() => decodeMatrix({ file: 'v.npy' }))).toEqual([
      'not-supported',
      '/file',
      'expected matrices inside the document, got the file the text "v.npy"; write the matrix out or use a document in a folder',
    ]);
  });

  it.each([
    '/etc/v.npy',
    '../v.npy',
    'a/../../v.npy',
    'a/..',
    '..',
    'C:\\v.npy',
    'C:v.npy',
    '..\\v.npy',
    '//host/v.npy',
  ])('refuses %s as outside the folder before asking the reader', (file) => {
    const readFile = () => {
      throw new RangeError('was asked');
    };
    expect(refusal(() => decodeMatrix({ file }, { readFile, pointer: '/m' }))).toEqual([
      'outside-folder',
      '/m/file',
      `expected a path beside or below the document with forward slashes, got the text ${JSON.stringify(file)}; move the file there and name it relative to the document`,
    ]);
  });

  it.each(['', 'a//v.npy', 'a/', 'v.npy\0.mtx'])('refuses the path %j', (file) => {
    expect(refusal(() => decodeMatrix({ file }))).toEqual([
      'bad-file',
      '/file',
      `expected a file name such as "matrices/v1.npy", got the text ${JSON.stringify(file)}; correct the path`,
    ]);
  });

  it.each(['v.npz', 'v', 'v.NPY', 'v.npy.gz'])('refuses the format of %s', (file) => {
    expect(refusal(() => decodeMatrix({ file }))).toEqual([
      'not-supported',
      '/file',
      `expected a file name ending in .npy (NumPy) or .mtx (Matrix Market), got the text ${JSON.stringify(file)}; convert the file`,
    ]);
  });
});
