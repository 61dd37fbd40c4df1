import type { Ring } from './ring.js';

/** A square matrix over a ring, as one map from column to entry for each row; what is not there is zero. */
export type SparseOperator<T> = readonly Map<number, T>[];

export function emptyOperator<T>(size: number): SparseOperator<T> {
  return Array.from({ length: size }, () => new Map<number, T>());
}

/** a_ij += x. */
export function addEntry<T>(ring: Ring<T>, a: SparseOperator<T>, i: number, j: number, x: T): void {
  if (ring.isZero(x)) return;
  const old = a[i].get(j);
  const sum = old === undefined ? x : ring.add(old, x);
  if (ring.isZero(sum)) a[i].delete(j);
  else a[i].set(j, sum);
}

/** target += factor·AB. */
export function addProduct<T>(
  ring: Ring<T>,
  target: SparseOperator<T>,
  factor: T,
  a: SparseOperator<T>,
  b: SparseOperator<T>,
): void {
  a.forEach((row, i) => {
    for (const [k, x] of row) {
      if (b[k].size === 0) continue;
      const scaled = ring.multiply(factor, x);
      for (const [j, y] of b[k]) addEntry(ring, target, i, j, ring.multiply(scaled, y));
    }
  });
}

/** target += factor·A. */
export function addScaled<T>(ring: Ring<T>, target: SparseOperator<T>, factor: T, a: SparseOperator<T>): void {
  a.forEach((row, i) => {
    for (const [j, x] of row) addEntry(ring, target, i, j, ring.multiply(factor, x));
  });
}

export function product<T>(ring: Ring<T>, a: SparseOperator<T>, b: SparseOperator<T>): SparseOperator<T> {
  const out = emptyOperator<T>(a.length);
  addProduct(ring, out, ring.of(1, 0), a, b);
  return out;
}

export function adjointOperator<T>(ring: Ring<T>, a: SparseOperator<T>): SparseOperator<T> {
  const out = emptyOperator<T>(a.length);
  a.forEach((row, i) => {
    for (const [j, x] of row) out[j].set(i, ring.conjugate(x));
  });
  return out;
}

export function isEmpty<T>(a: SparseOperator<T>): boolean {
  return a.every((row) => row.size === 0);
}
