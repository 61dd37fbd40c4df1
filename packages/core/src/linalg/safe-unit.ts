import { SAFE_RANGE } from '../tolerances.js';
import { requireFinite } from './shape-checks.js';

/**
 * A power of two near the largest modulus of the first `count` entries when that is outside the safe range, else 1. Zero
 * counts as smallest. Throws `not-finite`.
 */
export function safeUnit(a: Float64Array, count: number): number {
  let top = 0;
  for (let k = 0; k < count; k++) {
    const x = Math.abs(a[k]);
    // A NaN stays in `top` until the end.
    if (!(x <= top) && top === top) top = x;
  }
  if (top < SAFE_RANGE && top * SAFE_RANGE > 1) return 1;
  requireFinite(a, count);
  return 2 ** Math.max(-1000, Math.floor(Math.log2(top)));
}
