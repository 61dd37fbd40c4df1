const view = new DataView(new ArrayBuffer(8));

/** The upper 32 bits of a double as a signed integer: sign, exponent and 20 bits of the significand. */
export function highWord(x: number): number {
  view.setFloat64(0, x);
  return view.getInt32(0);
}

/** The double with other upper bits. */
export function withHighWord(x: number, word: number): number {
  view.setFloat64(0, x);
  view.setInt32(0, word);
  return view.getFloat64(0);
}

/** The double with its lower 32 bits cleared. */
export function truncated(x: number): number {
  view.setFloat64(0, x);
  view.setInt32(4, 0);
  return view.getFloat64(0);
}

/** 2^k for −1022 ≤ k ≤ 1023. */
function powerOfTwo(k: number): number {
  view.setInt32(0, (k + 1023) << 20);
  view.setInt32(4, 0);
  return view.getFloat64(0);
}

/** y·2^k, rounded once at most: 0 and infinity beyond the range of doubles. */
export function scaled(y: number, k: number): number {
  if (k > 1023) return scaled(y * powerOfTwo(1023), Math.min(k - 1023, 2046));
  if (k < -1022) return scaled(y * powerOfTwo(-1022 + 53), Math.max(k + 1022 - 53, -2200));
  return y * powerOfTwo(k);
}
