import { ThalwegError } from '@thalweg/core';
import { MATRIX_LIMITS, type MatrixLimits } from '../limits.js';
import { decodeMatrix, type DecodedMatrix } from '../matrix/decode-matrix.js';
import { encodeMatrix } from '../matrix/encode-matrix.js';
import type { ReadFile } from '../matrix/file-form.js';
import { mapMatrices } from './map-matrices.js';
import type { Model, ModelDocument } from './model-document.js';

/** A model whose matrices are decoded, files included: its content, whatever way it was written. */
export type ResolvedModel = Model<DecodedMatrix> & { schema: 'thalweg.model/1' };

export interface ResolveOptions {
  /** Reads the files that the document names; without it such a document is refused. */
  readonly readFile?: ReadFile;
  readonly limits?: MatrixLimits;
}

/** Decodes every matrix of a model; throws the errors of `decodeMatrix` with the pointer of the matrix. */
export function resolveModel(document: ModelDocument, options: ResolveOptions = {}): ResolvedModel {
  const { readFile, limits = MATRIX_LIMITS } = options;
  let stored = 0;
  const decode = (matrix: Parameters<typeof decodeMatrix>[0], pointer: string): DecodedMatrix => {
    const decoded = decodeMatrix(matrix, { pointer, limits, ...(readFile && { readFile }) });
    stored += decoded.re.length;
    if (stored <= MODEL_SIZE_FACTOR * limits.denseEntries) return decoded;
    const most = MODEL_SIZE_FACTOR * limits.denseEntries;
    throw new ThalwegError(
      'too-large',
      `expected at most ${most} stored matrix entries in a model, got more; reduce the model`,
      {
        pointer,
        details: { limit: most },
      },
    );
  };
  return { ...mapMatrices(document, decode), schema: document.schema };
}

/** The model document with every matrix written densely: what its digest is taken of. */
export function denseModel(model: ResolvedModel): ModelDocument {
  return { ...mapMatrices(model, encodeMatrix), schema: model.schema };
}

/** All matrices of a model together may store this many times the entries of the largest dense matrix. */
const MODEL_SIZE_FACTOR = 8;
