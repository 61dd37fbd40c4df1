import { adjoint, commutator, multiply, scale, zeros, type ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { sparseFromTriplets, type SparseMatrix, type Triplet } from '../../../src/linalg/sparse-matrix.js';
import { symmetricEigen } from '../../../src/linalg/symmetric-eigen.js';
import { type Programme } from '../../../src/programme/programme.js';

/** A tracial generator L(A) = Σ_m R_m A R_m − ½{R_m², A} with self-adjoint jumps R_m = √2 V_m. */
export type Jumps = readonly ComplexMatrix[];

/**
 * One real unknown of the lift: entries β_{mm'jk} += value ("beta": [m, m', j, k]) or δ_{jk} += value ("delta": [j, k]).
 */
export interface LiftTensor {
  readonly beta: readonly (readonly [number, number, number, number, number])[];
  readonly delta: readonly (readonly [number, number, number])[];
}

/** β_{mm'jk} = b_{mk} δ_{mm'} δ_{jk} and δ_{jk}: J² + J² unknowns. */
export function smallAnsatz(jumps: number): LiftTensor[] {
  const tensors: LiftTensor[] = [];
  for (let m = 0; m < jumps; m++) {
    for (let k = 0; k < jumps; k++) {
      tensors.push({ beta: [[m, m, k, k, 1]], delta: [] });
      tensors.push({ beta: [], delta: [[m, k, 1]] });
    }
  }
  return tensors;
}

/** β_{mm'jk} = b_{mjk} δ_{mm'} and δ_{jk}: J³ + J² unknowns. */
export function wideAnsatz(jumps: number): LiftTensor[] {
  const tensors = smallAnsatz(jumps);
  for (let m = 0; m < jumps; m++) {
    for (let j = 0; j < jumps; j++) {
      for (let k = 0; k < jumps; k++) if (j !== k) tensors.push({ beta: [[m, m, j, k, 1]], delta: [] });
    }
  }
  return tensors;
}

/**
 * "Maximise K subject to ∂L = L̂∂ and both forms completely positive" for
 *
 *     (L̂ξ)_k = Σ β_{mm'jk} R_m ξ_j R_{m'} + Σ_j δ_{jk} ξ_j − ½(Sξ_k + ξ_kS),  S = Σ R_m²,  ∂_kA = [V_k, A].
 *
 * With u_{mj} = R_m ξ_j, the form L(Σ ξ_jξ_j*) − 2Re Σ (L̂ξ)_jξ_j* − 2K Σ ξ_jξ_j* is
 * Σ u u* − 2Re Σ u_{mj} (Σ_{m'} β_{mm'jk} R_{m'}) ξ_k* + Σ ξ_k P_kl ξ_l* with P_kl = (S − 2K)δ_kl − δ_kl − conj(δ_lk): the terms
 * Sξξ* of L and of L̂ cancel and ξSξ* is left over. The mirrored form has u_{mj} = ξ_j R_m and the transposed β. The affine space of
 * solutions of ∂L = L̂∂ is parametrised by an orthonormal basis; the last unknown is K. Null if there is no solution.
 */
export function liftInstance(jumps: Jumps, tensors: readonly LiftTensor[]): Programme | null {
  const affine = solveIntertwining(jumps, tensors);
  if (!affine) return null;
  const forms = [false, true].map((mirrored) => {
    const columns = usedColumns(jumps.length, tensors, mirrored);
    return {
      constant: formConstant(jumps, columns.size),
      linear: tensors.map((tensor) => formOf(jumps, tensor, columns, mirrored)),
    };
  });
  const count = affine.basis.length + 1;
  const objective = new Float64Array(count);
  objective[count - 1] = 1;
  return {
    objective,
    blocks: forms.map(({ constant, linear }) => {
      const { size } = constant;
      const combine = (x: Float64Array): Triplet[] =>
        linear.flatMap((entries, t) => entries.map(([i, j, re, im]): Triplet => [i, j, x[t] * re, x[t] * im]));
      const curvature: Triplet[] = [];
      for (let i = 0; i < jumps.length * jumps[0].rows; i++) curvature.push([i, i, 2, 0]);
      const negated = (entries: Triplet[]): Triplet[] => entries.map(([i, j, re, im]): Triplet => [i, j, -re, -im]);
      return {
        kind: 'hermitian' as const,
        size,
        constant: sparseFromTriplets(size, size, [...constant.entries, ...combine(affine.point)]),
        coefficients: [
          ...affine.basis.map((direction, unknown) => ({
            unknown,
            matrix: clean(sparseFromTriplets(size, size, negated(combine(direction)))),
          })),
          { unknown: count - 1, matrix: sparseFromTriplets(size, size, curvature) },
        ],
      };
    }),
  };
}

/** Rows (m, j) of the square that any tensor uses, numbered. */
function usedColumns(jumps: number, tensors: readonly LiftTensor[], mirrored: boolean): Map<number, number> {
  const used = new Set<number>();
  for (const { beta } of tensors) for (const [m, n, j] of beta) used.add((mirrored ? n : m) * jumps + j);
  return new Map([...used].sort((a, b) => a - b).map((key, place) => [key, place]));
}

function formConstant(jumps: Jumps, columns: number): { size: number; entries: Triplet[] } {
  const n = jumps[0].rows;
  const s = sumOfSquares(jumps);
  const entries: Triplet[] = [];
  for (let k = 0; k < jumps.length; k++) pushBlock(entries, s, k * n, k * n, 1);
  const size = (jumps.length + columns) * n;
  for (let i = jumps.length * n; i < size; i++) entries.push([i, i, 1, 0]);
  return { size, entries };
}

/** What one tensor adds to [P C; C* 1]; both triangles. */
function formOf(jumps: Jumps, { beta, delta }: LiftTensor, columns: Map<number, number>, mirrored: boolean): Triplet[] {
  const n = jumps[0].rows;
  const entries: Triplet[] = [];
  for (const [j, k, value] of delta) {
    for (let i = 0; i < n; i++) {
      entries.push([j * n + i, k * n + i, -value, 0]);
      entries.push([k * n + i, j * n + i, -value, 0]);
    }
  }
  for (const [m, right, j, k, value] of beta) {
    const place = (jumps.length + columns.get((mirrored ? right : m) * jumps.length + j)!) * n;
    // The cross term is −u_{mj} · coefficient · ξ_k*; its sign does not matter.
    const block = mirrored ? jumps[m] : jumps[right];
    pushBlock(entries, block, place, k * n, value);
    pushBlock(entries, adjoint(block), k * n, place, value);
  }
  return entries;
}

function pushBlock(entries: Triplet[], a: ComplexMatrix, row: number, col: number, factor: number): void {
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < a.cols; j++) {
      const q = i * a.cols + j;
      entries.push([row + i, col + j, factor * a.re[q], factor * a.im[q]]);
    }
  }
}

/** A particular x and a basis of directions with Σ_t x_t L̂_t ∂A = ∂L(A) + ½{S, ∂A} for all A. */
function solveIntertwining(
  jumps: Jumps,
  tensors: readonly LiftTensor[],
): { point: Float64Array; basis: Float64Array[] } | null {
  const count = tensors.length;
  const gram = new Float64Array((count + 1) ** 2);
  const n = jumps[0].rows;
  for (let p = 0; p < n; p++) {
    for (let q = 0; q < n; q++) {
      const unit = zeros(n);
      unit.re[p * n + q] = 1;
      const xi = jumps.map((r) => scale(commutator(r, unit), Math.SQRT1_2));
      const images = tensors.map((tensor) => liftImage(jumps, tensor, xi));
      const target = intertwiningTarget(jumps, unit, xi);
      addGram(gram, [...images, target], jumps.length * n * n);
    }
  }
  const system = new Float64Array(count * count);
  for (let i = 0; i < count; i++) system.set(gram.subarray(i * (count + 1), i * (count + 1) + count), i * count);
  const { values, vectors } = symmetricEigen(system, count);
  const point = new Float64Array(count);
  const basis: Float64Array[] = [];
  for (let k = 0; k < count; k++) {
    const vector = Float64Array.from({ length: count }, (_, i) => vectors[i * count + k]);
    if (values[k] < 1e-10 * values[count - 1]) {
      basis.push(vector);
      continue;
    }
    let weight = 0;
    for (let i = 0; i < count; i++) weight += vector[i] * gram[i * (count + 1) + count];
    for (let i = 0; i < count; i++) point[i] += (weight / values[k]) * vector[i];
  }
  let residual = gram[(count + 1) ** 2 - 1];
  for (let i = 0; i < count; i++) residual -= point[i] * gram[i * (count + 1) + count];
  return residual < 1e-10 * gram[(count + 1) ** 2 - 1] ? { point, basis } : null;
}

function liftImage(jumps: Jumps, { beta, delta }: LiftTensor, xi: readonly ComplexMatrix[]): ComplexMatrix[] {
  const out = xi.map((block) => zeros(block.rows));
  for (const [m, right, j, k, value] of beta) {
    addInto(out[k], multiply(multiply(jumps[m], xi[j]), jumps[right]), value);
  }
  for (const [j, k, value] of delta) addInto(out[k], xi[j], value);
  return out;
}

function intertwiningTarget(jumps: Jumps, a: ComplexMatrix, xi: readonly ComplexMatrix[]): ComplexMatrix[] {
  const s = sumOfSquares(jumps);
  const generated = zeros(a.rows);
  for (const r of jumps) addInto(generated, multiply(multiply(r, a), r), 1);
  addInto(generated, multiply(s, a), -0.5);
  addInto(generated, multiply(a, s), -0.5);
  return jumps.map((r, k) => {
    const out = scale(commutator(r, generated), Math.SQRT1_2);
    addInto(out, multiply(s, xi[k]), 0.5);
    addInto(out, multiply(xi[k], s), 0.5);
    return out;
  });
}

function addGram(gram: Float64Array, images: readonly ComplexMatrix[][], length: number): void {
  const flat = images.map((blocks) => {
    const out = new Float64Array(2 * length);
    blocks.forEach((block, k) => {
      out.set(block.re, k * block.re.length);
      out.set(block.im, length + k * block.re.length);
    });
    return out;
  });
  flat.forEach((x, i) => {
    flat.forEach((y, j) => {
      let sum = 0;
      for (let k = 0; k < x.length; k++) sum += x[k] * y[k];
      gram[i * images.length + j] += sum;
    });
  });
}

function sumOfSquares(jumps: Jumps): ComplexMatrix {
  const s = zeros(jumps[0].rows);
  for (const r of jumps) addInto(s, multiply(r, r), 1);
  return s;
}

function addInto(target: ComplexMatrix, a: ComplexMatrix, factor: number): void {
  for (let k = 0; k < a.re.length; k++) {
    target.re[k] += factor * a.re[k];
    target.im[k] += factor * a.im[k];
  }
}

/** Drops entries that only rounding put there. */
function clean(a: SparseMatrix): SparseMatrix {
  const kept: Triplet[] = [];
  for (let i = 0; i < a.rows; i++) {
    for (let e = a.rowStart[i]; e < a.rowStart[i + 1]; e++) {
      if (Math.abs(a.re[e]) + Math.abs(a.im[e]) > 1e-13) kept.push([i, a.colIndex[e], a.re[e], a.im[e]]);
    }
  }
  return sparseFromTriplets(a.rows, a.cols, kept);
}
