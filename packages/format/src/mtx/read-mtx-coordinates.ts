import { sparseFromTriplets, ThalwegError, type SparseMatrix, type Triplet } from '@thalweg/core';
import { faultError } from '../fault.js';
import type { MatrixLimits } from '../limits.js';
import { findSparseSizeFault } from '../matrix/entries-form.js';
import type { MtxBanner } from './mtx-banner.js';
import { mirrored, readValue, requireDiagonal, requireEnd, requireSquare, truncated, valueWords } from './mtx-entry.js';
import type { MtxLines } from './mtx-lines.js';

/** Entries "row column value", counted from 1, each place once; with symmetry only on and below the diagonal. */
export function readMtxCoordinates(lines: MtxLines, banner: MtxBanner, limits: MatrixLimits): SparseMatrix {
  const { field, symmetry } = banner;
  const [rows, cols, expected] = readSize(lines, symmetry, limits);
  const names = ['a row', 'a column', ...valueWords(field)];
  const triplets: Triplet[] = [];
  const seen = new Set<number>();
  for (let found = 0; found < expected; found++) {
    const words = lines.next();
    if (words === null) throw truncated(found, expected);
    lines.requireWords(words, names);
    const i = readIndex(lines, words[0], 'row', rows);
    const j = readIndex(lines, words[1], 'column', cols);
    const value = readValue(lines, field, words.slice(2));
    if (seen.has(i * cols + j))
      throw lines.fault('each place once', `row ${i + 1}, column ${j + 1} again`, 'add the duplicates up');
    seen.add(i * cols + j);
    triplets.push([i, j, ...value]);
    if (symmetry === 'general') continue;
    if (i < j)
      throw lines.fault(
        `entries on or below the diagonal since the file is ${symmetry}`,
        `row ${i + 1}, column ${j + 1}`,
        'leave it out',
      );
    if (i === j) requireDiagonal(symmetry, i, value);
    else triplets.push([j, i, ...mirrored(symmetry, value)]);
  }
  requireEnd(lines, expected);
  return sparseFromTriplets(rows, cols, triplets);
}

function readSize(lines: MtxLines, symmetry: MtxBanner['symmetry'], limits: MatrixLimits): [number, number, number] {
  const size = lines.next() ?? [];
  lines.requireWords(size, ['the number of rows', 'the number of columns', 'the number of entries']);
  const rows = lines.whole(size[0], 'a number of rows', 1);
  const cols = lines.whole(size[1], 'a number of columns', 1);
  const entries = lines.whole(size[2], 'a number of entries', 0);
  requireSquare(symmetry, rows, cols);
  if (rows > limits.side || cols > limits.side) {
    throw new ThalwegError(
      'too-large',
      `expected a matrix of at most ${limits.side} rows and columns, got ${rows}×${cols}; reduce the model`,
      {
        details: { rows, cols, side: limits.side },
      },
    );
  }
  const tooMany = findSparseSizeFault(entries, limits);
  if (tooMany) throw faultError(tooMany);
  return [rows, cols, entries];
}

function readIndex(lines: MtxLines, word: string | undefined, what: string, bound: number): number {
  const index = lines.whole(word, `a ${what}`, 1);
  if (index <= bound) return index - 1;
  throw lines.fault(`a ${what} between 1 and ${bound}`, String(index), 'correct the entry or the size line');
}
