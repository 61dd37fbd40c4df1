import { ThalwegError } from '../errors.js';
import { EPSILON, QR_STEPS_PER_EIGENVALUE } from '../tolerances.js';
import { balance, reduceHessenberg } from './hessenberg.js';
import { safeUnit } from './safe-unit.js';
import { requireFinite, requireLength } from './shape-checks.js';

/** Eigenvalue k is re[k] + i im[k]; conjugate pairs are neighbours with the positive imaginary part first. */
export interface GeneralEigenvalues {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * Eigenvalues of a general real n × n matrix, ordered by real part and then by modulus of the imaginary part: balancing,
 * Hessenberg form, and the Francis double-shift QR algorithm (Wilkinson & Reinsch 1971, II/14). Throws
 * `dimension-mismatch`, `not-finite`, `no-convergence`.
 */
export function eigenvaluesGeneral(a: Float64Array, n: number): GeneralEigenvalues {
  requireLength(a, n * n);
  requireFinite(a);
  const unit = safeUnit(a, a.length);
  const h = a.map((x) => x / unit);
  balance(h, n);
  reduceHessenberg(h, n);
  const found = { re: new Float64Array(n), im: new Float64Array(n) };
  let shift = 0;
  const norm = h.reduce((sum, x) => sum + Math.abs(x), 0);
  for (let end = n - 1, steps = 0; end >= 0;) {
    const start = startOfBlock(h, n, end, norm);
    if (start >= end - 1) {
      storeBlock(h, n, start, end, shift, found);
      end = start - 1;
      steps = 0;
      continue;
    }
    if (++steps > QR_STEPS_PER_EIGENVALUE) {
      throw new ThalwegError(
        'no-convergence',
        `expected QR to converge within ${steps - 1} steps per eigenvalue at size ${n}`,
      );
    }
    if (steps % 10 === 0) shift += exceptionalShift(h, n, end);
    doubleShiftStep(h, n, start, end, steps % 10 === 0);
  }
  return sorted(found, unit);
}

/** The least index whose block up to `end` has no negligible subdiagonal element. */
function startOfBlock(h: Float64Array, n: number, end: number, norm: number): number {
  let l = end;
  for (; l > 0; l--) {
    const scale = Math.abs(h[(l - 1) * n + l - 1]) + Math.abs(h[l * n + l]);
    const subdiagonal = Math.abs(h[l * n + l - 1]);
    if (subdiagonal <= EPSILON * (scale > 0 ? scale : norm)) break;
  }
  return l;
}

/** Eigenvalues of the trailing 1 × 1 or 2 × 2 block. */
function storeBlock(
  h: Float64Array,
  n: number,
  start: number,
  end: number,
  shift: number,
  found: GeneralEigenvalues,
): void {
  const { re, im } = found;
  const d = h[end * n + end];
  if (start === end) {
    re[end] = d + shift;
    im[end] = 0;
    return;
  }
  const a = h[start * n + start];
  const p = (a - d) / 2;
  const product = h[end * n + start] * h[start * n + end];
  const q = p * p + product;
  const root = Math.sqrt(Math.abs(q));
  if (q >= 0) {
    const z = p + (p >= 0 ? root : -root);
    re[start] = re[end] = d + z + shift;
    if (z !== 0) re[end] = d - product / z + shift;
    im[start] = im[end] = 0;
  } else {
    re[start] = re[end] = d + p + shift;
    im[start] = root;
    im[end] = -root;
  }
}

/** Shifts the whole matrix when the usual shifts cycle. */
function exceptionalShift(h: Float64Array, n: number, end: number): number {
  const x = h[end * n + end];
  for (let i = 0; i <= end; i++) h[i * n + i] -= x;
  return x;
}

/** One implicit double QR step on rows start … end, with the shifts of the trailing 2 × 2 block or exceptional ones. */
function doubleShiftStep(h: Float64Array, n: number, start: number, end: number, exceptional: boolean): void {
  let x = h[end * n + end];
  let y = h[(end - 1) * n + end - 1];
  let w = h[end * n + end - 1] * h[(end - 1) * n + end];
  if (exceptional) {
    const s = Math.abs(h[end * n + end - 1]) + Math.abs(h[(end - 1) * n + end - 2]);
    x = y = 0.75 * s;
    w = -0.4375 * s * s;
  }
  const bulge = new Float64Array(3);
  const first = firstRow(h, n, start, end, x, y, w, bulge);
  for (let i = first + 2; i <= end; i++) {
    h[i * n + i - 2] = 0;
    if (i > first + 2) h[i * n + i - 3] = 0;
  }
  for (let k = first; k < end; k++) {
    const last = k === end - 1;
    if (k > first) {
      bulge[0] = h[k * n + k - 1];
      bulge[1] = h[(k + 1) * n + k - 1];
      bulge[2] = last ? 0 : h[(k + 2) * n + k - 1];
    }
    chase(h, n, start, end, first, k, bulge);
  }
}

/** The row at which two consecutive small subdiagonal elements allow the step to begin, with the first bulge vector. */
function firstRow(
  h: Float64Array,
  n: number,
  start: number,
  end: number,
  x: number,
  y: number,
  w: number,
  bulge: Float64Array,
): number {
  for (let m = end - 2; ; m--) {
    const z = h[m * n + m];
    const r = x - z;
    const s = y - z;
    const below = h[(m + 1) * n + m];
    bulge[0] = (r * s - w) / below + h[m * n + m + 1];
    bulge[1] = h[(m + 1) * n + m + 1] - z - r - s;
    bulge[2] = h[(m + 2) * n + m + 1];
    const scale = Math.abs(bulge[0]) + Math.abs(bulge[1]) + Math.abs(bulge[2]);
    for (let i = 0; i < 3; i++) bulge[i] /= scale;
    if (m === start) return m;
    const around = Math.abs(h[(m - 1) * n + m - 1]) + Math.abs(z) + Math.abs(h[(m + 1) * n + m + 1]);
    const coupling = Math.abs(h[m * n + m - 1]) * (Math.abs(bulge[1]) + Math.abs(bulge[2]));
    if (coupling <= EPSILON * Math.abs(bulge[0]) * around) return m;
  }
}

/** Reflects the bulge vector at rows k … k + 2 to its first entry, from both sides. */
function chase(
  h: Float64Array,
  n: number,
  start: number,
  end: number,
  first: number,
  k: number,
  bulge: Float64Array,
): void {
  let [p, q, r] = bulge;
  const scale = Math.abs(p) + Math.abs(q) + Math.abs(r);
  if (!(scale > 0)) return;
  p /= scale;
  q /= scale;
  r /= scale;
  const s = p >= 0 ? Math.sqrt(p * p + q * q + r * r) : -Math.sqrt(p * p + q * q + r * r);
  if (k > first) h[k * n + k - 1] = -s * scale;
  else if (start !== first) h[k * n + k - 1] = -h[k * n + k - 1];
  p += s;
  const x = p / s;
  const y = q / s;
  const z = r / s;
  q /= p;
  r /= p;
  const three = k < end - 1;
  for (let j = k; j <= end; j++) {
    const a = k * n + j;
    const sum = h[a] + q * h[a + n] + (three ? r * h[a + 2 * n] : 0);
    h[a] -= sum * x;
    h[a + n] -= sum * y;
    if (three) h[a + 2 * n] -= sum * z;
  }
  for (let i = start; i <= Math.min(end, k + 3); i++) {
    const a = i * n + k;
    const sum = x * h[a] + y * h[a + 1] + (three ? z * h[a + 2] : 0);
    h[a] -= sum;
    h[a + 1] -= sum * q;
    if (three) h[a + 2] -= sum * r;
  }
}

function sorted({ re, im }: GeneralEigenvalues, unit: number): GeneralEigenvalues {
  const order = Array.from(re, (_, k) => k).sort(
    (i, k) => re[i] - re[k] || Math.abs(im[i]) - Math.abs(im[k]) || im[k] - im[i],
  );
  return { re: Float64Array.from(order, (k) => re[k] * unit), im: Float64Array.from(order, (k) => im[k] * unit) };
}
