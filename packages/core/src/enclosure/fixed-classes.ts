import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { multiply, multiplyAdjointFirst } from '../linalg/complex-matrix.js';
import { type MatrixUnits, matrixUnits } from '../algebra/matrix-units.js';
import type { Structure } from '../structure/structure.js';

/** Matrix units, and how the fixed points sit among them. */
export interface FixedClasses {
  readonly units: MatrixUnits;
  /** The class of each unit, −1 for units outside the support of the fixed points. */
  readonly classOf: Int32Array;
  readonly count: number;
}

/**
 * The fixed points as the span of Σ_{p∈C} e_p over disjoint classes C of matrix units, in the standard basis or that of the columns of
 * u: C·1, diagonal and block-diagonal algebras, and multiplicities are of this kind. Null when they are not.
 */
export function fixedClasses({ algebra, fixedPoints }: Structure, u: ComplexMatrix | null): FixedClasses | null {
  if (!fixedPoints) return null;
  const units = matrixUnits(algebra);
  const d = units.count;
  const projection = fixedProjection(
    fixedPoints.basis.map((f) => (u ? multiplyAdjointFirst(u, multiply(f, u)) : f)),
    units,
  );
  const classOf = new Int32Array(d).fill(-1);
  let count = 0;
  for (let p = 0; p < d; p++) {
    const share = projection[p * d + p];
    if (classOf[p] >= 0 || share < NEGLIGIBLE) continue;
    const size = Math.round(1 / share);
    for (let q = p; q < d; q++) if (Math.abs(projection[p * d + q] * size - 1) < NEGLIGIBLE * size) classOf[q] = count;
    count++;
  }
  if (count !== fixedPoints.dimension) return null;
  const sizes = new Int32Array(count);
  for (const c of classOf) if (c >= 0) sizes[c]++;
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      const expected = classOf[p] >= 0 && classOf[p] === classOf[q] ? 1 / sizes[classOf[p]] : 0;
      if (!(Math.abs(projection[p * d + q] - expected) < NEGLIGIBLE)) return null;
    }
  }
  return { units, classOf, count };
}

/** Entries of a projection that are this near are taken for equal: the fixed points are found to rounding. */
const NEGLIGIBLE = 1e-9;

/** Σ_f |f)(f| in matrix units, real where the pattern holds: entries with an imaginary part are made to fail. */
function fixedProjection(basis: readonly ComplexMatrix[], { count: d, row, col, size: n }: MatrixUnits): Float64Array {
  const out = new Float64Array(d * d);
  const imaginary = new Float64Array(d * d);
  for (const { re, im } of basis) {
    for (let p = 0; p < d; p++) {
      const i = row[p] * n + col[p];
      for (let q = 0; q < d; q++) {
        const j = row[q] * n + col[q];
        out[p * d + q] += re[i] * re[j] + im[i] * im[j];
        imaginary[p * d + q] += im[i] * re[j] - re[i] * im[j];
      }
    }
  }
  for (let k = 0; k < out.length; k++) if (Math.abs(imaginary[k]) > NEGLIGIBLE) out[k] = NaN;
  return out;
}

/** All units but one of each class, the one of largest weight: they span a complement of the fixed points. */
export function complement({ units, classOf, count }: FixedClasses, weight: (p: number) => number): number[] {
  const dropped = new Int32Array(count).fill(-1);
  classOf.forEach((c, p) => {
    if (c >= 0 && (dropped[c] < 0 || weight(p) > weight(dropped[c]))) dropped[c] = p;
  });
  return Array.from({ length: units.count }, (_, p) => p).filter((p) => !dropped.includes(p));
}
