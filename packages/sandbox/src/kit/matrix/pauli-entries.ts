/** Entries [row, column, re, im] of the tensor product of the Pauli matrices that a string of I, X, Y, Z names, first letter = first factor. */
export function pauliEntries(string: string): (readonly [number, number, number, number])[] {
  if (typeof string !== 'string' || !/^[IXYZ]{1,12}$/.test(string)) {
    throw new RangeError(`expected a Pauli string of 1 to 12 letters I, X, Y, Z, got ${JSON.stringify(string)}`);
  }
  const n = 2 ** string.length;
  return Array.from({ length: n }, (_, row) => entryOfRow(string, row));
}

function entryOfRow(string: string, row: number): readonly [number, number, number, number] {
  let column = row;
  let quarterTurns = 0;
  for (let k = 0; k < string.length; k++) {
    const letter = string[k];
    const bit = 1 << (string.length - 1 - k);
    const one = (row & bit) !== 0;
    if (letter === 'X' || letter === 'Y') column ^= bit;
    if (letter === 'Z' && one) quarterTurns += 2;
    // <1|Y|0> = i, <0|Y|1> = −i.
    if (letter === 'Y') quarterTurns += one ? 1 : 3;
  }
  const turn = quarterTurns % 4;
  return [row, column, turn === 0 ? 1 : turn === 2 ? -1 : 0, turn === 1 ? 1 : turn === 3 ? -1 : 0];
}
