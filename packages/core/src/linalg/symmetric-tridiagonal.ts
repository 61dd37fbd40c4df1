/**
 * Householder reduction of the leading n × n real symmetric matrix to tridiagonal form, in place, from the last row up
 * (Wilkinson & Reinsch, Handbook for Automatic Computation II (1971), II/2). Only the lower triangle of `a` is read.
 *
 * On return T has diagonal d[0…n−1] and off-diagonal e[0…n−2] (e[i] couples i and i + 1). Row i of `a` holds the
 * reflector u_i in entries 0…i−1 and h[i] = |u_i|²/2, or h[i] = 0 when no reflection was needed; A = Q T Qᵀ with
 * Q = H_{n−1} ⋯ H_2, H_i = 1 − u_i u_iᵀ / h[i].
 */
export function reduceSymmetric(a: Float64Array, n: number, d: Float64Array, e: Float64Array, h: Float64Array): void {
  for (let i = n - 1; i > 0; i--) {
    const row = i * n;
    h[i] = formReflector(a, row, i, e);
    if (h[i] > 0) updateLeadingBlock(a, n, row, i, h[i], d);
    d[i] = a[row + i];
  }
  if (n > 0) {
    d[0] = a[0];
    h[0] = 0;
  }
}

/** Turns entries 0…i−1 of the row into a reflector and stores the new off-diagonal element; returns |u|²/2 or 0. */
function formReflector(a: Float64Array, row: number, i: number, e: Float64Array): number {
  const last = row + i - 1;
  const f = a[last];
  let top = 0;
  for (let k = row; k < last; k++) {
    const x = Math.abs(a[k]);
    if (x > top) top = x;
  }
  if (top === 0) {
    // Already tridiagonal in this row.
    e[i - 1] = f;
    return 0;
  }
  // A reflector may be scaled freely: do so when its squares would leave the range of doubles.
  const unit = top > 1e-140 ? 1 : Math.max(top, Math.abs(f));
  if (unit !== 1) for (let k = row; k <= last; k++) a[k] /= unit;
  let sum = 0;
  for (let k = row; k <= last; k++) sum += a[k] * a[k];
  const pivot = a[last];
  const g = pivot >= 0 ? -Math.sqrt(sum) : Math.sqrt(sum);
  e[i - 1] = g * unit;
  a[last] = pivot - g;
  return sum - pivot * g;
}

/** A ← H A H on the leading i × i block: A −= u qᵀ + q uᵀ with q = p − (uᵀp / 2h) u, p = A u / h. */
function updateLeadingBlock(a: Float64Array, n: number, row: number, i: number, h: number, q: Float64Array): void {
  // Two rows a time, to halve the traffic on q and u.
  let j = 0;
  for (; j + 1 < i; j += 2) {
    const u0 = a[row + j];
    const u1 = a[row + j + 1];
    const r0 = j * n;
    const r1 = r0 + n;
    let sum0 = a[r0 + j] * u0 + a[r1 + j] * u1;
    let sum1 = a[r1 + j] * u0 + a[r1 + j + 1] * u1;
    for (let k = 0; k < j; k++) {
      const x0 = a[r0 + k];
      const x1 = a[r1 + k];
      const u = a[row + k];
      sum0 += x0 * u;
      sum1 += x1 * u;
      q[k] += x0 * u0 + x1 * u1;
    }
    q[j] = sum0;
    q[j + 1] = sum1;
  }
  if (j < i) {
    const u0 = a[row + j];
    const r0 = j * n;
    let sum = a[r0 + j] * u0;
    for (let k = 0; k < j; k++) {
      sum += a[r0 + k] * a[row + k];
      q[k] += a[r0 + k] * u0;
    }
    q[j] = sum;
  }
  let projection = 0;
  for (let j = 0; j < i; j++) {
    q[j] /= h;
    projection += q[j] * a[row + j];
  }
  const shift = projection / (2 * h);
  for (let j = 0; j < i; j++) q[j] -= shift * a[row + j];
  for (j = 0; j < i; j += 2) {
    // The last pair may reach into row i itself, whose reflector must stay: then do one row.
    const pair = j + 1 < i;
    const r0 = j * n;
    const r1 = pair ? r0 + n : r0;
    const u0 = a[row + j];
    const q0 = q[j];
    if (!pair) {
      for (let k = 0; k <= j; k++) a[r0 + k] -= u0 * q[k] + q0 * a[row + k];
      break;
    }
    const u1 = a[row + j + 1];
    const q1 = q[j + 1];
    for (let k = 0; k <= j; k++) {
      const u = a[row + k];
      const w = q[k];
      a[r0 + k] -= u0 * w + q0 * u;
      a[r1 + k] -= u1 * w + q1 * u;
    }
    a[r1 + j + 1] -= 2 * u1 * q1;
  }
}

/**
 * Writes Q of `reduceSymmetric` into z, row k of Q at row rowOf[k] of z: this undoes a permutation made beforehand. `g` is
 * scratch of length n.
 */
export function accumulateReflectors(
  a: Float64Array,
  n: number,
  h: Float64Array,
  z: Float64Array,
  rowOf: Int32Array,
  g: Float64Array,
): void {
  z.fill(0, 0, n * n);
  for (let k = 0; k < n; k++) z[rowOf[k] * n + k] = 1;
  for (let i = 2; i < n; i++) {
    if (h[i] === 0) continue;
    const row = i * n;
    g.fill(0, 0, i);
    // g = Zᵀ u and Z −= (u / h) gᵀ, two rows a time.
    let k = 0;
    for (; k + 1 < i; k += 2) {
      const u0 = a[row + k];
      const u1 = a[row + k + 1];
      const p0 = rowOf[k] * n;
      const p1 = rowOf[k + 1] * n;
      for (let j = 0; j < i; j++) g[j] += u0 * z[p0 + j] + u1 * z[p1 + j];
    }
    if (k < i) {
      const u0 = a[row + k];
      const p0 = rowOf[k] * n;
      for (let j = 0; j < i; j++) g[j] += u0 * z[p0 + j];
    }
    const inverse = 1 / h[i];
    for (k = 0; k + 1 < i; k += 2) {
      const u0 = a[row + k] * inverse;
      const u1 = a[row + k + 1] * inverse;
      const p0 = rowOf[k] * n;
      const p1 = rowOf[k + 1] * n;
      for (let j = 0; j < i; j++) {
        const x = g[j];
        z[p0 + j] -= u0 * x;
        z[p1 + j] -= u1 * x;
      }
    }
    if (k < i) {
      const u0 = a[row + k] * inverse;
      const p0 = rowOf[k] * n;
      for (let j = 0; j < i; j++) z[p0 + j] -= u0 * g[j];
    }
  }
}

/** x ← Q x for one vector, with Q of `reduceSymmetric`. */
export function applyReflectors(a: Float64Array, n: number, h: Float64Array, x: Float64Array): void {
  for (let i = 2; i < n; i++) {
    if (h[i] === 0) continue;
    const row = i * n;
    let sum = 0;
    for (let k = 0; k < i; k++) sum += a[row + k] * x[k];
    sum /= h[i];
    for (let k = 0; k < i; k++) x[k] -= sum * a[row + k];
  }
}
