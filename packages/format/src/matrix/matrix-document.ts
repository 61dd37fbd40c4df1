/** Rows of real numbers, all of the same length. */
export type Rows = number[][];

/** A matrix as a document holds it. */
export type MatrixDocument = Rows | PartsForm | EntriesForm | PauliForm | FileForm;

/** Real and imaginary parts of the same shape. */
export interface PartsForm {
  re: Rows;
  im: Rows;
}

/** Non-zero entries [row, column, re, im], 0-based, each place at most once. */
export interface EntriesForm {
  shape: [number, number];
  entries: [number, number, number, number][];
}

/** A Pauli string such as "XIZ", first letter = first tensor factor, or a real-linear combination of strings. */
export interface PauliForm {
  pauli: string | Record<string, number>;
}

/** A NumPy (.npy) or Matrix Market (.mtx) file beside or below the document. */
export interface FileForm {
  file: string;
}

/** The form a matrix is written in. */
export type MatrixForm = 'rows' | 'parts' | 'entries' | 'pauli' | 'file';

export function matrixForm(matrix: MatrixDocument): MatrixForm {
  if (Array.isArray(matrix)) return 'rows';
  if ('pauli' in matrix) return 'pauli';
  if ('file' in matrix) return 'file';
  return 'entries' in matrix ? 'entries' : 'parts';
}
