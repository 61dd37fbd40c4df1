import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { readNpy } from '../../src/npy/read-npy.js';
import { refusal } from '../support/caught-error.js';
import { runPython } from '../support/run-python.js';

interface Manifest {
  good: { name: string; re: number[][]; im: number[][] }[];
  bad: string[];
}

const folder = mkdtempSync(join(tmpdir(), 'thalweg-npy-'));
let manifest: Manifest;

beforeAll(() => {
  manifest = JSON.parse(runPython(new URL('write_npy_files.py', import.meta.url), [folder])) as Manifest;
});

afterAll(() => rmSync(folder, { recursive: true }));

const read = (name: string) => readNpy(readFileSync(join(folder, name)));

const advice = 'convert the array with .astype(complex) and save it again';
const types = 'expected numbers of type bool, int, uint, float16/32/64 or complex64/128, got the NumPy type the text';
const axes = 'expected a matrix, a NumPy array with two axes, got shape';
const REFUSALS: Record<string, [code: string, message: string]> = {
  'object.npy': [
    'not-supported',
    'expected an array of numbers, got Python objects, which are never unpickled; convert it with .astype(complex) and save it again',
  ],
  'text.npy': ['not-supported', `${types} "<U2"; ${advice}`],
  'date.npy': ['not-supported', `${types} "<M8[D]"; ${advice}`],
  'structured.npy': [
    'not-supported',
    'expected an array of numbers, got a structured NumPy array; save its numeric field alone',
  ],
  'long-double.npy': ['not-supported', `${types} "<f16"; ${advice}`],
  'vector.npy': ['dimension-mismatch', `${axes} (3,); reshape it and save it again`],
  'scalar.npy': ['dimension-mismatch', `${axes} (); reshape it and save it again`],
  'cube.npy': ['dimension-mismatch', `${axes} (2, 2, 2); reshape it and save it again`],
  'empty.npy': ['dimension-mismatch', `${axes} (0, 3); reshape it and save it again`],
  'nan.npy': ['not-finite', 'expected finite entries, got NaN at row 0, column 1; correct the array'],
  'infinite.npy': ['not-finite', 'expected finite entries, got Infinity at row 1, column 1; correct the array'],
  'large-integer.npy': [
    'not-supported',
    'expected whole numbers that a double holds exactly, got 9007199254740993; convert the array with .astype(float) if rounding is meant',
  ],
  'wide.npy': [
    'too-large',
    'expected a dense matrix of at most 4096 rows and columns and 4194304 entries, got 5000×1; write it as entries or Pauli strings if it is sparse',
  ],
  'archive.npy': [
    'bad-file',
    'expected a NumPy file (it starts with \\x93NUMPY), got other bytes; save the array with numpy.save',
  ],
  'two.npy': [
    'bad-file',
    'expected 32 bytes of entries after the NumPy header, got 192; save each array in a file of its own',
  ],
};

describe('readNpy on files written by NumPy', () => {
  it('reads every type, byte order, layout and version to the bit', () => {
    expect(manifest.good.length).toBe(14 * 2 * 2 * 3 + 6);
    for (const { name, re, im } of manifest.good) {
      const matrix = read(name);
      expect([name, matrix.rows, matrix.cols]).toEqual([name, re.length, re[0]?.length]);
      expect([name, matrix.re]).toEqual([name, Float64Array.from(re.flat())]);
      expect([name, matrix.im]).toEqual([name, Float64Array.from(im.flat())]);
    }
  });

  it('refuses every other file with a reason', () => {
    expect([...manifest.bad].sort()).toEqual(Object.keys(REFUSALS).sort());
    for (const name of manifest.bad) {
      const [code, , message] = refusal(() => read(name));
      expect([name, code, message]).toEqual([name, ...(REFUSALS[name] ?? [])]);
    }
  });

  it('refuses every proper beginning of a file', () => {
    const bytes = readFileSync(join(folder, 'c16-little-C-v1.npy'));
    for (let length = 0; length < bytes.length; length++) {
      expect([length, refusal(() => readNpy(bytes.subarray(0, length)))[0]]).toEqual([length, 'truncated-file']);
    }
  });
});
