import { zeros, type ComplexMatrix } from '@thalweg/core';
import { faultError } from '../fault.js';
import type { MatrixLimits } from '../limits.js';
import { findDenseSizeFault } from '../matrix/rows-form.js';
import type { MtxBanner } from './mtx-banner.js';
import { mirrored, readValue, requireDiagonal, requireEnd, requireSquare, truncated, valueWords } from './mtx-entry.js';
import type { MtxLines } from './mtx-lines.js';

/** Entries column by column, one a line; with symmetry only the lower triangle, without the diagonal if skew-symmetric. */
export function readMtxArray(lines: MtxLines, { field, symmetry }: MtxBanner, limits: MatrixLimits): ComplexMatrix {
  const size = lines.next() ?? [];
  lines.requireWords(size, ['the number of rows', 'the number of columns']);
  const rows = lines.whole(size[0], 'a number of rows', 1);
  const cols = lines.whole(size[1], 'a number of columns', 1);
  requireSquare(symmetry, rows, cols);
  const tooLarge = findDenseSizeFault(rows, cols, limits);
  if (tooLarge) throw faultError(tooLarge);
  const matrix = zeros(rows, cols);
  const names = valueWords(field);
  const firstRow = (j: number) => (symmetry === 'general' ? 0 : symmetry === 'skew-symmetric' ? j + 1 : j);
  const expected =
    symmetry === 'general' ? rows * cols : (rows * (rows + (symmetry === 'skew-symmetric' ? -1 : 1))) / 2;
  let found = 0;
  for (let j = 0; j < cols; j++) {
    for (let i = firstRow(j); i < rows; i++) {
      const words = lines.next();
      if (words === null) throw truncated(found, expected);
      lines.requireWords(words, names);
      const value = readValue(lines, field, words);
      if (i === j) requireDiagonal(lines, symmetry, value[1]);
      else if (symmetry !== 'general') put(matrix, j, i, mirrored(symmetry, value));
      put(matrix, i, j, value);
      found++;
    }
  }
  requireEnd(lines, expected);
  return matrix;
}

function put({ re, im, cols }: ComplexMatrix, i: number, j: number, [x, y]: readonly [number, number]): void {
  re[i * cols + j] = x;
  im[i * cols + j] = y;
}
