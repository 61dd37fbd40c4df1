import type { ComplexMatrix, SparseMatrix } from '@thalweg/core';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import { readBanner } from './mtx-banner.js';
import { MtxLines } from './mtx-lines.js';
import { readMtxArray } from './read-mtx-array.js';
import { readMtxCoordinates } from './read-mtx-coordinates.js';

/**
 * Reads a Matrix Market file: coordinates as a sparse matrix, an array as a dense one, with the entries that symmetry implies.
 * Throws `bad-file`, `truncated-file`, `not-supported`, `dimension-mismatch`, `too-large` (before allocating) or `not-finite`.
 */
export function readMtx(bytes: Uint8Array, limits: MatrixLimits = MATRIX_LIMITS): ComplexMatrix | SparseMatrix {
  // Every byte is a character of ISO 8859-1: comments may hold anything, the rest is ASCII and checked word by word.
  const lines = new MtxLines(new TextDecoder('latin1').decode(bytes));
  const banner = readBanner(lines.first());
  return banner.format === 'array' ? readMtxArray(lines, banner, limits) : readMtxCoordinates(lines, banner, limits);
}
