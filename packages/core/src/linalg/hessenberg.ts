/** Scaling by powers of two so that rows and columns of index i have comparable norms (Parlett & Reinsch 1969), in place. */
export function balance(a: Float64Array, n: number): void {
  for (let converged = false; !converged;) {
    converged = true;
    for (let i = 0; i < n; i++) {
      let row = 0;
      let col = 0;
      for (let j = 0; j < n; j++) {
        if (j === i) continue;
        row += Math.abs(a[i * n + j]);
        col += Math.abs(a[j * n + i]);
      }
      if (!(row > 0) || !(col > 0)) continue;
      const power = Math.round(Math.log2(row / col) / 2);
      const f = 2 ** power;
      if (col * f + row / f >= 0.95 * (row + col)) continue;
      converged = false;
      for (let j = 0; j < n; j++) a[i * n + j] /= f;
      for (let j = 0; j < n; j++) a[j * n + i] *= f;
    }
  }
}

/** Similarity to upper Hessenberg form by Householder reflections, in place; entries below the subdiagonal become zero. */
export function reduceHessenberg(a: Float64Array, n: number): void {
  const u = new Float64Array(n);
  const w = new Float64Array(n);
  for (let k = 0; k < n - 2; k++) {
    let top = 0;
    for (let i = k + 2; i < n; i++) top = Math.max(top, Math.abs(a[i * n + k]));
    if (top === 0) continue;
    const lead = a[(k + 1) * n + k];
    const unit = Math.max(top, Math.abs(lead));
    let sum = 0;
    for (let i = k + 1; i < n; i++) {
      u[i] = a[i * n + k] / unit;
      sum += u[i] * u[i];
    }
    const g = u[k + 1] >= 0 ? -Math.sqrt(sum) : Math.sqrt(sum);
    const h = sum - u[k + 1] * g;
    u[k + 1] -= g;
    reflectRows(a, n, k, u, h, w);
    reflectColumns(a, n, k, u, h);
    a[(k + 1) * n + k] = g * unit;
    for (let i = k + 2; i < n; i++) a[i * n + k] = 0;
  }
}

/** A ← (1 − u uᵀ/h) A on columns k … n − 1; u lives on k + 1 … n − 1. */
function reflectRows(a: Float64Array, n: number, k: number, u: Float64Array, h: number, w: Float64Array): void {
  w.fill(0);
  for (let i = k + 1; i < n; i++) {
    for (let j = k, p = i * n + k; j < n; j++, p++) w[j] += u[i] * a[p];
  }
  for (let i = k + 1; i < n; i++) {
    const x = u[i] / h;
    for (let j = k, p = i * n + k; j < n; j++, p++) a[p] -= x * w[j];
  }
}

/** A ← A (1 − u uᵀ/h). */
function reflectColumns(a: Float64Array, n: number, k: number, u: Float64Array, h: number): void {
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = k + 1; j < n; j++) sum += a[i * n + j] * u[j];
    sum /= h;
    for (let j = k + 1; j < n; j++) a[i * n + j] -= sum * u[j];
  }
}
