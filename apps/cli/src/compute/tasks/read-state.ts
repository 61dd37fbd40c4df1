import { densityMatrix, ThalwegError, type ComplexMatrix, type Structure } from '@thalweg/core';
import { decodeMatrix, parseState, readMtx, readNpy, toDense } from '@thalweg/format';
import { filesBesideSource } from '../../input/files-beside.js';
import { inDocument } from '../../input/in-document.js';
import type { DocumentSource } from '../../input/read-source.js';

/** A state of a model from a JSON document, a NumPy or a Matrix Market file; what is no state of it is refused with the file's name. */
export function readState(structure: Structure, source: DocumentSource): ComplexMatrix {
  return inDocument(source.name, () => densityMatrix(structure.algebra, matrixOf(structure, source), ''));
}

function matrixOf(structure: Structure, source: DocumentSource): ComplexMatrix {
  const { bytes, name } = source;
  const { size } = structure.algebra;
  const matrix = /\.npy$/i.test(name)
    ? toDense(readNpy(bytes))
    : /\.mtx$/i.test(name)
      ? toDense(readMtx(bytes))
      : toDense(decodeMatrix(parseState(bytes), filesBesideSource(source)));
  if (matrix.rows !== size || matrix.cols !== size) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected a ${size}×${size} density matrix for this model, got ${matrix.rows}×${matrix.cols}; give a state of the model`,
    );
  }
  return matrix;
}
