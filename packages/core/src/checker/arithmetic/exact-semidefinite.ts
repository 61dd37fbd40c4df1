import { ThalwegError } from '../../errors.js';
import { type GaussianMatrix, isHermitianGaussian } from './gaussian-matrix.js';
import { integerCongruence } from './integer-congruence.js';
import { type Rational, rational } from './rational.js';

/**
 * Outcome of an exact LDL* factorisation with symmetric pivoting. Positive: the non-zero pivots in the order of their
 * elimination, all > 0, so that their number is the rank. Negative: `index` has, after the elimination of others, a
 * negative diagonal entry, or a zero one in a row that is not zero.
 */
export type SemidefiniteVerdict =
  | {
      readonly semidefinite: true;
      readonly order: readonly number[];
      readonly pivots: readonly Rational[];
    }
  | { readonly semidefinite: false; readonly index: number };

/**
 * Decide exactly whether a Hermitian matrix is positive semidefinite, singular ones included. Elimination is free of
 * fractions (Bareiss, Math. Comp. 22 (1968)) and runs apart in each connected block. Throws `not-hermitian`.
 */
export function decideSemidefinite(a: GaussianMatrix): SemidefiniteVerdict {
  if (a.rows !== a.cols || !isHermitianGaussian(a)) {
    throw new ThalwegError('not-hermitian', 'expected an exactly Hermitian matrix of rational numbers');
  }
  const order: number[] = [];
  const pivots: Rational[] = [];
  for (const block of connectedBlocks(a)) {
    const verdict = eliminate(a, block);
    if (!verdict.semidefinite) return verdict;
    order.push(...verdict.order);
    pivots.push(...verdict.pivots);
  }
  return { semidefinite: true, order, pivots };
}

/** Index sets between which all entries vanish. */
function connectedBlocks(a: GaussianMatrix): number[][] {
  const n = a.rows;
  const blocks: number[][] = [];
  const seen = new Uint8Array(n);
  for (let start = 0; start < n; start++) {
    if (seen[start]) continue;
    seen[start] = 1;
    const block = [start];
    for (const i of block) {
      for (let j = 0; j < n; j++) {
        const x = a.entries[i * n + j];
        if (seen[j] || (x.re.numerator === 0n && x.im.numerator === 0n)) continue;
        seen[j] = 1;
        block.push(j);
      }
    }
    blocks.push(block.sort((i, j) => i - j));
  }
  return blocks;
}

/**
 * Fraction-free elimination of one block: after k steps every remaining entry is a (k+1)-rowed minor of the integer
 * matrix, so that division by the previous pivot is exact and pivots are principal minors.
 */
function eliminate(a: GaussianMatrix, block: readonly number[]): SemidefiniteVerdict {
  const { re, im, scale } = integerCongruence(a, block);
  const n = block.length;
  const real = im.every((y) => y === 0n);
  const order: number[] = [];
  const pivots: Rational[] = [];
  let rest = block.map((_, i) => i);
  let previous = 1n;
  while (rest.length > 0) {
    const negative = rest.find((i) => re[i * n + i] < 0n);
    if (negative !== undefined) return { semidefinite: false, index: block[negative] };
    const k = smallestPositive(rest, (i) => re[i * n + i]);
    if (k < 0) {
      const broken = rest.find((i) => rest.some((j) => re[i * n + j] !== 0n || im[i * n + j] !== 0n));
      if (broken !== undefined) return { semidefinite: false, index: block[broken] };
      break;
    }
    const pivot = re[k * n + k];
    order.push(block[k]);
    pivots.push(rational(pivot, previous * scale[k] * scale[k]));
    rest = rest.filter((i) => i !== k);
    if (real) reduceReal(re, n, k, rest, previous);
    else reduceComplex(re, im, n, k, rest, previous);
    previous = pivot;
  }
  return { semidefinite: true, order, pivots };
}

function smallestPositive(candidates: readonly number[], value: (i: number) => bigint): number {
  let best = -1;
  for (const i of candidates) {
    const x = value(i);
    if (x > 0n && (best < 0 || x < value(best))) best = i;
  }
  return best;
}

/** a_ij ← (p a_ij − a_ik a_jk)/previous for the remaining i, j. */
function reduceReal(re: bigint[], n: number, k: number, rest: readonly number[], previous: bigint): void {
  const p = re[k * n + k];
  for (const i of rest) {
    const x = re[i * n + k];
    for (const j of rest) {
      if (j > i) break;
      const y = re[j * n + k];
      const product = x === 0n || y === 0n ? 0n : x * y;
      if (product === 0n && p === previous) continue;
      const value = (p * re[i * n + j] - product) / previous;
      re[i * n + j] = value;
      re[j * n + i] = value;
    }
  }
}

/** a_ij ← (p a_ij − a_ik conj(a_jk))/previous for the remaining i, j. */
function reduceComplex(
  re: bigint[],
  im: bigint[],
  n: number,
  k: number,
  rest: readonly number[],
  previous: bigint,
): void {
  const p = re[k * n + k];
  for (const i of rest) {
    const x = re[i * n + k];
    const y = im[i * n + k];
    for (const j of rest) {
      if (j > i) break;
      const u = re[j * n + k];
      const v = im[j * n + k];
      const real = (p * re[i * n + j] - x * u - y * v) / previous;
      const imaginary = i === j ? 0n : (p * im[i * n + j] - y * u + x * v) / previous;
      re[i * n + j] = real;
      re[j * n + i] = real;
      im[i * n + j] = imaginary;
      im[j * n + i] = -imaginary;
    }
  }
}
