import { z } from 'zod';
import { findEntriesFault } from '../matrix/entries-form.js';
import { findFileFault } from '../matrix/file-form.js';
import type { EntriesForm, FileForm, MatrixDocument, PartsForm, PauliForm, Rows } from '../matrix/matrix-document.js';
import { findPauliFault } from '../matrix/pauli-form.js';
import { findPartsFault, findRowsFault } from '../matrix/rows-form.js';
import { oneOf, strict, withoutFault } from './fields.js';

/** Rows of numbers: one pass that stops at the first fault, since a matrix may hold millions. */
export const rowsSchema = withoutFault(z.array(z.unknown()), findRowsFault) as unknown as z.ZodType<Rows>;

const unchecked = z.array(z.unknown());

const partsSchema = withoutFault(
  strict({ re: unchecked, im: unchecked }) as unknown as z.ZodType<PartsForm>,
  findPartsFault,
);

const entriesSchema = withoutFault(
  strict({ shape: unchecked, entries: unchecked }) as unknown as z.ZodType<EntriesForm>,
  findEntriesFault,
);

const pauliSchema: z.ZodType<PauliForm> = withoutFault(
  strict({
    pauli: oneOf('a Pauli string such as "XIZ" or an object of strings with coefficients', [
      z.string(),
      z.record(z.string(), z.number()),
    ]),
  }),
  findPauliFault,
);

const fileSchema: z.ZodType<FileForm> = withoutFault(strict({ file: z.string() }), findFileFault);

/** A matrix in any of its forms. */
export const matrixSchema: z.ZodType<MatrixDocument> = oneOf(
  'a matrix: rows of numbers, {"re", "im"}, {"shape", "entries"}, {"pauli"} or {"file"}',
  [rowsSchema, partsSchema, entriesSchema, pauliSchema, fileSchema],
);
