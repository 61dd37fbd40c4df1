import type { ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { type BigFloat, big, minus, negative, over, plus, times } from './big-float.js';

/** A square complex matrix of big floats, row-major. */
export interface BigMatrix {
  readonly n: number;
  readonly re: BigFloat[];
  readonly im: BigFloat[];
}

const ZERO = big(0);

export function bigMatrix(a: ComplexMatrix): BigMatrix {
  return { n: a.rows, re: Array.from(a.re, big), im: Array.from(a.im, big) };
}

export function bigDiagonal(values: readonly BigFloat[]): BigMatrix {
  const n = values.length;
  const re = Array.from({ length: n * n }, (_, k) => (k % (n + 1) === 0 ? values[Math.floor(k / n)] : ZERO));
  return { n, re, im: re.map(() => ZERO) };
}

export function bigAdd(a: BigMatrix, b: BigMatrix): BigMatrix {
  return { n: a.n, re: a.re.map((x, k) => plus(x, b.re[k])), im: a.im.map((x, k) => plus(x, b.im[k])) };
}

export function bigScale(a: BigMatrix, c: BigFloat): BigMatrix {
  return { n: a.n, re: a.re.map((x) => times(x, c)), im: a.im.map((x) => times(x, c)) };
}

export function bigSubtract(a: BigMatrix, b: BigMatrix): BigMatrix {
  return bigAdd(a, bigScale(b, big(-1)));
}

export function bigMultiply(a: BigMatrix, b: BigMatrix): BigMatrix {
  const { n } = a;
  const re = new Array<BigFloat>(n * n).fill(ZERO);
  const im = new Array<BigFloat>(n * n).fill(ZERO);
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const [x, y] = [a.re[i * n + k], a.im[i * n + k]];
      for (let j = 0; j < n; j++) {
        const [u, v] = [b.re[k * n + j], b.im[k * n + j]];
        re[i * n + j] = plus(re[i * n + j], minus(times(x, u), times(y, v)));
        im[i * n + j] = plus(im[i * n + j], plus(times(x, v), times(y, u)));
      }
    }
  }
  return { n, re, im };
}

export function bigAdjoint(a: BigMatrix): BigMatrix {
  const { n } = a;
  const at = (k: number) => (k % n) * n + Math.floor(k / n);
  return { n, re: a.re.map((_, k) => a.re[at(k)]), im: a.im.map((_, k) => negative(a.im[at(k)])) };
}

/** The unitary polar factor of a nearly unitary matrix, by Newton–Schulz steps U ← U(3 − U*U)/2. */
export function bigPolar(a: BigMatrix): BigMatrix {
  let u = a;
  const three = bigDiagonal(Array.from({ length: a.n }, () => big(3)));
  for (let step = 0; step < 7; step++) {
    u = bigScale(bigMultiply(u, bigSubtract(three, bigMultiply(bigAdjoint(u), u))), over(big(1), big(2)));
  }
  return u;
}
