import { minimiseScalar } from '../../src/search/brent.js';

/**
 * mlsi of L(A) = Tr(σA) − A, s the smallest eigenvalue of σ: min_x ½(1 + d(s,x)/d(x,s)), d the binary relative entropy
 * (Müller-Hermes, Stilck França & Wolf, J. Math. Phys. 57 (2016)). Scanned, then refined; 1 is the limit x → s.
 */
export function depolarisingMlsi(s: number): number {
  const quotient = (x: number): number =>
    Math.abs(x - s) < 1e-5 ? 1 : 0.5 * (1 + binaryDivergence(s, x) / binaryDivergence(x, s));
  let best = 1;
  const pieces = 64;
  for (let k = 0; k < pieces; k++) {
    const edge = (j: number): number => Math.min(Math.max(j / pieces, 1e-12), 1 - 1e-12);
    best = Math.min(best, minimiseScalar(quotient, edge(k), edge(k + 1), 1e-9).value);
  }
  return best;
}

function binaryDivergence(x: number, y: number): number {
  return x * Math.log(x / y) + (1 - x) * Math.log((1 - x) / (1 - y));
}
