import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { toCoordinates } from '../algebra/block-algebra.js';
import type { Random } from '../random.js';
import type { StateFrame } from '../metric/state-frame.js';
import { fromFrame } from '../metric/state-frame.js';

/** Where one run of a search begins: plain data, so that it can be handed to another thread. */
export interface SearchStart {
  /** `ray`: minimise along multiples of x first; `point`: begin at x. */
  readonly kind: 'ray' | 'point';
  /** Parameters of H, ρ = exp(H)/Tr exp(H): D coordinates, or N log-eigenvalues in a diagonal search. */
  readonly x: readonly number[];
}

/**
 * Starts for a search over states: near the reference state, along two-level spectra in its eigenbasis, then seeded
 * random ones of growing spread. `diagonal` says that only eigenvalues move.
 */
export function searchStarts(
  algebra: BlockAlgebra,
  reference: StateFrame,
  diagonal: boolean,
  randomCount: number,
  random: Random,
): SearchStart[] {
  const n = algebra.size;
  const toParameters = (spectrum: ArrayLike<number>): number[] => {
    const lambda = Float64Array.from(spectrum);
    return diagonal ? Array.from(lambda) : Array.from(toCoordinates(algebra, fromFrame({ lambda, u: reference.u })));
  };
  const starts: SearchStart[] = [];
  for (const subset of leadingSubsets(n)) {
    starts.push({ kind: 'ray', x: toParameters(Array.from({ length: n }, (_, i) => (subset.has(i) ? 1 : 0))) });
  }
  if (!diagonal) starts.push(...offDiagonalRays(algebra));
  const logReference = reference.lambda.map(Math.log);
  starts.push({ kind: 'point', x: toParameters(logReference.map((v, i) => v + 0.05 * Math.sin(i + 1))) });
  const count = diagonal ? n : algebra.dimension;
  for (let k = 0; k < randomCount; k++) {
    const spread = 0.5 + (3 * k) / Math.max(1, randomCount - 1);
    starts.push({ kind: 'point', x: Array.from({ length: count }, () => spread * random.normal()) });
  }
  return starts;
}

/** Single indices, then the first k of them: spectra with two distinct values. */
function leadingSubsets(n: number): Set<number>[] {
  const out: Set<number>[] = [];
  for (let i = 0; i < Math.min(n, 12); i++) out.push(new Set([i]));
  for (let k = 2; k < Math.min(n, 7); k++) out.push(new Set(Array.from({ length: k }, (_, i) => i)));
  return out;
}

/** Rays along the neighbouring off-diagonal basis directions: states polarised across the reference frame. */
function offDiagonalRays(algebra: BlockAlgebra): SearchStart[] {
  const out: SearchStart[] = [];
  for (let k = 0; k < algebra.dimension && out.length < 6; k++) {
    if (Math.abs(algebra.row[k] - algebra.col[k]) !== 1) continue;
    out.push({ kind: 'ray', x: Array.from({ length: algebra.dimension }, (_, l) => (l === k ? Math.SQRT2 : 0)) });
  }
  return out;
}
