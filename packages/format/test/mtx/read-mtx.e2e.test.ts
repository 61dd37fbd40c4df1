import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { isSparse, toDense } from '../../src/matrix/decode-matrix.js';
import { readMtx } from '../../src/mtx/read-mtx.js';
import { runPython } from '../support/run-python.js';

interface Entry {
  name: string;
  banner: string[];
  re: number[][];
  im: number[][];
}

const folder = mkdtempSync(join(tmpdir(), 'thalweg-mtx-'));
let files: Entry[];

beforeAll(() => {
  files = JSON.parse(runPython(new URL('write_mtx_files.py', import.meta.url), [folder])) as Entry[];
});

afterAll(() => rmSync(folder, { recursive: true }));

describe('readMtx on files written by SciPy', () => {
  it('reads every format, field and symmetry to the bit', () => {
    expect(files.length).toBe(29);
    for (const { name, banner, re, im } of files) {
      const matrix = readMtx(readFileSync(join(folder, name)));
      expect([name, isSparse(matrix)]).toEqual([name, banner[0] === 'coordinate']);
      const dense = toDense(matrix);
      expect([name, dense.rows, dense.cols]).toEqual([name, re.length, re[0]?.length]);
      expect([name, dense.re.map((x) => x + 0)]).toEqual([name, Float64Array.from(re.flat(), (x) => x + 0)]);
      expect([name, dense.im.map((y) => y + 0)]).toEqual([name, Float64Array.from(im.flat(), (y) => y + 0)]);
    }
  });

  it('has met every combination that SciPy writes', () => {
    const seen = new Set(files.map(({ banner }) => banner.join(' ')));
    expect([...seen].sort()).toEqual(
      [
        'array complex general',
        'array complex hermitian',
        'array complex skew-symmetric',
        'array complex symmetric',
        'array integer general',
        'array integer symmetric',
        'array real general',
        'array real skew-symmetric',
        'array real symmetric',
        'coordinate complex general',
        'coordinate complex hermitian',
        'coordinate complex skew-symmetric',
        'coordinate complex symmetric',
        'coordinate integer general',
        'coordinate integer symmetric',
        'coordinate pattern general',
        'coordinate pattern symmetric',
        'coordinate real general',
        'coordinate real skew-symmetric',
        'coordinate real symmetric',
      ].sort(),
    );
  });
});
