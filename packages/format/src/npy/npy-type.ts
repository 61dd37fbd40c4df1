import { ThalwegError } from '@thalweg/core';
import { describeValue } from '../describe-value.js';

/** How the entries of a NumPy array are stored. */
export interface NpyType {
  /** Bytes of one entry, both parts of a complex number together. */
  readonly size: number;
  readonly complex: boolean;
  /** Reads the real number at a byte offset. */
  readonly read: (view: DataView, offset: number) => number;
}

/** The type a NumPy `descr` names; throws `not-supported` for objects, text, dates, extended precision and the rest. */
export function npyType(descr: string): NpyType {
  const [, order = '', kind = ''] = /^([<>|=]?)([a-zA-Z?]\d*)$/.exec(descr) ?? [];
  const little = order === '<' || order === '|';
  const reader = READERS[kind]?.(little);
  const size = Number(kind.slice(1));
  if (reader && order !== '=' && (order !== '|' || size === 1))
    return { size, complex: kind.startsWith('c'), read: reader };
  if (kind.startsWith('O')) {
    throw new ThalwegError(
      'not-supported',
      'expected an array of numbers, got Python objects, which are never unpickled; convert it with .astype(complex) and save it again',
    );
  }
  const message = `expected numbers of type bool, int, uint, float16/32/64 or complex64/128, got the NumPy type ${describeValue(descr)}; convert the array with .astype(complex) and save it again`;
  throw new ThalwegError('not-supported', message);
}

type Reader = (view: DataView, offset: number) => number;

const READERS: Record<string, ((little: boolean) => Reader) | undefined> = {
  b1: () => (view, at) => (view.getUint8(at) === 0 ? 0 : 1),
  i1: () => (view, at) => view.getInt8(at),
  u1: () => (view, at) => view.getUint8(at),
  i2: (little) => (view, at) => view.getInt16(at, little),
  u2: (little) => (view, at) => view.getUint16(at, little),
  i4: (little) => (view, at) => view.getInt32(at, little),
  u4: (little) => (view, at) => view.getUint32(at, little),
  i8: (little) => (view, at) => exactInteger(view.getBigInt64(at, little)),
  u8: (little) => (view, at) => exactInteger(view.getBigUint64(at, little)),
  f2: (little) => (view, at) => halfPrecision(view.getUint16(at, little)),
  f4: (little) => (view, at) => view.getFloat32(at, little),
  f8: (little) => (view, at) => view.getFloat64(at, little),
  c8: (little) => (view, at) => view.getFloat32(at, little),
  c16: (little) => (view, at) => view.getFloat64(at, little),
};

function exactInteger(value: bigint): number {
  const number = Number(value);
  if (BigInt(number) === value) return number;
  throw new ThalwegError(
    'not-supported',
    `expected whole numbers that a double holds exactly, got ${value}; convert the array with .astype(float) if rounding is meant`,
  );
}

/** IEEE 754 binary16: sign, five bits of exponent, ten of fraction. */
function halfPrecision(bits: number): number {
  const exponent = (bits >> 10) & 0x1f;
  const fraction = bits & 0x3ff;
  const sign = bits >> 15 === 0 ? 1 : -1;
  if (exponent === 0x1f) return fraction === 0 ? sign * Infinity : NaN;
  return exponent === 0 ? sign * fraction * 2 ** -24 : sign * (1024 + fraction) * 2 ** (exponent - 25);
}
