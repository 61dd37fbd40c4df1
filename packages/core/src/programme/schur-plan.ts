import { DENSE_RATE, DOT_RATE } from '../tolerances.js';
import { type ConePattern } from './cone-pattern.js';

/** How the products of one cone's coefficients are formed; fixed by the sparsity pattern alone. */
export interface SchurPlan {
  /** Rows of the block that coefficient t touches: touched[touchedStart[t] … touchedStart[t + 1] − 1], ascending. */
  readonly touched: Int32Array;
  readonly touchedStart: Int32Array;
  /** Places of p and q of each stored entry in that list. */
  readonly entryRow: Int32Array;
  readonly entryCol: Int32Array;
  /** 1 where coefficient t touches the same rows as t − 1 and has as long a leading part. */
  readonly sameAsPrevious: Uint8Array;
  /** 1 where A_t s⁻¹ is formed as a dense product. */
  readonly denseProduct: Uint8Array;
  /** 1 where all entries of x A_t s⁻¹ are formed at once instead of those that a later coefficient uses. */
  readonly wholeMatrix: Uint8Array;
  readonly mostTouched: number;
}

/**
 * Chooses, coefficient by coefficient, the cheapest way to the products <A_u, x A_t s⁻¹>, u ≥ t (Fujisawa, Kojima &
 * Nakata, Math. Program. 79 (1997)): with R the rows that A_t touches, x A_t s⁻¹ = x_{·R} (A_t s⁻¹)_{R·}, of which either
 * the whole leading part is formed by a dense product or only the needed entries, as inner products of length |R|.
 */
export function schurPlan({ size, rows, row, col, leading, complex }: ConePattern): SchurPlan {
  const { count, start, coordinate, prefix } = rows;
  const entryRow = new Int32Array(start[count]);
  const entryCol = new Int32Array(start[count]);
  const touchedStart = new Int32Array(count + 1);
  const touched: number[] = [];
  const sameAsPrevious = new Uint8Array(count);
  const denseProduct = new Uint8Array(count);
  const wholeMatrix = new Uint8Array(count);
  const seen = new Int32Array(size);
  const place = new Int32Array(size);
  let mostTouched = 0;
  for (let t = 0; t < count; t++) {
    const list: number[] = [];
    for (let e = start[t]; e < start[t + 1]; e++) {
      for (const p of [row[coordinate[e]], col[coordinate[e]]]) {
        if (seen[p] === t + 1) continue;
        seen[p] = t + 1;
        list.push(p);
      }
    }
    list.sort((a, b) => a - b);
    list.forEach((p, k) => (place[p] = k));
    for (let e = start[t]; e < start[t + 1]; e++) {
      entryRow[e] = place[row[coordinate[e]]];
      entryCol[e] = place[col[coordinate[e]]];
    }
    const before = t > 0 ? touched.slice(touchedStart[t - 1]) : [];
    sameAsPrevious[t] = Number(
      t > 0 && leading[t] === leading[t - 1] && list.length === before.length && list.every((p, k) => p === before[k]),
    );
    for (const p of list) touched.push(p);
    touchedStart[t + 1] = touched.length;
    mostTouched = Math.max(mostTouched, list.length);
    const inner = list.length * (complex ? 2 : 1);
    const q = leading[t];
    const updates = 2 * (start[t + 1] - start[t]) * (complex ? 2 : 1);
    denseProduct[t] = Number(updates / DOT_RATE > (inner * size * (complex ? 2 : 1)) / DENSE_RATE);
    wholeMatrix[t] = Number((2 * prefix[t]) / DOT_RATE > (q * q * (complex ? 2 : 1)) / DENSE_RATE);
  }
  return {
    touched: Int32Array.from(touched),
    touchedStart,
    entryRow,
    entryCol,
    sameAsPrevious,
    denseProduct,
    wholeMatrix,
    mostTouched,
  };
}
