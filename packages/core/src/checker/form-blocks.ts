import type { SparseOperator } from './sparse-operator.js';

/** Sets of rows between which all entries vanish: the form is positive if each of them is. */
export function connectedRows<T>(rows: SparseOperator<T>): number[][] {
  const seen = new Uint8Array(rows.length);
  const out: number[][] = [];
  for (let start = 0; start < rows.length; start++) {
    if (seen[start]) continue;
    seen[start] = 1;
    const block = [start];
    for (const i of block) {
      for (const j of rows[i].keys()) {
        if (seen[j]) continue;
        seen[j] = 1;
        block.push(j);
      }
    }
    out.push(block.sort((i, j) => i - j));
  }
  return out;
}
