import { ThalwegError } from '@thalweg/core';
import { count } from '../describe-value.js';
import type { MtxBanner } from './mtx-banner.js';
import type { MtxLines } from './mtx-lines.js';

/** Real and imaginary part of an entry. */
export type MtxValue = readonly [re: number, im: number];

/** Names of the words that hold one value. */
export function valueWords(field: MtxBanner['field']): readonly string[] {
  if (field === 'pattern') return [];
  if (field === 'complex') return ['a real part', 'an imaginary part'];
  return [field === 'integer' ? 'a whole number' : 'a number'];
}

/** One value from its words; a pattern entry is 1. */
export function readValue(lines: MtxLines, field: MtxBanner['field'], words: readonly string[]): MtxValue {
  if (field === 'pattern') return [1, 0];
  if (field === 'integer') return [lines.whole(words[0], 'a whole number'), 0];
  return [lines.real(words[0]), field === 'complex' ? lines.real(words[1]) : 0];
}

/** The value that symmetry puts at (j, i) when `value` is at (i, j), i > j. */
export function mirrored(symmetry: MtxBanner['symmetry'], [re, im]: MtxValue): MtxValue {
  if (symmetry === 'hermitian') return [re, -im];
  return symmetry === 'skew-symmetric' ? [-re, -im] : [re, im];
}

/** Refuses an entry at (i, i), 0-based, that contradicts the symmetry of the file. */
export function requireDiagonal(symmetry: MtxBanner['symmetry'], i: number, [re, im]: MtxValue): void {
  const wrong = symmetry === 'skew-symmetric' ? re !== 0 || im !== 0 : symmetry === 'hermitian' && im !== 0;
  if (!wrong) return;
  const expected = symmetry === 'hermitian' ? 'a real number' : 'zero';
  const got = `${re} + ${im}i at row ${i + 1}, column ${i + 1}`;
  throw new ThalwegError(
    'bad-file',
    `expected ${expected} on the diagonal since the file is ${symmetry}, got ${got}; correct it`,
    {
      details: { row: i + 1, column: i + 1 },
    },
  );
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
    throw lines.fault(
      `the end of the file after ${count(expected, 'entry', 'entries')}`,
      'more lines',
      'correct the size line',
    );
}

/** The error for a file that ends before its size line is fulfilled. */
export function truncated(found: number, expected: number): ThalwegError {
  const message = `expected ${count(expected, 'entry', 'entries')} as the size line says, got ${found}; copy the file again or correct the size line`;
  return new ThalwegError('truncated-file', message, { details: { expected, found } });
}
