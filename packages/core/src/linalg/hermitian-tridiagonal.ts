/**
 * Householder reduction of a Hermitian matrix to real symmetric tridiagonal form, in place, from the last row up (after
 * Mueller, Numer. Math. 8 (1966)). Only the lower triangle of (re, im) is read, and the diagonal of im is taken as zero.
 *
 * On return d, e hold the tridiagonal T. Row i of (re, im) holds u_i* in entries 0…i−1 and h[i] = |u_i|²/2 or 0, and
 * A = Q Θ T Θ* Q* with Q = H_{n−1} ⋯ H_2, H_i = 1 − u_i u_i* / h[i], Θ the diagonal of phases (phaseRe, phaseIm).
 */
export function reduceHermitian(
  re: Float64Array,
  im: Float64Array,
  n: number,
  d: Float64Array,
  e: Float64Array,
  h: Float64Array,
  phaseRe: Float64Array,
  phaseIm: Float64Array,
): void {
  for (let i = n - 1; i > 0; i--) {
    // Below, phase[i] is first the off-diagonal element T_{i−1,i} and then turned into the phase that makes it real.
    h[i] = formReflector(re, im, i * n, i, phaseRe, phaseIm);
    if (h[i] > 0) updateLeadingBlock(re, im, n, i, h[i], d, e);
    d[i] = re[i * n + i];
  }
  if (n === 0) return;
  d[0] = re[0];
  h[0] = 0;
  phaseRe[0] = 1;
  phaseIm[0] = 0;
  for (let i = 1; i < n; i++) makeReal(i, e, phaseRe, phaseIm);
}

/** e[i−1] = |T_{i−1,i}| and θ_i = θ_{i−1} conj(T_{i−1,i}) / |T_{i−1,i}|, so that conj(θ_{i−1}) T_{i−1,i} θ_i is positive. */
function makeReal(i: number, e: Float64Array, phaseRe: Float64Array, phaseIm: Float64Array): void {
  let x = phaseRe[i];
  let y = -phaseIm[i];
  const size = Math.hypot(x, y);
  e[i - 1] = size;
  if (size > 0) {
    x /= size;
    y /= size;
  } else {
    x = 1;
    y = 0;
  }
  // Renormalised, so that the moduli do not drift away from 1 along a long chain.
  const re = phaseRe[i - 1] * x - phaseIm[i - 1] * y;
  const im = phaseRe[i - 1] * y + phaseIm[i - 1] * x;
  const modulus = Math.hypot(re, im);
  phaseRe[i] = re / modulus;
  phaseIm[i] = im / modulus;
}

/**
 * The column c = conj(row entries 0…i−1) is to become T_{i−1,i} e_{i−1}, T_{i−1,i} = −(c_{i−1}/|c_{i−1}|) |c|. Stores that
 * element in phase[i] and u* in the row; returns |u|²/2, or 0 when the row is already in form.
 */
function formReflector(
  re: Float64Array,
  im: Float64Array,
  row: number,
  i: number,
  phaseRe: Float64Array,
  phaseIm: Float64Array,
): number {
  const last = row + i - 1;
  let top = 0;
  for (let k = row; k < last; k++) top = Math.max(top, Math.abs(re[k]), Math.abs(im[k]));
  if (top === 0) {
    phaseRe[i] = re[last];
    phaseIm[i] = -im[last];
    return 0;
  }
  const unit = top > 1e-140 ? 1 : Math.max(top, Math.abs(re[last]), Math.abs(im[last]));
  let sum = 0;
  for (let k = row; k <= last; k++) {
    re[k] /= unit;
    im[k] /= unit;
    sum += re[k] * re[k] + im[k] * im[k];
  }
  const size = Math.sqrt(sum);
  const pivot = Math.hypot(re[last], im[last]);
  const cos = pivot > 0 ? re[last] / pivot : 1;
  const sin = pivot > 0 ? im[last] / pivot : 0;
  phaseRe[i] = -cos * size * unit;
  phaseIm[i] = sin * size * unit;
  re[last] += cos * size;
  im[last] += sin * size;
  return sum + size * pivot;
}

/** A ← H A H on the leading i × i block: A −= u q* + q u*, q = p − (u*p / 2h) u, p = A u / h; q in (qr, qi). */
function updateLeadingBlock(
  re: Float64Array,
  im: Float64Array,
  n: number,
  i: number,
  h: number,
  qr: Float64Array,
  qi: Float64Array,
): void {
  const row = i * n;
  for (let j = 0; j < i; j++) {
    // u_j is the conjugate of the stored entry.
    const ur = re[row + j];
    const ui = -im[row + j];
    const start = j * n;
    let sumRe = re[start + j] * ur;
    let sumIm = re[start + j] * ui;
    for (let k = 0; k < j; k++) {
      const x = re[start + k];
      const y = im[start + k];
      const vr = re[row + k];
      const vi = -im[row + k];
      sumRe += x * vr - y * vi;
      sumIm += x * vi + y * vr;
      qr[k] += x * ur + y * ui;
      qi[k] += x * ui - y * ur;
    }
    qr[j] = sumRe;
    qi[j] = sumIm;
  }
  // u* A u is real.
  let projection = 0;
  for (let j = 0; j < i; j++) {
    qr[j] /= h;
    qi[j] /= h;
    projection += qr[j] * re[row + j] - qi[j] * im[row + j];
  }
  const shift = projection / (2 * h);
  for (let j = 0; j < i; j++) {
    qr[j] -= shift * re[row + j];
    qi[j] += shift * im[row + j];
  }
  for (let j = 0; j < i; j++) {
    const ur = re[row + j];
    const ui = -im[row + j];
    const pr = qr[j];
    const pi = qi[j];
    const start = j * n;
    for (let k = 0; k <= j; k++) {
      const vr = re[row + k];
      const vi = im[row + k];
      // u_j conj(q_k) + q_j conj(u_k), where conj(u_k) = v.
      re[start + k] -= ur * qr[k] + ui * qi[k] + (pr * vr - pi * vi);
      im[start + k] -= ui * qr[k] - ur * qi[k] + (pr * vi + pi * vr);
    }
    im[start + j] = 0;
  }
}

/** Writes Q Θ of `reduceHermitian` into (zr, zi), row k at row rowOf[k]; `gr`, `gi` are scratch of length n. */
export function accumulateHermitian(
  re: Float64Array,
  im: Float64Array,
  n: number,
  h: Float64Array,
  phaseRe: Float64Array,
  phaseIm: Float64Array,
  zr: Float64Array,
  zi: Float64Array,
  rowOf: Int32Array,
  gr: Float64Array,
  gi: Float64Array,
): void {
  zr.fill(0, 0, n * n);
  zi.fill(0, 0, n * n);
  for (let k = 0; k < n; k++) {
    zr[rowOf[k] * n + k] = phaseRe[k];
    zi[rowOf[k] * n + k] = phaseIm[k];
  }
  for (let i = 2; i < n; i++) {
    if (h[i] === 0) continue;
    const row = i * n;
    gr.fill(0, 0, i);
    gi.fill(0, 0, i);
    // g = u* Z, then Z −= (u / h) g.
    for (let k = 0; k < i; k++) {
      const vr = re[row + k];
      const vi = im[row + k];
      for (let j = 0, p = rowOf[k] * n; j < i; j++, p++) {
        gr[j] += vr * zr[p] - vi * zi[p];
        gi[j] += vr * zi[p] + vi * zr[p];
      }
    }
    for (let k = 0; k < i; k++) {
      const ur = re[row + k] / h[i];
      const ui = -im[row + k] / h[i];
      for (let j = 0, p = rowOf[k] * n; j < i; j++, p++) {
        zr[p] -= ur * gr[j] - ui * gi[j];
        zi[p] -= ur * gi[j] + ui * gr[j];
      }
    }
  }
}
