import { fromRows, type ComplexMatrix } from '@thalweg/core';
import { count, describeValue } from '../describe-value.js';
import { fault, type Fault } from '../fault.js';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import type { PartsForm, Rows } from './matrix-document.js';

/** The first fault of rows that should be a real matrix, or null. */
export function findRowsFault(rows: unknown, limits: MatrixLimits = MATRIX_LIMITS): Fault | null {
  if (!Array.isArray(rows) || rows.length === 0) {
    return fault(
      'dimension-mismatch',
      `expected rows of numbers, got ${describeValue(rows)}; write for example [[1,0],[0,-1]]`,
    );
  }
  const first: unknown = rows[0];
  if (!Array.isArray(first) || first.length === 0) {
    return fault(
      'wrong-schema',
      `expected a row of numbers, got ${describeValue(first)}; write for example [1,0]`,
      [0],
    );
  }
  const cols = first.length;
  const tooLarge = findDenseSizeFault(rows.length, cols, limits);
  if (tooLarge) return tooLarge;
  for (let i = 0; i < rows.length; i++) {
    const found = findRowFault(rows[i], i, cols);
    if (found) return found;
  }
  return null;
}

/** The first fault of a matrix in real and imaginary parts, or null. */
export function findPartsFault({ re, im }: PartsForm, limits: MatrixLimits = MATRIX_LIMITS): Fault | null {
  for (const [part, rows] of [
    ['re', re],
    ['im', im],
  ] as const) {
    const found = findRowsFault(rows, limits);
    if (found) return { ...found, path: [part, ...found.path] };
  }
  const shape = `${re.length}×${re[0]?.length}`;
  const other = `${im.length}×${im[0]?.length}`;
  if (shape === other) return null;
  return fault(
    'dimension-mismatch',
    `expected an imaginary part of the shape ${shape} of the real part, got ${other}; give both the same shape`,
    ['im'],
  );
}

/** Refuses a dense rows × cols matrix above the limits before anything is allocated. */
export function findDenseSizeFault(rows: number, cols: number, limits: MatrixLimits = MATRIX_LIMITS): Fault | null {
  if (rows <= limits.side && cols <= limits.side && rows * cols <= limits.denseEntries) return null;
  const details = { rows, cols, side: limits.side, denseEntries: limits.denseEntries };
  const bound = `at most ${limits.side} rows and columns and ${limits.denseEntries} entries`;
  return fault(
    'too-large',
    `expected a dense matrix of ${bound}, got ${rows}×${cols}; write it as entries or Pauli strings if it is sparse`,
    [],
    details,
  );
}

/** Rows already checked, as a dense matrix. */
export function decodeRows(re: Rows, im?: Rows): ComplexMatrix {
  return fromRows(re, im);
}

function findRowFault(row: unknown, i: number, cols: number): Fault | null {
  if (!Array.isArray(row)) {
    return fault(
      'wrong-schema',
      `expected a row of ${count(cols, 'number')}, got ${describeValue(row)}; write for example [1,0]`,
      [i],
    );
  }
  if (row.length !== cols) {
    const message = `expected ${count(cols, 'entry', 'entries')} in row ${i} as in row 0, got ${row.length}; make all rows equally long`;
    return fault('ragged-matrix', message, [i]);
  }
  for (let j = 0; j < cols; j++) {
    const entry: unknown = row[j];
    if (typeof entry !== 'number') {
      const advice = 'write a number, and complex matrices as {"re": rows, "im": rows}';
      return fault('wrong-schema', `expected a number, got ${describeValue(entry)}; ${advice}`, [i, j]);
    }
    if (!Number.isFinite(entry))
      return fault('not-finite', `expected a finite number, got ${entry}; correct the entry`, [i, j]);
  }
  return null;
}
