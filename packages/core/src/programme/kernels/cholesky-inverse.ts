import { dotTile } from './dot-tile.js';
import { multiplyAdjoint, type Panel } from './multiply-adjoint.js';

/** Columns of L⁻¹ found together, a multiple of four. */
const PANEL = 48;

const tiles = [new Float64Array(16), new Float64Array(16), new Float64Array(16), new Float64Array(16)] as const;
const re = new Float64Array(16);
const im = new Float64Array(16);

/**
 * Inverse of the Hermitian matrix A = L L* from its lower factor, into `inverse` (both triangles); `work` receives the
 * upper triangular (L⁻¹)*. All n × n: n² real parts, followed by n² imaginary ones if `complex`.
 */
export function choleskyInverse(
  l: Float64Array,
  n: number,
  complex: boolean,
  inverse: Float64Array,
  work: Float64Array,
): void {
  work.fill(0);
  const panel = (data: Float64Array, row: number, col: number): Panel => {
    return { data, start: row * n + col, stride: n, imaginary: n * n };
  };
  for (let first = 0; first < n; first += PANEL) {
    const end = Math.min(first + PANEL, n);
    // Row j of `work` is column j of L⁻¹, conjugated; −Σ_{k<first} L_ik (L⁻¹)_kj goes where (L⁻¹)_ij will be found.
    const shape = [first, end - first, first] as const;
    multiplyAdjoint(panel(work, 0, first), panel(work, 0, 0), panel(l, first, 0), shape, { complex, factor: -1 });
    for (let i0 = first; i0 < end; i0 += 4) {
      for (let j0 = 0; j0 <= i0; j0 += 4) {
        const from = Math.max(first, j0);
        tileProducts(l, i0, work, j0, n, complex, from, i0);
        if (complex) forwardComplex(l, work, n, i0, j0);
        else forwardReal(l, work, n, i0, j0);
      }
    }
  }
  for (let first = 0; first < n; first += PANEL) {
    const height = Math.min(PANEL, n - first);
    // A⁻¹ = (L⁻¹)* L⁻¹; row i of (L⁻¹)* starts at column i.
    const shape = [height, first + height, n - first] as const;
    multiplyAdjoint(panel(inverse, first, 0), panel(work, first, first), panel(work, 0, first), shape, { complex });
  }
  mirror(inverse, n, complex);
}

/** re + i im = Σ_k l_ik conj(w_jk) over from ≤ k < to and the 4 × 4 tile at (i0, j0). */
function tileProducts(
  l: Float64Array,
  i0: number,
  work: Float64Array,
  j0: number,
  n: number,
  complex: boolean,
  from: number,
  to: number,
): void {
  const inner = to - from;
  const a0 = i0 * n + from;
  const a1 = Math.min(i0 + 1, n - 1) * n + from;
  const a2 = Math.min(i0 + 2, n - 1) * n + from;
  const a3 = Math.min(i0 + 3, n - 1) * n + from;
  const b0 = j0 * n + from;
  const b1 = Math.min(j0 + 1, n - 1) * n + from;
  const b2 = Math.min(j0 + 2, n - 1) * n + from;
  const b3 = Math.min(j0 + 3, n - 1) * n + from;
  dotTile(l, a0, a1, a2, a3, work, b0, b1, b2, b3, inner, re);
  if (!complex) return;
  const d = n * n;
  const [rr, ii, ir, ri] = tiles;
  rr.set(re);
  dotTile(l, d + a0, d + a1, d + a2, d + a3, work, d + b0, d + b1, d + b2, d + b3, inner, ii);
  dotTile(l, d + a0, d + a1, d + a2, d + a3, work, b0, b1, b2, b3, inner, ir);
  dotTile(l, a0, a1, a2, a3, work, d + b0, d + b1, d + b2, d + b3, inner, ri);
  for (let k = 0; k < 16; k++) {
    re[k] = rr[k] + ii[k];
    im[k] = ir[k] - ri[k];
  }
}

function forwardReal(l: Float64Array, work: Float64Array, n: number, i0: number, j0: number): void {
  for (let i = i0; i < Math.min(i0 + 4, n); i++) {
    for (let j = j0; j < Math.min(j0 + 4, i + 1); j++) {
      const row = j * n;
      let x = (j === i ? 1 : 0) + work[row + i] - re[4 * (i - i0) + j - j0];
      for (let k = i0; k < i; k++) x -= l[i * n + k] * work[row + k];
      work[row + i] = x / l[i * n + i];
    }
  }
}

function forwardComplex(l: Float64Array, work: Float64Array, n: number, i0: number, j0: number): void {
  const d = n * n;
  for (let i = i0; i < Math.min(i0 + 4, n); i++) {
    for (let j = j0; j < Math.min(j0 + 4, i + 1); j++) {
      const row = j * n;
      const tile = 4 * (i - i0) + j - j0;
      let x = (j === i ? 1 : 0) + work[row + i] - re[tile];
      let y = -work[d + row + i] - im[tile];
      for (let k = i0, u = i * n + i0, v = row + i0; k < i; k++, u++, v++) {
        x -= l[u] * work[v] + l[d + u] * work[d + v];
        y -= l[d + u] * work[v] - l[u] * work[d + v];
      }
      work[row + i] = x / l[i * n + i];
      work[d + row + i] = -y / l[i * n + i];
    }
  }
}

/** Copies the lower triangle to the upper one, conjugated. */
function mirror(a: Float64Array, n: number, complex: boolean): void {
  const d = n * n;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      a[j * n + i] = a[i * n + j];
      if (complex) a[d + j * n + i] = -a[d + i * n + j];
    }
    if (complex) a[d + i * n + i] = 0;
  }
}
