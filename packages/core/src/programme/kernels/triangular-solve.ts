/** x ← L⁻¹ x, L lower triangular in the storage of `choleskyFactor`, x with n real parts, followed by n imaginary ones. */
export function solveLower(l: Float64Array, n: number, complex: boolean, x: Float64Array): void {
  const d = n * n;
  for (let i = 0; i < n; i++) {
    const row = i * n;
    let u = x[i];
    if (complex) {
      let v = x[n + i];
      for (let k = 0; k < i; k++) {
        u -= l[row + k] * x[k] - l[d + row + k] * x[n + k];
        v -= l[row + k] * x[n + k] + l[d + row + k] * x[k];
      }
      x[n + i] = v / l[row + i];
    } else {
      for (let k = 0; k < i; k++) u -= l[row + k] * x[k];
    }
    x[i] = u / l[row + i];
  }
}

/** x ← L⁻* x. */
export function solveLowerAdjoint(l: Float64Array, n: number, complex: boolean, x: Float64Array): void {
  const d = n * n;
  for (let i = n - 1; i >= 0; i--) {
    const row = i * n;
    const u = (x[i] /= l[row + i]);
    if (complex) {
      const v = (x[n + i] /= l[row + i]);
      for (let k = 0; k < i; k++) {
        x[k] -= l[row + k] * u + l[d + row + k] * v;
        x[n + k] -= l[row + k] * v - l[d + row + k] * u;
      }
    } else {
      for (let k = 0; k < i; k++) x[k] -= l[row + k] * u;
    }
  }
}
