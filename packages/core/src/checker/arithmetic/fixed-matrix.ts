import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import { binaryParts, powerOfTwo } from './binary-parts.js';
import { FIXED_BITS } from './limits.js';
import type { Interval } from './interval.js';
import { mulDown } from './rounding.js';

/**
 * A complex matrix in fixed point: entries (re + i im)·2^-FIXED_BITS, row-major. One unit is 2^-FIXED_BITS. `exact` says
 * that no bit has been dropped on the way, from doubles through products; otherwise the operation says what may be missing.
 */
export interface FixedMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly re: readonly bigint[];
  readonly im: readonly bigint[];
  readonly exact: boolean;
}

const SHIFT = BigInt(FIXED_BITS);

/** One, in units. */
export const FIXED_ONE = 1n << SHIFT;

/** The entries x_ij·2^-exponent for chosen rows and columns, each part less than one unit too low. */
export function fixedSubmatrix(
  x: ComplexMatrix,
  rows: readonly number[],
  cols: readonly number[],
  exponent = 0,
): FixedMatrix {
  const flag = { exact: true };
  const part = (values: Float64Array) =>
    rows.flatMap((i) => cols.map((j) => fixedFromDouble(values[i * x.cols + j], exponent, flag)));
  const re = part(x.re);
  const im = part(x.im);
  return { rows: rows.length, cols: cols.length, re, im, exact: flag.exact };
}

/** AB, each part less than one unit too low. */
export function fixedProduct(a: FixedMatrix, b: FixedMatrix): FixedMatrix {
  const re = new Array<bigint>(a.rows * b.cols).fill(0n);
  const im = new Array<bigint>(a.rows * b.cols).fill(0n);
  for (let i = 0; i < a.rows; i++) {
    for (let k = 0; k < a.cols; k++) {
      const x = a.re[i * a.cols + k];
      const y = a.im[i * a.cols + k];
      if (x === 0n && y === 0n) continue;
      for (let j = 0; j < b.cols; j++) {
        const u = b.re[k * b.cols + j];
        const v = b.im[k * b.cols + j];
        re[i * b.cols + j] += x * u - y * v;
        im[i * b.cols + j] += x * v + y * u;
      }
    }
  }
  const flag = { exact: a.exact && b.exact };
  const shorten = (x: bigint) => shiftDown(x, SHIFT, flag);
  return { rows: a.rows, cols: b.cols, re: re.map(shorten), im: im.map(shorten), exact: flag.exact };
}

export function fixedAdjoint(a: FixedMatrix): FixedMatrix {
  const re: bigint[] = [];
  const im: bigint[] = [];
  for (let j = 0; j < a.cols; j++) {
    for (let i = 0; i < a.rows; i++) {
      re.push(a.re[i * a.cols + j]);
      im.push(-a.im[i * a.cols + j]);
    }
  }
  return { rows: a.cols, cols: a.rows, re, im, exact: a.exact };
}

/** The doubles around (units ± radius)·2^(exponent−FIXED_BITS). */
export function fixedInterval(units: bigint, radius: bigint, exponent: number): Interval {
  const scale = exponent - FIXED_BITS;
  return { lo: doubleBelow(units - radius, scale), hi: 0 - doubleBelow(-units - radius, scale) };
}

/** ⌊x·2^(FIXED_BITS−exponent)⌋ for a finite double. */
function fixedFromDouble(x: number, exponent: number, flag: { exact: boolean }): bigint {
  if (x === 0) return 0n;
  const parts = binaryParts(x);
  const integer = BigInt(parts.mantissa * 4503599627370496);
  const shift = parts.exponent - 52 - exponent + FIXED_BITS;
  return shift >= 0 ? integer << BigInt(shift) : shiftDown(integer, BigInt(-shift), flag);
}

/** ⌊x/2^shift⌋, noting when it is not exact. */
function shiftDown(x: bigint, shift: bigint, flag: { exact: boolean }): bigint {
  const y = x >> shift;
  if (y << shift !== x) flag.exact = false;
  return y;
}

/** A double at most n·2^scale, the nearest such one in the range of normal numbers. */
function doubleBelow(n: bigint, scale: number): number {
  if (n === 0n) return 0;
  const excess = Math.max(0, (n < 0n ? -n : n).toString(2).length - 53);
  let x = Number(n >> BigInt(excess));
  let rest = scale + excess;
  // Steps of at most 2^±1000; each is exact or rounded down.
  while (rest !== 0) {
    const step = Math.max(-1000, Math.min(1000, rest));
    x = mulDown(x, powerOfTwo(step));
    rest -= step;
  }
  return x;
}
