import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { type MatrixUnits, matrixUnits } from '../algebra/matrix-units.js';
import { binaryParts } from '../checker/arithmetic/binary-parts.js';
import { decideSemidefinite } from '../checker/arithmetic/exact-semidefinite.js';
import { type GaussianMatrix, gaussianFromEntries } from '../checker/arithmetic/gaussian-matrix.js';
import { type Rational, rational, rationalFromDouble } from '../checker/arithmetic/rational.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { EXACT_BITS, EXACT_BLOCK } from './limits.js';

/** L(A) = i[H,A] + w Σ_m (V_m*AV_m − ½{V_m*V_m,A}) whose doubles are taken as exact numbers, w ∈ {1, 2}. */
export interface ExactGenerator {
  readonly jumps: readonly ComplexMatrix[];
  readonly hamiltonian: ComplexMatrix | null;
  readonly weight: 1 | 2;
}

/** 4sΓ and 16s²Γ₂ as tensors of Gaussian integers, s a power of two; entry (p·D+q)·D+r is the coefficient of e_r. */
export interface ExactCurvature {
  readonly algebra: BlockAlgebra;
  readonly units: MatrixUnits;
  readonly gamma: IntegerTensor;
  readonly gamma2: IntegerTensor;
  /** 4s. */
  readonly scale: bigint;
}

/** Gaussian integers; null stands for zero. */
type IntegerTensor = readonly (GaussianInteger | null)[];

interface GaussianInteger {
  readonly re: bigint;
  readonly im: bigint;
}

/** Both forms without rounding; null when the doubles are too far apart in size. */
export function exactCurvature(algebra: BlockAlgebra, generator: ExactGenerator): ExactCurvature | null {
  const units = matrixUnits(algebra);
  const bits = commonBits([...generator.jumps, ...(generator.hamiltonian ? [generator.hamiltonian] : [])]);
  if (bits === null) return null;
  const l = onUnits(units, generator, bits);
  const gamma = gammaOf(units, l);
  return { algebra, units, gamma, gamma2: gamma2Of(units.count, l, gamma), scale: 4n << BigInt(2 * bits) };
}

/** True when Γ₂ − KΓ is positive semidefinite in every block, decided exactly; null when a connected part is too large. */
export function isBoundExact({ algebra, units, gamma, gamma2, scale }: ExactCurvature, bound: number): boolean | null {
  const k = rationalFromDouble(bound);
  const { count: d, size: n } = units;
  for (const [block, size] of algebra.blocks.entries()) {
    const start = algebra.offsets[block];
    const form = gaussianFromEntries(d * size, d * size, (i, j) => {
      const [p, q] = [Math.floor(i / size), Math.floor(j / size)];
      const r = units.index[(start + (i % size)) * n + start + (j % size)];
      const at = (p * d + q) * d + r;
      return difference(gamma2[at], gamma[at], k, scale);
    });
    if (largestPart(form) > EXACT_BLOCK) return null;
    if (!decideSemidefinite(form).semidefinite) return false;
  }
  return true;
}

function difference(x: GaussianInteger | null, y: GaussianInteger | null, k: Rational, scale: bigint) {
  const part = (f: (z: GaussianInteger) => bigint): Rational =>
    rational((x ? f(x) : 0n) * k.denominator - k.numerator * scale * (y ? f(y) : 0n));
  return { re: part((z) => z.re), im: part((z) => z.im) };
}

/** The least b with all entries integers over 2^b, b ≥ 0; null when the integers would be too long. */
function commonBits(matrices: readonly ComplexMatrix[]): number | null {
  let lowest = 0;
  let highest = 0;
  for (const { re, im } of matrices) {
    for (const part of [re, im]) {
      for (const x of part) {
        if (x === 0) continue;
        const { exponent } = binaryParts(x);
        lowest = Math.min(lowest, exponent - 52);
        highest = Math.max(highest, exponent);
      }
    }
  }
  return highest - lowest <= EXACT_BITS ? -lowest : null;
}

function integerOf(re: number, im: number, bits: number): GaussianInteger | null {
  if (re === 0 && im === 0) return null;
  const shifted = (x: number): bigint => {
    const { numerator, denominator } = rationalFromDouble(x);
    return (numerator << BigInt(bits)) / denominator;
  };
  return { re: shifted(re), im: shifted(im) };
}

/** 2sL on matrix units, s = 4^bits: entry p·D+q is the coefficient of e_p in the image of e_q. */
function onUnits({ count: d, size: n, row, col }: MatrixUnits, generator: ExactGenerator, bits: number) {
  const weight = BigInt(generator.weight);
  const jumps = generator.jumps.map((v) => Array.from(v.re, (re, k) => integerOf(re, v.im[k], bits)));
  const drift = new Array<GaussianInteger | null>(n * n).fill(null);
  for (const v of jumps) {
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        for (let k = 0; k < n; k++) {
          drift[i * n + j] = plus(drift[i * n + j], times(conjugate(v[k * n + i]), v[k * n + j]), -weight);
        }
      }
    }
  }
  if (generator.hamiltonian) {
    const { re, im } = generator.hamiltonian;
    // −2iH, with one factor 2^bits more than a jump has.
    for (let k = 0; k < n * n; k++) drift[k] = plus(drift[k], integerOf(im[k], -re[k], bits), 2n << BigInt(bits));
  }
  const out = new Array<GaussianInteger | null>(d * d).fill(null);
  for (let p = 0; p < d; p++) {
    const [k, l] = [row[p], col[p]];
    for (let q = 0; q < d; q++) {
      const [a, b] = [row[q], col[q]];
      let sum: GaussianInteger | null = null;
      for (const v of jumps) sum = plus(sum, times(conjugate(v[a * n + k]), v[b * n + l]), 2n * weight);
      if (a === k) sum = plus(sum, drift[b * n + l], 1n);
      if (b === l) sum = plus(sum, conjugate(drift[a * n + k]), 1n);
      out[p * d + q] = sum;
    }
  }
  return out;
}

/** L(e_p*e_q) − L(e_p)*e_q − e_p*L(e_q), in the units of L. */
function gammaOf({ count: d, size: n, row, col, index }: MatrixUnits, l: IntegerTensor): IntegerTensor {
  const out = new Array<GaussianInteger | null>(d * d * d).fill(null);
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      const at = (p * d + q) * d;
      const [a, b, c, e] = [row[p], col[p], row[q], col[q]];
      if (a === c) for (let r = 0; r < d; r++) out[at + r] = l[r * d + index[b * n + e]];
      for (let k = 0; k < n; k++) {
        const [ck, ke, ak, bk] = [index[c * n + k], index[k * n + e], index[a * n + k], index[b * n + k]];
        if (ck >= 0 && ke >= 0) out[at + ke] = plus(out[at + ke], conjugate(l[ck * d + p]), -1n);
        if (ak >= 0 && bk >= 0) out[at + bk] = plus(out[at + bk], l[ak * d + q], -1n);
      }
    }
  }
  return out;
}

/** LΓ(e_p,e_q) − Γ(e_p,Le_q) − Γ(Le_p,e_q), in the units of L and Γ. */
function gamma2Of(d: number, l: IntegerTensor, gamma: IntegerTensor): IntegerTensor {
  const out = new Array<GaussianInteger | null>(d * d * d).fill(null);
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      const at = (p * d + q) * d;
      for (let s = 0; s < d; s++) {
        const [of, onRight, onLeft] = [gamma[at + s], l[s * d + q], conjugate(l[s * d + p])];
        for (let r = 0; r < d; r++) {
          let sum = plus(out[at + r], times(of, l[r * d + s]), 1n);
          sum = plus(sum, times(onRight, gamma[(p * d + s) * d + r]), -1n);
          out[at + r] = plus(sum, times(onLeft, gamma[(s * d + q) * d + r]), -1n);
        }
      }
    }
  }
  return out;
}

/** x + factor·y. */
function plus(x: GaussianInteger | null, y: GaussianInteger | null, factor: bigint): GaussianInteger | null {
  if (!y) return x;
  const re = (x?.re ?? 0n) + factor * y.re;
  const im = (x?.im ?? 0n) + factor * y.im;
  return re === 0n && im === 0n ? null : { re, im };
}

function times(x: GaussianInteger | null, y: GaussianInteger | null): GaussianInteger | null {
  if (!x || !y) return null;
  if (x.im === 0n && y.im === 0n) return { re: x.re * y.re, im: 0n };
  return { re: x.re * y.re - x.im * y.im, im: x.re * y.im + x.im * y.re };
}

function conjugate(x: GaussianInteger | null): GaussianInteger | null {
  return x && (x.im === 0n ? x : { re: x.re, im: -x.im });
}

/** Size of the largest connected part of a matrix, rows joined by non-zero entries. */
function largestPart({ entries, rows: n }: GaussianMatrix): number {
  const seen = new Uint8Array(n);
  let largest = 0;
  for (let start = 0; start < n; start++) {
    if (seen[start]) continue;
    seen[start] = 1;
    const part = [start];
    for (const i of part) {
      for (let j = 0; j < n; j++) {
        const { re, im } = entries[i * n + j];
        if (seen[j] || (re.numerator === 0n && im.numerator === 0n)) continue;
        seen[j] = 1;
        part.push(j);
      }
    }
    largest = Math.max(largest, part.length);
  }
  return largest;
}
