import type { DecodedMatrix } from './decode-matrix.js';
import type { PartsForm, Rows } from './matrix-document.js';
import { matrixRows } from './matrix-rows.js';

/** The plain, dense form of a matrix: real rows when every imaginary part is zero, else both parts. Never a −0. */
export function encodeMatrix(matrix: DecodedMatrix): Rows | PartsForm {
  const re = denseRows(matrix, 're');
  return isReal(matrix) ? re : { re, im: denseRows(matrix, 'im') };
}

/** True when no entry has an imaginary part. */
export function isReal(matrix: DecodedMatrix): boolean {
  return matrix.im.every((y) => y === 0);
}

function denseRows(matrix: DecodedMatrix, part: 're' | 'im'): Rows {
  return Array.from(matrixRows(matrix, part), (row) => Array.from(row));
}
