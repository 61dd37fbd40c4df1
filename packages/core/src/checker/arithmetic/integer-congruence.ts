import type { GaussianMatrix } from './gaussian-matrix.js';
import { gcd, lcm } from './rational.js';

/** S A S restricted to a block, S = diag(scale) positive integers, with integer entries; row-major. */
export interface IntegerCongruence {
  readonly re: bigint[];
  readonly im: bigint[];
  readonly scale: readonly bigint[];
}

/**
 * Make a Hermitian rational block integer by a diagonal congruence, which keeps its signature. Rows with a whole diagonal
 * entry keep the scale 1 where a neighbour can carry the denominator: an identity block stays one.
 */
export function integerCongruence(a: GaussianMatrix, block: readonly number[]): IntegerCongruence {
  const n = block.length;
  const entry = (i: number, j: number) => a.entries[block[i] * a.cols + block[j]];
  const scale = block.map((_, i) => squareRootMultiple(entry(i, i).re.denominator));
  for (let i = 0; i < n; i++) {
    for (let j = i + 1; j < n; j++) {
      const x = entry(i, j);
      const denominator = lcm(x.re.denominator, x.im.denominator);
      if (denominator === 1n) continue;
      const missing = denominator / gcd(denominator, scale[i] * scale[j]);
      if (missing > 1n) scale[scale[i] >= scale[j] ? i : j] *= missing;
    }
  }
  const re = new Array<bigint>(n * n).fill(0n);
  const im = new Array<bigint>(n * n).fill(0n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const x = entry(i, j);
      const factor = scale[i] * scale[j];
      re[i * n + j] = (x.re.numerator * factor) / x.re.denominator;
      im[i * n + j] = (x.im.numerator * factor) / x.im.denominator;
    }
  }
  return { re, im, scale };
}

/** A small number whose square is a multiple of d: exact roots of the odd part and of the power of two are taken. */
function squareRootMultiple(d: bigint): bigint {
  let odd = d;
  let twos = 0n;
  while (odd % 2n === 0n) {
    odd /= 2n;
    twos++;
  }
  const root = integerRoot(odd);
  return (root * root === odd ? root : odd) << ((twos + 1n) / 2n);
}

/** ⌊√n⌋ by Newton's iteration from above. */
function integerRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let x = 1n << BigInt(2 * n.toString(16).length);
  for (;;) {
    const next = (x + n / x) / 2n;
    if (next >= x) return x;
    x = next;
  }
}
