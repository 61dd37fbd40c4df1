const view = new DataView(new ArrayBuffer(8));

/** A finite x ≠ 0 as mantissa · 2^exponent with 1 ≤ |mantissa| < 2, exactly. */
export function binaryParts(x: number): { mantissa: number; exponent: number } {
  view.setFloat64(0, x);
  let high = view.getUint32(0);
  let shift = 1023;
  if ((high & 0x7ff00000) === 0) {
    // Subnormal: 2^54 brings it into the normal range, exactly.
    view.setFloat64(0, x * 18014398509481984);
    high = view.getUint32(0);
    shift += 54;
  }
  const exponent = ((high >>> 20) & 0x7ff) - shift;
  view.setUint32(0, (high & 0x800fffff) | 0x3ff00000);
  return { mantissa: view.getFloat64(0), exponent };
}

/** 2^k for −1022 ≤ k ≤ 1023, exactly. */
export function powerOfTwo(k: number): number {
  view.setUint32(0, (k + 1023) << 20);
  view.setUint32(4, 0);
  return view.getFloat64(0);
}
