import { ThalwegError, zeros, type ComplexMatrix } from '@thalweg/core';
import { count } from '../describe-value.js';
import { faultError } from '../fault.js';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import { findDenseSizeFault } from '../matrix/rows-form.js';
import { readNpyHeader, type NpyHeader } from './npy-header.js';
import { npyType, type NpyType } from './npy-type.js';

/**
 * Reads a two-dimensional NumPy array of numbers (.npy; format by numpy.lib.format) as a matrix. Sizes are checked against the
 * limits and the length of the file before anything is allocated. Throws `bad-file`, `truncated-file`, `not-supported`,
 * `dimension-mismatch`, `too-large` or `not-finite`.
 */
export function readNpy(bytes: Uint8Array, limits: MatrixLimits = MATRIX_LIMITS): ComplexMatrix {
  const header = readNpyHeader(bytes);
  const type = npyType(header.descr);
  const [rows, cols] = matrixShape(header.shape);
  const tooLarge = findDenseSizeFault(rows, cols, limits);
  if (tooLarge) throw faultError(tooLarge);
  requireLength(bytes.length - header.dataOffset, rows * cols * type.size);
  return readEntries(bytes, header, type, zeros(rows, cols));
}

function matrixShape(shape: readonly number[]): [number, number] {
  const [rows = 0, cols = 0] = shape;
  if (shape.length === 2 && rows > 0 && cols > 0) return [rows, cols];
  const got = shape.length === 1 ? `(${rows},)` : `(${shape.slice(0, 8).join(', ')})`;
  throw new ThalwegError(
    'dimension-mismatch',
    `expected a matrix, a NumPy array with two axes, got shape ${got}; reshape it and save it again`,
  );
}

function requireLength(length: number, expected: number): void {
  if (length === expected) return;
  const details = { expected, length };
  const wanted = `expected ${count(expected, 'byte')} of entries after the NumPy header, got ${length}`;
  if (length < expected) throw new ThalwegError('truncated-file', `${wanted}; copy the file again`, { details });
  throw new ThalwegError('bad-file', `${wanted}; save each array in a file of its own`, { details });
}

function readEntries(bytes: Uint8Array, header: NpyHeader, type: NpyType, target: ComplexMatrix): ComplexMatrix {
  const { rows, cols, re, im } = target;
  const view = new DataView(bytes.buffer, bytes.byteOffset + header.dataOffset);
  const [rowStep, colStep] = header.fortranOrder ? [1, rows] : [cols, 1];
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++) {
      const offset = (i * rowStep + j * colStep) * type.size;
      const k = i * cols + j;
      const x = type.read(view, offset);
      const y = type.complex ? type.read(view, offset + type.size / 2) : 0;
      if (!Number.isFinite(x) || !Number.isFinite(y)) {
        const got = Number.isFinite(x) ? y : x;
        throw new ThalwegError(
          'not-finite',
          `expected finite entries, got ${got} at row ${i}, column ${j}; correct the array`,
          {
            details: { row: i, column: j },
          },
        );
      }
      re[k] = x;
      im[k] = y;
    }
  }
  return target;
}
