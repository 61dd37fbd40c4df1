import { JACOBI_SWEEP_LIMIT } from './limits.js';

/**
 * Approximate eigenvalues (ascending) and eigenvectors (column k, row-major) of a real symmetric n×n matrix by cyclic Jacobi
 * rotations. Nothing is promised: whoever uses them proves what is needed.
 */
export function jacobiEigen(matrix: Float64Array, n: number): { values: Float64Array; vectors: Float64Array } {
  const a = matrix.slice();
  const negligible = NEGLIGIBLE * a.reduce((top, x) => Math.max(top, Math.abs(x)), 0);
  // Rows of v are the eigenvectors while rotating.
  const v = new Float64Array(n * n);
  for (let i = 0; i < n; i++) v[i * n + i] = 1;
  for (let sweep = 0; sweep < JACOBI_SWEEP_LIMIT; sweep++) {
    let rotations = 0;
    for (let p = 0; p < n; p++) {
      for (let q = p + 1; q < n; q++) {
        if (!(Math.abs(a[p * n + q]) > negligible)) continue;
        rotate(a, v, n, p, q);
        rotations++;
      }
    }
    if (rotations === 0) break;
  }
  return sorted(a, v, n);
}

/** Off-diagonal entries below this, relative to the largest entry, are left: the proof costs as much in rounding. */
const NEGLIGIBLE = Number.EPSILON / 4;

/** Annihilate a_pq by a plane rotation of rows and columns p, q. */
function rotate(a: Float64Array, v: Float64Array, n: number, p: number, q: number): void {
  const theta = (a[q * n + q] - a[p * n + p]) / (2 * a[p * n + q]);
  const t = Number.isFinite(theta * theta)
    ? (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1))
    : 0.5 / theta;
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (let k = 0; k < n; k++) {
    const x = a[p * n + k];
    const y = a[q * n + k];
    a[p * n + k] = c * x - s * y;
    a[q * n + k] = s * x + c * y;
    const f = v[p * n + k];
    const g = v[q * n + k];
    v[p * n + k] = c * f - s * g;
    v[q * n + k] = s * f + c * g;
  }
  for (let k = 0; k < n; k++) {
    const x = a[k * n + p];
    const y = a[k * n + q];
    a[k * n + p] = c * x - s * y;
    a[k * n + q] = s * x + c * y;
  }
  a[p * n + q] = 0;
  a[q * n + p] = 0;
}

function sorted(a: Float64Array, v: Float64Array, n: number): { values: Float64Array; vectors: Float64Array } {
  const order = Array.from({ length: n }, (_, i) => i).sort((i, j) => a[i * n + i] - a[j * n + j]);
  const vectors = new Float64Array(n * n);
  order.forEach((row, k) => {
    for (let i = 0; i < n; i++) vectors[i * n + k] = v[row * n + i];
  });
  return { values: Float64Array.from(order, (i) => a[i * n + i]), vectors };
}
