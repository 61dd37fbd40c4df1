/**
 * The sixteen dot products of four rows of `a` with four rows of `b`: out[4r + s] = Σ_k a[a_r + k] b[b_s + k], 0 ≤ k < inner.
 *
 * Everything cubic in this folder is built on it: eight loads feed sixteen products, all sums stay in registers and both
 * operands are read in storage order. Rows that a ragged edge lacks are passed as repetitions of an existing one.
 */
// eslint-disable-next-line max-lines-per-function -- a numeric kernel: sixteen sums by name, so that they stay in registers
export function dotTile(
  a: Float64Array,
  a0: number,
  a1: number,
  a2: number,
  a3: number,
  b: Float64Array,
  b0: number,
  b1: number,
  b2: number,
  b3: number,
  inner: number,
  out: Float64Array,
): void {
  let s00 = 0;
  let s01 = 0;
  let s02 = 0;
  let s03 = 0;
  let s10 = 0;
  let s11 = 0;
  let s12 = 0;
  let s13 = 0;
  let s20 = 0;
  let s21 = 0;
  let s22 = 0;
  let s23 = 0;
  let s30 = 0;
  let s31 = 0;
  let s32 = 0;
  let s33 = 0;
  for (let k = 0; k < inner; k++) {
    const y0 = b[b0 + k];
    const y1 = b[b1 + k];
    const y2 = b[b2 + k];
    const y3 = b[b3 + k];
    let x = a[a0 + k];
    s00 += x * y0;
    s01 += x * y1;
    s02 += x * y2;
    s03 += x * y3;
    x = a[a1 + k];
    s10 += x * y0;
    s11 += x * y1;
    s12 += x * y2;
    s13 += x * y3;
    x = a[a2 + k];
    s20 += x * y0;
    s21 += x * y1;
    s22 += x * y2;
    s23 += x * y3;
    x = a[a3 + k];
    s30 += x * y0;
    s31 += x * y1;
    s32 += x * y2;
    s33 += x * y3;
  }
  out[0] = s00;
  out[1] = s01;
  out[2] = s02;
  out[3] = s03;
  out[4] = s10;
  out[5] = s11;
  out[6] = s12;
  out[7] = s13;
  out[8] = s20;
  out[9] = s21;
  out[10] = s22;
  out[11] = s23;
  out[12] = s30;
  out[13] = s31;
  out[14] = s32;
  out[15] = s33;
}
