import { ThalwegError } from '../errors.js';
import { type SparseMatrix, type Triplet, sparseFromTriplets } from '../linalg/sparse-matrix.js';

/** The tensor product of Pauli matrices named by a string of I, X, Y, Z, first letter leftmost: 2^m × 2^m, m ≤ 10. */
export function pauliString(text: string): SparseMatrix {
  if (!/^[IXYZ]{1,10}$/.test(text)) {
    throw new ThalwegError('usage', `expected a Pauli string of 1 to 10 letters I, X, Y, Z, got "${text}"`);
  }
  const n = 2 ** text.length;
  const triplets: Triplet[] = [];
  for (let column = 0; column < n; column++) {
    let row = column;
    let quarterTurns = 0;
    for (let k = 0; k < text.length; k++) {
      const bit = 1 << (text.length - 1 - k);
      const one = (column & bit) !== 0;
      const letter = text[k];
      if (letter === 'X' || letter === 'Y') row ^= bit;
      if (letter === 'Z' && one) quarterTurns += 2;
      // Y|0> = i|1>, Y|1> = −i|0>.
      if (letter === 'Y') quarterTurns += one ? 3 : 1;
    }
    const turn = quarterTurns % 4;
    triplets.push([row, column, turn === 0 ? 1 : turn === 2 ? -1 : 0, turn === 1 ? 1 : turn === 3 ? -1 : 0]);
  }
  return sparseFromTriplets(n, n, triplets);
}
