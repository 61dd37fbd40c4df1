import { EXACT_FACTOR_CEILING, EXACT_PRODUCT_CEILING, EXACT_PRODUCT_FLOOR } from './limits.js';

/*
 * Directed rounding from round-to-nearest. `…Down` returns a lower bound of the exact result and `…Up` an upper bound: the
 * nearest double on that side wherever the rounding error can be found exactly, the second nearest at most elsewhere.
 * An infinite result bounds nothing; 0·∞ counts as 0, as the ends of intervals need it.
 */

const U = Number.EPSILON / 2;
const PHI = U * (1 + 2 * U);
const ETA = Number.MIN_VALUE;
const SPLITTER = 134217729; // 2^27 + 1

/** The next double above x at least (Rump, Zimmermann, Boldo & Melquiond, BIT 49 (2009), Algorithm 1); NaN gives ∞. */
export function nextUp(x: number): number {
  const y = x + (Math.abs(x) * PHI + ETA);
  if (y === y) return y;
  return x === -Infinity ? -Number.MAX_VALUE : Infinity;
}

/** The next double below x at most; NaN gives −∞. */
export function nextDown(x: number): number {
  const y = x - (Math.abs(x) * PHI + ETA);
  if (y === y) return y;
  return x === Infinity ? Number.MAX_VALUE : -Infinity;
}

export function addDown(a: number, b: number): number {
  const s = a + b;
  const t = s - a;
  const e = a - (s - t) + (b - t);
  return e >= 0 && e < Infinity ? s : nextDown(s);
}

export function addUp(a: number, b: number): number {
  const s = a + b;
  const t = s - a;
  const e = a - (s - t) + (b - t);
  return e <= 0 && e > -Infinity ? s : nextUp(s);
}

export function subDown(a: number, b: number): number {
  return addDown(a, -b);
}

export function subUp(a: number, b: number): number {
  return addUp(a, -b);
}

export function mulDown(a: number, b: number): number {
  const p = a * b;
  const e = productError(a, b, p);
  if (e >= 0) return p;
  if (e < 0) return nextDown(p);
  if (a === 0 || b === 0) return 0;
  return p === 0 && a > 0 === b > 0 ? 0 : nextDown(p);
}

export function mulUp(a: number, b: number): number {
  const p = a * b;
  const e = productError(a, b, p);
  if (e <= 0) return p;
  if (e > 0) return nextUp(p);
  if (a === 0 || b === 0) return 0;
  return p === 0 && a > 0 !== b > 0 ? 0 : nextUp(p);
}

/** a/b for b ≠ 0. */
export function divDown(a: number, b: number): number {
  const q = a / b;
  const s = quotientErrorSign(a, b, q);
  if (s >= 0) return q;
  if (s < 0) return nextDown(q);
  return q === 0 && a > 0 === b > 0 ? 0 : nextDown(q);
}

/** a/b for b ≠ 0. */
export function divUp(a: number, b: number): number {
  const q = a / b;
  const s = quotientErrorSign(a, b, q);
  if (s <= 0) return q;
  if (s > 0) return nextUp(q);
  return q === 0 && a > 0 !== b > 0 ? 0 : nextUp(q);
}

/** √x for x ≥ 0. */
export function sqrtDown(x: number): number {
  const s = Math.sqrt(x);
  const r = squareResidual(x, s);
  return r >= 0 ? s : Math.max(0, nextDown(s));
}

/** √x for x ≥ 0. */
export function sqrtUp(x: number): number {
  const s = Math.sqrt(x);
  const r = squareResidual(x, s);
  return r <= 0 ? s : nextUp(s);
}

/** ab − p where p = fl(ab), by Dekker (Numer. Math. 18 (1971)); NaN where over- or underflow could spoil it. */
function productError(a: number, b: number, p: number): number {
  const m = Math.abs(p);
  if (
    m > EXACT_PRODUCT_FLOOR &&
    m < EXACT_PRODUCT_CEILING &&
    Math.abs(a) < EXACT_FACTOR_CEILING &&
    Math.abs(b) < EXACT_FACTOR_CEILING
  ) {
    const ca = SPLITTER * a;
    const ah = ca - (ca - a);
    const al = a - ah;
    const cb = SPLITTER * b;
    const bh = cb - (cb - b);
    const bl = b - bh;
    return al * bl - (p - ah * bh - al * bh - ah * bl);
  }
  return NaN;
}

/** A number with the sign of a/b − q, q = fl(a/b); 0 only when exact, NaN when unknown. */
function quotientErrorSign(a: number, b: number, q: number): number {
  if (a === 0 || b === Infinity || b === -Infinity) return 0;
  const p = q * b;
  // a − p is exact: p is within a few units in the last place of a. Its comparison with the error of p is exact too.
  const r = a - p - productError(q, b, p);
  return b > 0 ? r : -r;
}

/** x − s², s = fl(√x); NaN when unknown. */
function squareResidual(x: number, s: number): number {
  if (x === 0 || x === Infinity) return 0;
  const p = s * s;
  return x - p - productError(s, s, p);
}
