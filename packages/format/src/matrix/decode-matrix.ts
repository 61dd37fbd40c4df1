import { denseFromSparse, sparseFromDense, ThalwegError, type ComplexMatrix, type SparseMatrix } from '@thalweg/core';
import { faultError, type Fault } from '../fault.js';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import { decodeEntries, findEntriesFault } from './entries-form.js';
import { decodeFile, findFileFault, type ReadFile } from './file-form.js';
import {
  matrixForm,
  type EntriesForm,
  type FileForm,
  type MatrixDocument,
  type PartsForm,
  type PauliForm,
  type Rows,
} from './matrix-document.js';
import { decodePauli, findPauliFault } from './pauli-form.js';
import { decodeRows, findDenseSizeFault, findPartsFault, findRowsFault } from './rows-form.js';

export interface DecodeOptions {
  /** JSON pointer of the matrix in its document, put into errors. */
  readonly pointer?: string;
  /** Reads the files that documents name; without it such matrices are refused. */
  readonly readFile?: ReadFile;
  readonly limits?: MatrixLimits;
}

/** A matrix read from a document: sparse for entries, Pauli strings and Matrix Market coordinates, else dense. */
export type DecodedMatrix = ComplexMatrix | SparseMatrix;

/**
 * Reads a matrix in any of its forms. Throws `ragged-matrix`, `not-finite`, `dimension-mismatch`, `wrong-schema`, `too-large`
 * (before allocating), and for files `outside-folder`, `not-found`, `truncated-file`, `bad-file` or `not-supported`.
 */
export function decodeMatrix(matrix: MatrixDocument, options: DecodeOptions = {}): DecodedMatrix {
  const { pointer = '', readFile, limits = MATRIX_LIMITS } = options;
  const found = findMatrixFault(matrix, limits);
  if (found) throw faultError(found, pointer);
  switch (matrixForm(matrix)) {
    case 'rows':
      return decodeRows(matrix as Rows);
    case 'parts':
      return decodeRows((matrix as PartsForm).re, (matrix as PartsForm).im);
    case 'entries':
      return decodeEntries(matrix as EntriesForm);
    case 'pauli':
      return decodePauli(matrix as PauliForm);
    case 'file':
      return withPointer(pointer, () => decodeFile(matrix as FileForm, readFile, limits));
  }
}

export function isSparse(matrix: DecodedMatrix): matrix is SparseMatrix {
  return 'rowStart' in matrix;
}

/** The matrix in dense storage; throws `too-large` above the limit for dense matrices. */
export function toDense(matrix: DecodedMatrix, limits: MatrixLimits = MATRIX_LIMITS): ComplexMatrix {
  if (!isSparse(matrix)) return matrix;
  const found = findDenseSizeFault(matrix.rows, matrix.cols, limits);
  if (found) throw faultError(found);
  return denseFromSparse(matrix);
}

export function toSparse(matrix: DecodedMatrix): SparseMatrix {
  return isSparse(matrix) ? matrix : sparseFromDense(matrix);
}

/** The first fault of a matrix whose fields have the right JSON types, or null. Files are not opened. */
function findMatrixFault(matrix: MatrixDocument, limits: MatrixLimits): Fault | null {
  switch (matrixForm(matrix)) {
    case 'rows':
      return findRowsFault(matrix, limits);
    case 'parts':
      return findPartsFault(matrix as PartsForm, limits);
    case 'entries':
      return findEntriesFault(matrix as EntriesForm, limits);
    case 'pauli':
      return findPauliFault(matrix as PauliForm, limits);
    case 'file':
      return findFileFault(matrix as FileForm);
  }
}

/** Errors of a file reader know the file only; this adds where the document names it. */
function withPointer<T>(pointer: string, run: () => T): T {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof ThalwegError)) throw error;
    const { code, message, details } = error;
    throw new ThalwegError(code, message, { pointer: `${pointer}/file`, ...(details && { details }), cause: error });
  }
}
