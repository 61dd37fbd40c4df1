import { dotTile } from './dot-tile.js';
import { multiplyAdjoint, type Panel } from './multiply-adjoint.js';

/** Columns of a panel, a multiple of four. */
const PANEL = 48;

const tiles = [new Float64Array(16), new Float64Array(16), new Float64Array(16), new Float64Array(16)] as const;
const re = new Float64Array(16);
const im = new Float64Array(16);

/** How a pivot that is not clearly positive is met: see `choleskyFactor`. */
export interface PivotRule {
  readonly floors: Float64Array;
  readonly skipped: Uint8Array;
}

/**
 * Lower triangle of L with L L* = A, A Hermitian n × n: n² real parts, followed by n² imaginary ones if `complex`; only the
 * lower triangle of A is read, and what is written above the diagonal of L is meaningless. Returns −1, or the index of the
 * first pivot that is not positive.
 *
 * With a pivot rule (real matrices only), a pivot at or below floors[k] is replaced by +∞, which makes column k of L zero
 * and component k of every solution zero; skipped[k] is then set to 1.
 */
export function choleskyFactor(
  a: Float64Array,
  n: number,
  complex: boolean,
  l: Float64Array,
  rule: PivotRule | null = null,
): number {
  for (let first = 0; first < n; first += PANEL) {
    const width = Math.min(PANEL, n - first);
    copyPanel(a, l, n, complex, first, width);
    const rows: Panel = { data: l, start: first * n, stride: n, imaginary: n * n };
    const target: Panel = { ...rows, start: first * n + first };
    const shape = [n - first, width, first] as const;
    if (first > 0) multiplyAdjoint(target, rows, rows, shape, { complex, factor: -1, accumulate: true });
    for (let j0 = first; j0 < first + width; j0 += 4) {
      for (let i0 = j0; i0 < n; i0 += 4) {
        tileProducts(l, n, complex, i0, j0, first);
        const failed = complex ? finishComplex(n, l, i0, j0) : finishReal(n, l, i0, j0, rule);
        if (failed >= 0) return failed;
      }
    }
  }
  return -1;
}

function copyPanel(a: Float64Array, l: Float64Array, n: number, complex: boolean, first: number, width: number): void {
  for (let part = 0; part < (complex ? 2 : 1); part++) {
    for (let i = first; i < n; i++) {
      const q = part * n * n + i * n + first;
      for (let k = q; k < q + width; k++) l[k] = a[k];
    }
  }
}

/** Fills re (and im) with Σ_{first≤k<j0} L_ik conj(L_jk) over the 4 × 4 tile at (i0, j0). */
function tileProducts(l: Float64Array, n: number, complex: boolean, i0: number, j0: number, first: number): void {
  const inner = j0 - first;
  const p0 = i0 * n + first;
  const p1 = Math.min(i0 + 1, n - 1) * n + first;
  const p2 = Math.min(i0 + 2, n - 1) * n + first;
  const p3 = Math.min(i0 + 3, n - 1) * n + first;
  const q0 = j0 * n + first;
  const q1 = Math.min(j0 + 1, n - 1) * n + first;
  const q2 = Math.min(j0 + 2, n - 1) * n + first;
  const q3 = Math.min(j0 + 3, n - 1) * n + first;
  dotTile(l, p0, p1, p2, p3, l, q0, q1, q2, q3, inner, re);
  if (!complex) return;
  const d = n * n;
  const [rr, ii, ir, ri] = tiles;
  rr.set(re);
  dotTile(l, d + p0, d + p1, d + p2, d + p3, l, d + q0, d + q1, d + q2, d + q3, inner, ii);
  dotTile(l, d + p0, d + p1, d + p2, d + p3, l, q0, q1, q2, q3, inner, ir);
  dotTile(l, p0, p1, p2, p3, l, d + q0, d + q1, d + q2, d + q3, inner, ri);
  for (let k = 0; k < 16; k++) {
    re[k] = rr[k] + ii[k];
    im[k] = ir[k] - ri[k];
  }
}

function finishReal(n: number, l: Float64Array, i0: number, j0: number, rule: PivotRule | null): number {
  for (let i = i0; i < Math.min(i0 + 4, n); i++) {
    for (let j = j0; j < Math.min(j0 + 4, i + 1); j++) {
      let x = l[i * n + j] - re[4 * (i - i0) + j - j0];
      for (let k = j0; k < j; k++) x -= l[i * n + k] * l[j * n + k];
      if (j < i) {
        l[i * n + j] = x / l[j * n + j];
        continue;
      }
      if (rule && x <= rule.floors[i]) {
        x = Infinity;
        rule.skipped[i] = 1;
      }
      if (!(x > 0)) return i;
      l[i * n + i] = Math.sqrt(x);
    }
  }
  return -1;
}

function finishComplex(n: number, l: Float64Array, i0: number, j0: number): number {
  const d = n * n;
  for (let i = i0; i < Math.min(i0 + 4, n); i++) {
    for (let j = j0; j < Math.min(j0 + 4, i + 1); j++) {
      const q = i * n + j;
      let x = l[q] - re[4 * (i - i0) + j - j0];
      let y = l[d + q] - im[4 * (i - i0) + j - j0];
      for (let k = j0, u = i * n + j0, v = j * n + j0; k < j; k++, u++, v++) {
        x -= l[u] * l[v] + l[d + u] * l[d + v];
        y -= l[d + u] * l[v] - l[u] * l[d + v];
      }
      if (j === i && !(x > 0)) return i;
      const pivot = j === i ? Math.sqrt(x) : l[j * n + j];
      l[q] = x / pivot;
      l[d + q] = j === i ? 0 : y / pivot;
    }
  }
  return -1;
}
