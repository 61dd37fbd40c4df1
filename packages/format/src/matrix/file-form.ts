import { ThalwegError, type ComplexMatrix, type SparseMatrix } from '@thalweg/core';
import { describeValue } from '../describe-value.js';
import { fault, type Fault } from '../fault.js';
import type { MatrixLimits } from '../limits.js';
import { readMtx } from '../mtx/read-mtx.js';
import { readNpy } from '../npy/read-npy.js';
import type { FileForm } from './matrix-document.js';

/**
 * Bytes of a file named relative to the document. The path has passed `findPathFault`; an implementation still has to refuse
 * links that leave the folder (`outside-folder`) and missing files (`not-found`).
 */
export type ReadFile = (relativePath: string) => Uint8Array;

/** The first fault of a file reference, or null: a path beside or below the document, ending in .npy or .mtx. */
export function findFileFault({ file }: FileForm): Fault | null {
  const found = findPathFault(file);
  if (found) return { ...found, path: ['file'] };
  if (/\.(npy|mtx)$/.test(file)) return null;
  const message = `expected a file name ending in .npy (NumPy) or .mtx (Matrix Market), got ${describeValue(file)}; convert the file`;
  return fault('not-supported', message, ['file']);
}

/** Refuses every path that is not plainly beside or below the document; forward slashes on every system. */
export function findPathFault(path: string): Fault | null {
  const got = describeValue(path);
  if (path === '' || path.includes('\0') || path.split('/').some((part) => part === '' && !path.startsWith('/'))) {
    return fault('bad-file', `expected a file name such as "matrices/v1.npy", got ${got}; correct the path`);
  }
  const outside = path.startsWith('/') || path.split('/').includes('..');
  if (!outside && !/[\\:]/.test(path)) return null;
  const message = `expected a path beside or below the document with forward slashes, got ${got}; move the file there and name it relative to the document`;
  return fault('outside-folder', message);
}

/** Reads the file a document names, by the format its name promises. */
export function decodeFile(
  { file }: FileForm,
  readFile: ReadFile | undefined,
  limits: MatrixLimits,
): ComplexMatrix | SparseMatrix {
  if (!readFile) {
    throw new ThalwegError(
      'not-supported',
      `expected matrices inside the document, got the file ${describeValue(file)}; write the matrix out or use a document in a folder`,
    );
  }
  const bytes = readFile(file);
  return file.endsWith('.npy') ? readNpy(bytes, limits) : readMtx(bytes, limits);
}
