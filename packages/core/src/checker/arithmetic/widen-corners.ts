import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import type { ComplexIntervalMatrix } from './interval-matrix.js';
import { addUp, subDown } from './rounding.js';

/** X with the entries of every corner (block × block) in which V has a non-zero entry widened by ±radius in both parts, in place. */
export function widenCorners(
  x: ComplexIntervalMatrix,
  v: ComplexMatrix,
  blocks: readonly number[],
  radius: number,
): ComplexIntervalMatrix {
  const n = v.rows;
  const blockOf = blocks.flatMap((size, b) => new Array<number>(size).fill(b));
  const reached = new Set<number>();
  const corner = (i: number, j: number): number => blockOf[i] * blocks.length + blockOf[j];
  for (let k = 0; k < n * n; k++) {
    if (v.re[k] !== 0 || v.im[k] !== 0) reached.add(corner(Math.floor(k / n), k % n));
  }
  for (let k = 0; k < n * n; k++) {
    if (!reached.has(corner(Math.floor(k / n), k % n))) continue;
    for (const { lo, hi } of [x.re, x.im]) {
      lo[k] = subDown(lo[k], radius);
      hi[k] = addUp(hi[k], radius);
    }
  }
  return x;
}
