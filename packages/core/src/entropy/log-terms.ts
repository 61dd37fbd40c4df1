import { SERIES_PHI } from '../tolerances.js';

/** Λ(e^p, e^q) = (e^p − e^q)/(p − q), without cancellation as p and q meet and without overflow for p, q ≤ 0. */
export function meanOfLogs(p: number, q: number): number {
  const top = Math.max(p, q);
  const gap = Math.abs(p - q);
  // (1 − e^{−g})/g = 1 + (e^{−g} − 1 + g)/(−g).
  return gap > SERIES_PHI ? (Math.exp(top) * -Math.expm1(-gap)) / gap : Math.exp(top) * (1 - gap * phi2(-gap));
}

/** (e^p − e^q)(p − q) ≥ 0, a summand of the entropy production. */
export function productionTerm(p: number, q: number): number {
  const gap = Math.abs(p - q);
  return Math.exp(Math.max(p, q)) * -Math.expm1(-gap) * gap;
}

/** e^p (p − q) − e^p + e^q ≥ 0, a summand of the relative entropy. */
export function entropyTerm(p: number, q: number): number {
  const d = p - q;
  if (Math.abs(d) > SERIES_PHI) return Math.exp(p) * (d - 1) + Math.exp(q);
  return Math.exp(p) * d * d * phi2(-d);
}

/** (e^z − 1 − z)/z² for |z| ≤ SERIES_PHI. */
function phi2(z: number): number {
  let sum = 0;
  for (let k = INVERSE_FACTORIALS.length - 1; k >= 0; k--) sum = sum * z + INVERSE_FACTORIALS[k];
  return sum;
}

/** 1/(k+2)! */
const INVERSE_FACTORIALS = Array.from({ length: 17 }, (_, k) => {
  let product = 1;
  for (let i = 2; i <= k + 2; i++) product *= i;
  return 1 / product;
});
