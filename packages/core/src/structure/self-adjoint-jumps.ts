import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { UnitForm } from '../generator/unit-form.js';
import { zeros } from '../linalg/complex-matrix.js';
import { symmetricEigen } from '../linalg/symmetric-eigen.js';
import { EPSILON } from '../tolerances.js';
import type { RawJump } from './extract-jumps.js';
import { choiEntry } from './positivity.js';

/** A Hermitian matrix as a list of [k, l, re, im]. */
type HermitianList = readonly (readonly [number, number, number, number])[];

/**
 * The self-adjoint jumps of frequency 0 in one block: C in an orthonormal basis of the traceless Hermitian matrices among the
 * given units (the matrices of Gell-Mann), where GNS symmetry makes it real symmetric; entries at rounding level are dropped and
 * the parts that then do not meet are diagonalised apart, so that a C that is already diagonal keeps that basis.
 */
export function selfAdjointJumps(
  form: UnitForm,
  pairs: readonly (readonly [number, number])[],
  algebra: BlockAlgebra,
  block: number,
): RawJump[] {
  const basis = tracelessBasis(pairs, algebra, block);
  const m = basis.length;
  const c = new Float64Array(m * m);
  let top = 0;
  for (let g = 0; g < m; g++) {
    for (let h = g; h < m; h++) {
      const value = realPart(form, basis[g], basis[h]);
      c[g * m + h] = value;
      c[h * m + g] = value;
      top = Math.max(top, Math.abs(value));
    }
  }
  const negligible = ROUNDING * m * EPSILON * top;
  return components(c, m, negligible).flatMap((part) => diagonalise(c, m, part, basis, form.units.size));
}

const ROUNDING = 8;

/** For k<l symmetric and antisymmetric, then the diagonal ones (1,…,1,−k,0,…)/√(k(k+1)). */
function tracelessBasis(
  pairs: readonly (readonly [number, number])[],
  algebra: BlockAlgebra,
  block: number,
): HermitianList[] {
  const basis: HermitianList[] = [];
  const s = Math.SQRT1_2;
  for (const [k, l] of pairs) {
    if (k >= l) continue;
    basis.push([[k, l, s, 0], [l, k, s, 0]]); // prettier-ignore
    basis.push([[k, l, 0, -s], [l, k, 0, s]]); // prettier-ignore
  }
  const start = algebra.offsets[block];
  for (let k = 1; k < algebra.blocks[block]; k++) {
    const scale = 1 / Math.sqrt(k * (k + 1));
    const entries = Array.from(
      { length: k + 1 },
      (_, i) => [start + i, start + i, i < k ? scale : -k * scale, 0] as const,
    );
    basis.push(entries);
  }
  return basis;
}

/**
 * Real part of T C T* between two basis elements f_h = Σ_p T_hp e_p: Σ_pq T_gp C_pq conj(T_hq).
 */
function realPart(form: UnitForm, g: HermitianList, h: HermitianList): number {
  let sum = 0;
  for (const [k, l, gr, gi] of g) {
    for (const [k2, l2, hr, hi] of h) {
      const [re, im] = choiEntry(form, k, l, k2, l2);
      sum += (gr * hr + gi * hi) * re - (gi * hr - gr * hi) * im;
    }
  }
  return sum;
}

/** Connected parts of the graph of the entries that are not negligible, in order of their first index. */
function components(c: Float64Array, m: number, negligible: number): number[][] {
  const part = new Int32Array(m).fill(-1);
  const parts: number[][] = [];
  for (let start = 0; start < m; start++) {
    if (part[start] >= 0) continue;
    const list = [start];
    part[start] = parts.length;
    for (let at = 0; at < list.length; at++) {
      for (let h = 0; h < m; h++) {
        if (part[h] >= 0 || Math.abs(c[list[at] * m + h]) <= negligible) continue;
        part[h] = parts.length;
        list.push(h);
      }
    }
    parts.push(list.sort((a, b) => a - b));
  }
  return parts;
}

function diagonalise(
  c: Float64Array,
  m: number,
  part: readonly number[],
  basis: readonly HermitianList[],
  n: number,
): RawJump[] {
  const size = part.length;
  const { values, vectors } = symmetricEigen(
    Float64Array.from({ length: size * size }, (_, k) => c[part[Math.floor(k / size)] * m + part[k % size]]),
    size,
  );
  const jumps: RawJump[] = [];
  for (let j = size - 1; j >= 0; j--) {
    const direction = zeros(n);
    part.forEach((h, p) => {
      for (const [k, l, re, im] of basis[h]) {
        direction.re[k * n + l] += vectors[p * size + j] * re;
        direction.im[k * n + l] += vectors[p * size + j] * im;
      }
    });
    jumps.push({ weight: values[j], direction, frequency: 0, selfAdjoint: true });
  }
  return jumps;
}
