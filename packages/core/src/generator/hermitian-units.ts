import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { MatrixUnits } from '../algebra/matrix-units.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';

/**
 * A map given as a real D×D matrix S in the orthonormal Hermitian basis, in matrix units: T S T*, where for i<j and coordinates x, y
 * of the pair, the units have a_ij = (x+iy)/√2 and a_ji = (x−iy)/√2.
 */
export function hermitianToUnits(algebra: BlockAlgebra, units: MatrixUnits, s: Float64Array): ComplexMatrix {
  const d = algebra.dimension;
  const out = zeros(d);
  const places = unitPairs(algebra, units);
  for (const { real: k, imaginary: k2, upper: p, lower: p2 } of places) {
    for (const { real: l, imaginary: l2, upper: q, lower: q2 } of places) {
      if (k2 < 0 && l2 < 0) {
        out.re[p * d + q] = s[k * d + l];
      } else if (k2 < 0) {
        // One row: a S_k· with (x−iy)/√2 at (i,j) and its conjugate at (j,i).
        const x = s[k * d + l] * Math.SQRT1_2;
        const y = s[k * d + l2] * Math.SQRT1_2;
        set(out, p * d + q, x, -y);
        set(out, p * d + q2, x, y);
      } else if (l2 < 0) {
        const x = s[k * d + l] * Math.SQRT1_2;
        const y = s[k2 * d + l] * Math.SQRT1_2;
        set(out, p * d + q, x, y);
        set(out, p2 * d + q, x, -y);
      } else {
        const [xx, xy, yx, yy] = [s[k * d + l], s[k * d + l2], s[k2 * d + l], s[k2 * d + l2]];
        set(out, p * d + q, (xx + yy) / 2, (yx - xy) / 2);
        set(out, p2 * d + q2, (xx + yy) / 2, (xy - yx) / 2);
        set(out, p * d + q2, (xx - yy) / 2, (yx + xy) / 2);
        set(out, p2 * d + q, (xx - yy) / 2, -(yx + xy) / 2);
      }
    }
  }
  return out;
}

/** The converse, T*MT, for a map that sends Hermitian elements to Hermitian ones: the result is real. */
export function unitsToHermitian(algebra: BlockAlgebra, units: MatrixUnits, m: ComplexMatrix): Float64Array {
  const d = algebra.dimension;
  const out = new Float64Array(d * d);
  const places = unitPairs(algebra, units);
  const { re, im } = m;
  for (const { real: k, imaginary: k2, upper: p, lower: p2 } of places) {
    for (const { real: l, imaginary: l2, upper: q, lower: q2 } of places) {
      if (k2 < 0 && l2 < 0) {
        out[k * d + l] = re[p * d + q];
      } else if (k2 < 0) {
        out[k * d + l] = (re[p * d + q] + re[p * d + q2]) * Math.SQRT1_2;
        out[k * d + l2] = (im[p * d + q2] - im[p * d + q]) * Math.SQRT1_2;
      } else if (l2 < 0) {
        out[k * d + l] = (re[p * d + q] + re[p2 * d + q]) * Math.SQRT1_2;
        out[k2 * d + l] = (im[p * d + q] - im[p2 * d + q]) * Math.SQRT1_2;
      } else {
        const [a, b, c, e] = [p * d + q, p * d + q2, p2 * d + q, p2 * d + q2];
        out[k * d + l] = (re[a] + re[b] + re[c] + re[e]) / 2;
        out[k * d + l2] = (im[b] - im[a] + im[e] - im[c]) / 2;
        out[k2 * d + l] = (im[a] + im[b] - im[c] - im[e]) / 2;
        out[k2 * d + l2] = (re[a] - re[b] - re[c] + re[e]) / 2;
      }
    }
  }
  return out;
}

function set(a: ComplexMatrix, at: number, re: number, im: number): void {
  a.re[at] = re;
  a.im[at] = im;
}

/** Coordinates and units of e_ij, i ≤ j; −1 where i = j has only one of each. */
interface UnitPair {
  readonly real: number;
  readonly imaginary: number;
  readonly upper: number;
  readonly lower: number;
}

function unitPairs(algebra: BlockAlgebra, units: MatrixUnits): UnitPair[] {
  const { row, col, size: n, dimension } = algebra;
  const place = new Int32Array(n * n);
  for (let k = 0; k < dimension; k++) place[row[k] * n + col[k]] = k;
  const pairs: UnitPair[] = [];
  for (let k = 0; k < dimension; k++) {
    const i = row[k];
    const j = col[k];
    if (i > j) continue;
    const diagonal = i === j;
    pairs.push({
      real: k,
      imaginary: diagonal ? -1 : place[j * n + i],
      upper: units.index[i * n + j],
      lower: diagonal ? -1 : units.index[j * n + i],
    });
  }
  return pairs;
}
