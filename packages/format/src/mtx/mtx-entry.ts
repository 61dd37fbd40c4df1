import { ThalwegError } from '@thalweg/core';
import type { MtxBanner } from './mtx-banner.js';
import type { MtxLines } from './mtx-lines.js';

type Entry = readonly [re: number, im: number];

/** Names of the words that hold one value. */
export function valueWords(field: MtxBanner['field']): readonly string[] {
  if (field === 'pattern') return [];
  if (field === 'complex') return ['a real part', 'an imaginary part'];
  return [field === 'integer' ? 'a whole number' : 'a number'];
}

/** One value from its words; a pattern entry is 1. */
export function readValue(lines: MtxLines, field: MtxBanner['field'], words: readonly string[]): Entry {
  if (field === 'pattern') return [1, 0];
  if (field === 'integer') return [lines.whole(words[0], 'a whole number'), 0];
  return [lines.real(words[0]), field === 'complex' ? lines.real(words[1]) : 0];
}

/** The value that symmetry puts at (j, i) when `value` is at (i, j), i > j. */
export function mirrored(symmetry: MtxBanner['symmetry'], [re, im]: Entry): Entry {
  if (symmetry === 'hermitian') return [re, -im];
  return symmetry === 'skew-symmetric' ? [-re, -im] : [re, im];
}

/** Refuses a diagonal entry that contradicts the symmetry of the file. */
export function requireDiagonal(lines: MtxLines, symmetry: MtxBanner['symmetry'], im: number): void {
  if (symmetry === 'skew-symmetric')
    throw lines.fault('no entry on the diagonal of a skew-symmetric matrix', 'one', 'leave it out');
  if (symmetry === 'hermitian' && im !== 0) {
    throw lines.fault(
      'a real number on the diagonal of a Hermitian matrix',
      `the imaginary part ${im}`,
      'correct the entry',
    );
  }
}

/** Symmetric, Hermitian and skew-symmetric matrices are square. */
export function requireSquare(symmetry: MtxBanner['symmetry'], rows: number, cols: number): void {
  if (symmetry === 'general' || rows === cols) return;
  throw new ThalwegError(
    'dimension-mismatch',
    `expected a square matrix since the file is ${symmetry}, got ${rows}×${cols}; correct the file`,
  );
}

/** The file must end after the entries that its size line announces. */
export function requireEnd(lines: MtxLines, expected: number): void {
  if (lines.next() !== null)
    throw lines.fault(`the end of the file after ${expected} entries`, 'more lines', 'correct the size line');
}

/** The error for a file that ends before its size line is fulfilled. */
export function truncated(found: number, expected: number): ThalwegError {
  const message = `expected ${expected} entries as the size line says, got ${found}; copy the file again or correct the size line`;
  return new ThalwegError('truncated-file', message, { details: { expected, found } });
}
