import { ThalwegError } from '../errors.js';

interface Shape {
  readonly rows: number;
  readonly cols: number;
}

export function requireSameShape(a: Shape, b: Shape): void {
  if (a.rows === b.rows && a.cols === b.cols) return;
  throw new ThalwegError('dimension-mismatch', `expected a ${a.rows}×${a.cols} matrix, got ${b.rows}×${b.cols}`);
}

/** Throws unless a matrix with `cols` columns can be multiplied by one with `rows` rows. */
export function requireInner(cols: number, rows: number): void {
  if (cols === rows) return;
  throw new ThalwegError('dimension-mismatch', `expected a right factor with ${cols} rows, got ${rows}`);
}

export function requireSquare(a: Shape): void {
  if (a.rows === a.cols) return;
  throw new ThalwegError('dimension-mismatch', `expected a square matrix, got ${a.rows}×${a.cols}`);
}

/** Throws unless a flat array holds exactly `count` entries. */
export function requireLength(a: ArrayLike<number>, count: number): void {
  if (a.length === count) return;
  throw new ThalwegError('dimension-mismatch', `expected ${count} entries, got ${a.length}`);
}

/** Throws `not-finite` if any of the first `count` entries is NaN or infinite. */
export function requireFinite(a: Float64Array, count: number = a.length): void {
  // x − x is 0 exactly when x is finite, so one sum finds any bad entry.
  let sum = 0;
  for (let i = 0; i < count; i++) sum += a[i] - a[i];
  if (sum !== 0) {
    const index = a.findIndex((x) => !Number.isFinite(x));
    throw new ThalwegError('not-finite', `expected finite matrix entries, got ${a[index]} at flat index ${index}`);
  }
}
