import { zeros, type ComplexMatrix } from '@thalweg/core';
import { faultError } from '../fault.js';
import type { MatrixLimits } from '../limits.js';
import { findDenseSizeFault } from '../matrix/rows-form.js';
import type { MtxBanner } from './mtx-banner.js';
import {
  mirrored,
  readValue,
  requireDiagonal,
  requireEnd,
  requireSquare,
  truncated,
  valueWords,
  type MtxValue,
} from './mtx-entry.js';
import type { MtxLines } from './mtx-lines.js';

/**
 * Entries column by column, one a line; with symmetry only the lower triangle. A skew-symmetric file leaves the diagonal out, but
 * SciPy 1.10 writes its zeros, so both are read: the number of entries tells them apart.
 */
export function readMtxArray(lines: MtxLines, banner: MtxBanner, limits: MatrixLimits): ComplexMatrix {
  const { symmetry } = banner;
  const [rows, cols] = readSize(lines, symmetry, limits);
  const triangle = (rows * (rows + 1)) / 2;
  const expected = symmetry === 'general' ? rows * cols : symmetry === 'skew-symmetric' ? triangle - rows : triangle;
  const values = readValues(lines, banner, symmetry === 'skew-symmetric' ? triangle : expected);
  const withDiagonal = symmetry !== 'skew-symmetric' || values.length === triangle;
  if (values.length < expected) throw truncated(values.length, expected);
  if (values.length > expected && values.length < triangle) {
    throw lines.fault(`${expected} entries below the diagonal`, String(values.length), 'correct the size line');
  }
  const matrix = zeros(rows, cols);
  let k = 0;
  for (let j = 0; j < cols; j++) {
    for (let i = symmetry === 'general' ? 0 : withDiagonal ? j : j + 1; i < rows; i++) {
      const value = values[k++] ?? ZERO;
      if (i === j) requireDiagonal(symmetry, i, value);
      else if (symmetry !== 'general') put(matrix, j, i, mirrored(symmetry, value));
      put(matrix, i, j, value);
    }
  }
  return matrix;
}

const ZERO: MtxValue = [0, 0];

function readSize(lines: MtxLines, symmetry: MtxBanner['symmetry'], limits: MatrixLimits): [number, number] {
  const size = lines.next() ?? [];
  lines.requireWords(size, ['the number of rows', 'the number of columns']);
  const rows = lines.whole(size[0], 'a number of rows', 1);
  const cols = lines.whole(size[1], 'a number of columns', 1);
  requireSquare(symmetry, rows, cols);
  const tooLarge = findDenseSizeFault(rows, cols, limits);
  if (tooLarge) throw faultError(tooLarge);
  return [rows, cols];
}

/** At most `most` values up to the end of the file; more are refused. */
function readValues(lines: MtxLines, { field }: MtxBanner, most: number): MtxValue[] {
  const names = valueWords(field);
  const values: MtxValue[] = [];
  while (values.length < most) {
    const words = lines.next();
    if (words === null) return values;
    lines.requireWords(words, names);
    values.push(readValue(lines, field, words));
  }
  requireEnd(lines, most);
  return values;
}

function put({ re, im, cols }: ComplexMatrix, i: number, j: number, [x, y]: MtxValue): void {
  re[i * cols + j] = x;
  im[i * cols + j] = y;
}
