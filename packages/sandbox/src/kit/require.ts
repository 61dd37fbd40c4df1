/** Throws unless x is a whole number from `least` to `most`. */
export function requireWhole(x: number, least: number, most: number, what: string): void {
  if (Number.isInteger(x) && x >= least && x <= most) return;
  throw new RangeError(`expected ${what} to be a whole number from ${least} to ${most}, got ${String(x)}`);
}

/** Throws unless x is a finite number. */
export function requireFinite(x: unknown, what: string): asserts x is number {
  if (typeof x === 'number' && Number.isFinite(x)) return;
  throw new RangeError(`expected ${what} to be a finite number, got ${String(x)}`);
}

/** Throws unless the value is an array. */
export function requireList(value: unknown, what: string): asserts value is readonly unknown[] {
  if (Array.isArray(value)) return;
  throw new TypeError(`expected ${what} to be a list, got ${value === null ? 'null' : typeof value}`);
}
