import { endValue, type ConstantDocument } from '@thalweg/format';
import { minus } from './number-text.js';

/** Powers of ten in which a sheet is printed, so that slow and fast models keep their digits. */
export interface Units {
  readonly rate: number;
  readonly time: number;
  readonly length: number;
}

/** Between these the largest rate is printed as it is. */
const SLOWEST_PLAIN = 1e-2;
const FASTEST_PLAIN = 1e6;

/** Units for a sheet: 1 for ordinary ones, else an even power of ten (a length is the root of a time). */
export function unitsOf(constants: readonly ConstantDocument[]): Units {
  const size = rateScale(constants);
  const plain = size === 0 || (size >= SLOWEST_PLAIN && size < FASTEST_PLAIN);
  const half = plain ? 0 : Math.round(Math.log10(size) / 2);
  return { rate: powerOfTen(2 * half), time: powerOfTen(-2 * half), length: powerOfTen(-half) };
}

/** The unit of one constant. */
export function unitOf({ id }: Pick<ConstantDocument, 'id'>, units: Units): number {
  if (id === 'mixing') return units.time;
  return id === 'diameter' ? units.length : units.rate;
}

/** What a reader must know of them; null when all are 1. */
export function unitsText({ rate, time, length }: Units): string | null {
  if (rate === 1) return null;
  return `rates in units of ${power(rate)}, times of ${power(time)}, lengths of ${power(length)}`;
}

function rateScale(constants: readonly ConstantDocument[]): number {
  let size = 0;
  for (const { id, lower, upper } of constants) {
    for (const end of [lower, upper]) {
      const value = end === null ? 0 : Math.abs(endValue(id, end));
      if (!Number.isFinite(value) || value === 0) continue;
      const rate = id === 'mixing' ? 1 / value : id === 'diameter' ? 1 / (value * value) : value;
      size = Math.max(size, rate);
    }
  }
  return size;
}

/** Correctly rounded, unlike Math.pow. */
function powerOfTen(exponent: number): number {
  return Number(`1e${exponent}`);
}

function power(unit: number): string {
  return `10^${minus(String(Math.round(Math.log10(unit))))}`;
}
