import { isSparse, type DecodedMatrix } from './decode-matrix.js';

/** The rows of one part of a matrix, dense, one at a time; −0 comes out as 0. A row is valid until the next is asked for. */
export function* matrixRows(matrix: DecodedMatrix, part: 're' | 'im'): Generator<Float64Array> {
  const { rows, cols } = matrix;
  const values = matrix[part];
  const row = new Float64Array(cols);
  for (let i = 0; i < rows; i++) {
    if (isSparse(matrix)) {
      row.fill(0);
      const end = matrix.rowStart[i + 1] ?? 0;
      for (let p = matrix.rowStart[i] ?? 0; p < end; p++) row[matrix.colIndex[p] ?? 0] = (values[p] ?? 0) + 0;
    } else {
      for (let j = 0; j < cols; j++) row[j] = (values[i * cols + j] ?? 0) + 0;
    }
    yield row;
  }
}
