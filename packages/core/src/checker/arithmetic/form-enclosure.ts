import { type ComplexInterval, mulComplex, squaredModulus } from './complex-interval.js';
import { type ComplexIntervalMatrix, entryAt } from './interval-matrix.js';
import { type Interval, ZERO, add, mul, point } from './interval.js';
import type { MeanTableEnclosure } from './mean-table-enclosure.js';

/** Re <X,[ρ]Y> = Σ_ab F_ab Re(conj(X_ab) Y_ab), in the frame of ρ. */
export function encloseForm(table: MeanTableEnclosure, x: ComplexIntervalMatrix, y: ComplexIntervalMatrix): Interval {
  let sum = ZERO;
  for (let a = 0; a < x.rows; a++) {
    for (let b = 0; b < x.cols; b++) {
      const u = entryAt(x, a, b);
      if (isZero(u)) continue;
      const product = x === y ? squaredModulus(u) : realProduct(u, entryAt(y, a, b));
      sum = add(sum, mul(table.value(a, b), product));
    }
  }
  return sum;
}

/**
 * <X,D[ρ;η]X> for Hermitian η in the blocks, in the frame of ρ: Σ_abc conj(X_ab)(η_ac X_cb left(a,c,b) +
 * X_ac η_cb right(a,c,b)). Terms that exchange a, c (or b, c) are conjugate: each pair is summed once, twice its real part.
 */
export function encloseFlowForm(
  table: MeanTableEnclosure,
  blocks: readonly number[],
  x: ComplexIntervalMatrix,
  eta: ComplexIntervalMatrix,
): Interval {
  const n = x.rows;
  const ends = blockEnds(blocks);
  let sum = ZERO;
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      const u = entryAt(x, a, b);
      if (isZero(u)) continue;
      const size = squaredModulus(u);
      sum = add(sum, mul(size, mul(entryAt(eta, a, a).re, table.left(a, a, b))));
      sum = add(sum, mul(size, mul(entryAt(eta, b, b).re, table.right(a, b, b))));
      for (let c = a + 1; c < ends[a]; c++) {
        const v = entryAt(x, c, b);
        if (isZero(v)) continue;
        const term = realProduct(u, mulComplex(entryAt(eta, a, c), v));
        sum = add(sum, mul(TWO, mul(term, table.left(a, c, b))));
      }
      for (let c = b + 1; c < ends[b]; c++) {
        const v = entryAt(x, a, c);
        if (isZero(v)) continue;
        const term = realProduct(u, mulComplex(v, entryAt(eta, c, b)));
        sum = add(sum, mul(TWO, mul(term, table.right(a, c, b))));
      }
    }
  }
  return sum;
}

const TWO = point(2);

/** One past the last index of the block of each index. */
function blockEnds(blocks: readonly number[]): number[] {
  let end = 0;
  return blocks.flatMap((size) => {
    end += size;
    return new Array<number>(size).fill(end);
  });
}

/** Re(conj(u) v). */
function realProduct(u: ComplexInterval, v: ComplexInterval): Interval {
  return add(mul(u.re, v.re), mul(u.im, v.im));
}

function isZero(u: ComplexInterval): boolean {
  return u.re.lo === 0 && u.re.hi === 0 && u.im.lo === 0 && u.im.hi === 0;
}
