import { isCommutative } from '../algebra/block-algebra.js';
import { type Interval, ZERO, add, mul, point, sqr } from '../checker/arithmetic/interval.js';
import type { Generator } from '../generator/generator.js';
import type { ChainRates } from './chain-edges.js';
import { RATE_ROOM } from './limits.js';

/**
 * Enclosures of the rates of a chain, from its jumps: (Lf)(x) = Σ_y r_xy(f(y) − f(x)), r_xy = Σ_m |(R_m)_yx|². They are widened by
 * RATE_ROOM, so that the rates of a document lie in them, whose square roots the jumps are rounded to. Null when the algebra is not
 * commutative, the generator is not given by jumps, or some transition has no way back.
 */
export function chainRates(g: Generator): ChainRates | null {
  if (!isCommutative(g.algebra) || g.superoperator) return null;
  const n = g.algebra.size;
  const rates = Array.from({ length: n }, () => new Array<Interval>(n).fill(ZERO));
  for (const { matrix } of g.jumps) {
    for (let y = 0; y < n; y++) {
      for (let s = matrix.rowStart[y]; s < matrix.rowStart[y + 1]; s++) {
        const x = matrix.colIndex[s];
        if (x === y) continue;
        rates[x][y] = add(rates[x][y], add(sqr(point(matrix.re[s])), sqr(point(matrix.im[s]))));
      }
    }
  }
  const wide = rates.map((row) => row.map((r) => mul(r, ROOM)));
  return wide.every((row, x) => row.every((r, y) => r.lo > 0 === wide[y][x].lo > 0)) ? wide : null;
}

const ROOM: Interval = { lo: 1 - RATE_ROOM, hi: 1 + RATE_ROOM };
