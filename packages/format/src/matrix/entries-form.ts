import { sparseFromTriplets, type SparseMatrix } from '@thalweg/core';
import { describeValue } from '../describe-value.js';
import { fault, type Fault } from '../fault.js';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import type { EntriesForm } from './matrix-document.js';

/** The first fault of a matrix written as entries, or null. */
export function findEntriesFault({ shape, entries }: EntriesForm, limits: MatrixLimits = MATRIX_LIMITS): Fault | null {
  const wrongShape = findShapeFault(shape, limits);
  if (wrongShape) return { ...wrongShape, path: ['shape'] };
  const tooMany = findSparseSizeFault(entries.length, limits);
  if (tooMany) return { ...tooMany, path: ['entries'] };
  const [rows, cols] = shape;
  const seen = new Set<number>();
  for (let k = 0; k < entries.length; k++) {
    const entry: unknown = entries[k];
    const found = findEntryFault(entry, rows, cols);
    if (found) return { ...found, path: ['entries', k] };
    const [i, j] = entry as [number, number];
    if (seen.has(i * cols + j)) {
      const message = `expected each place once, got an entry at row ${i}, column ${j} a second time; keep one`;
      return fault('wrong-schema', message, ['entries', k]);
    }
    seen.add(i * cols + j);
  }
  return null;
}

/** Refuses more stored entries than the limit before anything is allocated. */
export function findSparseSizeFault(entries: number, limits: MatrixLimits = MATRIX_LIMITS): Fault | null {
  if (entries <= limits.sparseEntries) return null;
  const message = `expected a sparse matrix of at most ${limits.sparseEntries} entries, got ${entries}; reduce the model`;
  return fault('too-large', message, [], { entries, sparseEntries: limits.sparseEntries });
}

/** Entries already checked, as a sparse matrix. */
export function decodeEntries({ shape, entries }: EntriesForm): SparseMatrix {
  return sparseFromTriplets(shape[0], shape[1], entries);
}

function findShapeFault(shape: unknown, limits: MatrixLimits): Fault | null {
  const valid = Array.isArray(shape) && shape.length === 2 && shape.every((n) => Number.isInteger(n) && n >= 1);
  if (!valid) {
    return fault(
      'wrong-schema',
      `expected a shape [rows, columns] of positive whole numbers, got ${describeShape(shape)}; correct it`,
    );
  }
  const [rows, cols] = shape as [number, number];
  if (rows <= limits.side && cols <= limits.side) return null;
  const message = `expected a matrix of at most ${limits.side} rows and columns, got ${rows}×${cols}; reduce the model`;
  return fault('too-large', message, [], { rows, cols, side: limits.side });
}

function findEntryFault(entry: unknown, rows: number, cols: number): Fault | null {
  if (!Array.isArray(entry) || entry.length !== 4) {
    return fault(
      'wrong-schema',
      `expected an entry [row, column, re, im], got ${describeValue(entry)}; write for example [0,1,1,0]`,
    );
  }
  const [i, j, re, im] = entry as unknown[];
  if (!isIndex(i, rows) || !isIndex(j, cols)) {
    const place = `row ${describeIndex(i)}, column ${describeIndex(j)}`;
    return fault(
      'dimension-mismatch',
      `expected a place inside ${rows}×${cols}, counted from 0, got ${place}; correct the entry or the shape`,
    );
  }
  for (const part of [re, im]) {
    if (Number.isFinite(part)) continue;
    const code = typeof part === 'number' ? 'not-finite' : 'wrong-schema';
    return fault(code, `expected finite numbers re and im, got ${describeValue(part)}; correct the entry`);
  }
  return null;
}

function describeShape(shape: unknown): string {
  const short = Array.isArray(shape) && shape.length <= 4 && shape.every((n) => typeof n === 'number');
  return short ? `[${shape.join(',')}]` : describeValue(shape);
}

function isIndex(value: unknown, bound: number): value is number {
  return typeof value === 'number' && Number.isInteger(value) && value >= 0 && value < bound;
}

function describeIndex(value: unknown): string {
  return typeof value === 'number' ? String(value) : describeValue(value);
}
