import { type BlockAlgebra, toCoordinates } from '../algebra/block-algebra.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import type { MeanTable } from '../metric/mean-table.js';
import { type SecondTable, secondTable } from './second-differences.js';

/** A jump in the eigenbasis of a state, with what it does to the Hermitian basis. */
export interface FrameJump {
  /** [V_j, E_k], N×N each, one after another. */
  readonly images: Parts;
  readonly table: MeanTable;
  readonly frequency: number;
  readonly weight: number;
}

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Gradient in ρ of ‖A‖²_ρ, coordinates in the frame of ρ. */
export function gradientInFrame(algebra: BlockAlgebra, jumps: readonly FrameJump[], a: Float64Array): Float64Array {
  const sum = zeros(algebra.size);
  for (const jump of jumps) {
    const x = imageOf(jump, a, algebra);
    addFormGradient(sum, jump, x, x, 0);
  }
  return toCoordinates(algebra, sum);
}

/** Derivative of 𝒟_ρA in ρ, D×D in the frame of ρ: row k is the gradient of <E_k, 𝒟_ρA>. */
export function mixedInFrame(algebra: BlockAlgebra, jumps: readonly FrameJump[], a: Float64Array): Float64Array {
  const { dimension: d, size: n } = algebra;
  const observed = jumps.map((jump) => imageOf(jump, a, algebra));
  const mixed = new Float64Array(d * d);
  const row = zeros(n);
  for (let k = 0; k < d; k++) {
    row.re.fill(0);
    row.im.fill(0);
    jumps.forEach((jump, j) => addFormGradient(row, jump, jump.images, observed[j], k * n * n));
    toCoordinates(algebra, row, mixed.subarray(k * d, k * d + d));
  }
  return mixed;
}

/** Hessian of ρ ↦ ‖A‖²_ρ, D×D in the frame of ρ, through the bilinear form Z on entries of the direction. */
export function hessianInFrame(
  algebra: BlockAlgebra,
  jumps: readonly FrameJump[],
  lambda: Float64Array,
  a: Float64Array,
): Float64Array {
  const n = algebra.size;
  const z = { re: new Float64Array(n ** 4), im: new Float64Array(n ** 4) };
  const seconds = new Map<number, SecondTable>();
  for (const jump of jumps) {
    const { table, frequency, weight } = jump;
    const second = seconds.get(frequency) ?? secondTable(table, lambda, frequency);
    seconds.set(frequency, second);
    addSecondForm(z, second, imageOf(jump, a, algebra), weight, n);
  }
  return realForm(algebra, z);
}

/** [V_j, A] from the coordinates of A. */
function imageOf({ images }: FrameJump, a: Float64Array, { size: n }: BlockAlgebra): Parts {
  const nn = n * n;
  const [re, im] = [new Float64Array(nn), new Float64Array(nn)];
  for (let k = 0; k < a.length; k++) {
    const x = a[k];
    if (x === 0) continue;
    for (let p = 0, q = k * nn; p < nn; p++, q++) {
      re[p] += x * images.re[q];
      im[p] += x * images.im[q];
    }
  }
  return { re, im };
}

/** out += weight × the gradient in ρ of Re <X,[ρ]Y>; X starts at `at`. Its Hermitian part is what `toCoordinates` reads. */
function addFormGradient(out: ComplexMatrix, { table, weight }: FrameJump, x: Parts, y: Parts, at: number): void {
  const n = out.rows;
  const { left, right } = table;
  for (let a = 0; a < n; a++) {
    for (let c = 0; c < n; c++) {
      let re = 0;
      let im = 0;
      for (let b = 0; b < n; b++) {
        const t = left[(a * n + c) * n + b];
        const [p, q] = [at + a * n + b, c * n + b];
        re += t * (x.re[p] * y.re[q] + x.im[p] * y.im[q]);
        im += t * (x.im[p] * y.re[q] - x.re[p] * y.im[q]);
        const s = right[(b * n + a) * n + c];
        const [v, w] = [at + b * n + c, b * n + a];
        re += s * (x.re[v] * y.re[w] + x.im[v] * y.im[w]);
        im += s * (x.im[v] * y.re[w] - x.re[v] * y.im[w]);
      }
      out.re[a * n + c] += weight * re;
      out.im[a * n + c] += weight * im;
    }
  }
}

/**
 * Z over pairs of entries (row pair u, column pair v), so that the second derivative along η is 2 Re Σ Z_uv η_u η_v:
 * F[a,c,e;b] X̄_ab X_eb at η_ac η_ce, F[a,c;d,b] X̄_ab X_cd at η_ac η_db, F[a;d,e,b] X̄_ab X_ad at η_de η_eb.
 */
function addSecondForm(z: Parts, { left, right, mixed }: SecondTable, x: Parts, weight: number, n: number): void {
  const nn = n * n;
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      const xr = weight * x.re[a * n + b];
      const xi = -weight * x.im[a * n + b];
      if (xr === 0 && xi === 0) continue;
      for (let c = 0; c < n; c++) {
        for (let e = 0; e < n; e++) {
          const at = ((a * n + c) * n + e) * n + b;
          addTerm(z, (a * n + c) * nn + c * n + e, left[at], xr, xi, x, e * n + b);
          addTerm(z, (a * n + c) * nn + e * n + b, mixed[at], xr, xi, x, c * n + e);
          addTerm(z, (c * n + e) * nn + e * n + b, right[at], xr, xi, x, a * n + c);
        }
      }
    }
  }
}

function addTerm(z: Parts, at: number, f: number, xr: number, xi: number, x: Parts, q: number): void {
  z.re[at] += f * (xr * x.re[q] - xi * x.im[q]);
  z.im[at] += f * (xr * x.im[q] + xi * x.re[q]);
}

/** The symmetric matrix of 2 Re Σ Z_uv η_u η_v in Hermitian coordinates, each element of the basis having two entries at most. */
function realForm(algebra: BlockAlgebra, z: Parts): Float64Array {
  const { dimension: d, size: n, row, col } = algebra;
  const nn = n * n;
  const half = Math.SQRT1_2;
  const entries = Array.from({ length: d }, (_, k): readonly (readonly [number, number, number])[] => {
    const [i, j] = [row[k], col[k]];
    if (i === j) return [[i * n + i, 1, 0]];
    if (i < j)
      return [
        [i * n + j, half, 0],
        [j * n + i, half, 0],
      ];
    return [
      [j * n + i, 0, half],
      [i * n + j, 0, -half],
    ];
  });
  const out = new Float64Array(d * d);
  for (let k = 0; k < d; k++) {
    for (let l = 0; l < d; l++) {
      let sum = 0;
      for (const [u, ur, ui] of entries[k]) {
        for (const [v, vr, vi] of entries[l]) {
          sum += z.re[u * nn + v] * (ur * vr - ui * vi) - z.im[u * nn + v] * (ur * vi + ui * vr);
        }
      }
      out[k * d + l] += sum;
      out[l * d + k] += sum;
    }
  }
  return out;
}
