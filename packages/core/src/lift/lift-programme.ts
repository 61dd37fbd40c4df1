import { type ComplexMatrix, identity } from '../linalg/complex-matrix.js';
import { type SparseMatrix, sparseFromTriplets } from '../linalg/sparse-matrix.js';
import type { Coefficient, Programme } from '../programme/programme.js';
import type { LiftSolutions } from './lift-constraints.js';
import type { LiftModel } from './lift-jumps.js';
import type { LiftUnknown } from './lift-orbits.js';

type Triplet = [number, number, number, number];

/** Where components ξ_k and pairs R_m*ξ_j stand among the rows of the left form. */
interface FormLayout {
  readonly size: number;
  /** First row of component k. */
  readonly component: readonly number[];
  /** First row of the pair (m,j), m = −1 excluded; only pairs that a term uses. Key `m,j`. */
  readonly pair: ReadonlyMap<string, number>;
}

/** Rows for the components, then for the pairs that some β or γ term uses. */
function formLayout({ jumps, algebra }: LiftModel, unknowns: readonly LiftUnknown[]): FormLayout {
  let size = 0;
  const component = jumps.map(({ col }) => {
    const start = size;
    size += algebra.blocks[col];
    return start;
  });
  const pair = new Map<string, number>();
  for (const { terms } of unknowns) {
    for (const { term } of terms) {
      if (term.left < 0) continue;
      const key = `${term.left},${term.from}`;
      if (pair.has(key)) continue;
      pair.set(key, size);
      size += algebra.blocks[jumps[term.from].col];
    }
  }
  return { size, component, pair };
}

/**
 * The semidefinite programme "maximise K subject to ∂L = L̂∂ and the left form positive" (§6 of the method): unknowns are the
 * coordinates along `solutions.directions`, then K. The left form, as a matrix over (R_m*ξ_j √w_j)_{mj} and (ξ_k)_k, is
 * [[1, C],[C*, P]] with C_{(mj),k} = −(w_k/√w_j) Σ β R_m' and P_kl from the γ′ and δ terms, w_kS − 2Kw_k on the diagonal.
 */
export function liftProgramme(model: LiftModel, unknowns: readonly LiftUnknown[], solutions: LiftSolutions): Programme {
  const layout = formLayout(model, unknowns);
  const columns = unknowns.map((unknown) => unknownTriplets(model, layout, unknown));
  const constant = combine(columns, solutions.origin);
  constant.push(...fixedTriplets(model, layout));
  const blocks: Coefficient[] = solutions.directions.map((direction, i) => ({
    unknown: i,
    matrix: sparse(layout.size, combine(columns, direction), -1),
  }));
  blocks.push({
    unknown: solutions.directions.length,
    matrix: sparse(layout.size, curvatureTriplets(model, layout), 1),
  });
  const all = [sparse(layout.size, constant, 1), ...blocks.map(({ matrix }) => matrix)];
  const kind = all.every((matrix) => matrix.im.every((x) => x === 0)) ? 'symmetric' : 'hermitian';
  const objective = new Float64Array(solutions.directions.length + 1);
  objective[solutions.directions.length] = 1;
  return { objective, blocks: [{ kind, size: layout.size, constant: all[0], coefficients: blocks }] };
}

/** A real unknown's part of the form, both triangles. */
function unknownTriplets(model: LiftModel, layout: FormLayout, { terms }: LiftUnknown): Triplet[] {
  const out: Triplet[] = [];
  const { jumps } = model;
  for (const { term, re, im } of terms) {
    const { left, right, from, to } = term;
    const size = model.algebra.blocks[jumps[from].col];
    const factor = right < 0 ? identity(size) : jumps[right].corner;
    const rows = left < 0 ? layout.component[from] : (layout.pair.get(`${left},${from}`) as number);
    const scale = left < 0 ? -jumps[to].weight : -jumps[to].weight / Math.sqrt(jumps[from].weight);
    addBlock(out, rows, layout.component[to], factor, scale * re, scale * im);
  }
  return out;
}

/** Entries of (x+iy)·A at (row, col) and of its adjoint at (col, row). */
function addBlock(out: Triplet[], row: number, col: number, a: ComplexMatrix, x: number, y: number): void {
  for (let i = 0; i < a.rows; i++) {
    for (let j = 0; j < a.cols; j++) {
      const p = i * a.cols + j;
      const re = x * a.re[p] - y * a.im[p];
      const im = x * a.im[p] + y * a.re[p];
      if (re === 0 && im === 0) continue;
      out.push([row + i, col + j, re, im], [col + j, row + i, re, -im]);
    }
  }
}

/** 1 on the pairs, w_kS on the components. */
function fixedTriplets({ jumps, drift, algebra }: LiftModel, layout: FormLayout): Triplet[] {
  const out: Triplet[] = [];
  for (const [key, row] of layout.pair) {
    const j = Number(key.split(',')[1]);
    for (let i = 0; i < algebra.blocks[jumps[j].col]; i++) out.push([row + i, row + i, 1, 0]);
  }
  jumps.forEach(({ weight, col }, k) => {
    const s = drift[col];
    const start = layout.component[k];
    for (let i = 0; i < s.rows; i++) {
      for (let j = 0; j < s.cols; j++) {
        const p = i * s.cols + j;
        if (s.re[p] !== 0 || s.im[p] !== 0) out.push([start + i, start + j, weight * s.re[p], weight * s.im[p]]);
      }
    }
  });
  return out;
}

/** 2w_k on the components: what K multiplies, with the sign of S = C − Σ yA. */
function curvatureTriplets({ jumps, algebra }: LiftModel, layout: FormLayout): Triplet[] {
  return jumps.flatMap(({ weight, col }, k) =>
    Array.from({ length: algebra.blocks[col] }, (_, i): Triplet => {
      const at = layout.component[k] + i;
      return [at, at, 2 * weight, 0];
    }),
  );
}

function combine(columns: readonly (readonly Triplet[])[], x: Float64Array): Triplet[] {
  const out: Triplet[] = [];
  columns.forEach((triplets, k) => {
    if (x[k] === 0) return;
    for (const [i, j, re, im] of triplets) out.push([i, j, x[k] * re, x[k] * im]);
  });
  return out;
}

function sparse(size: number, triplets: readonly Triplet[], sign: number): SparseMatrix {
  return sparseFromTriplets(
    size,
    size,
    cleaned(triplets).map(([i, j, re, im]): Triplet => [i, j, sign * re, sign * im]),
  );
}

/** Sums of duplicates, with those that cancel to rounding dropped, so that blocks can be told apart. */
function cleaned(triplets: readonly Triplet[]): Triplet[] {
  const sums = new Map<string, Triplet>();
  const sizes = new Map<string, number>();
  for (const [i, j, re, im] of triplets) {
    const key = `${i},${j}`;
    const at = sums.get(key);
    sizes.set(key, (sizes.get(key) ?? 0) + Math.hypot(re, im));
    if (at) {
      at[2] += re;
      at[3] += im;
    } else sums.set(key, [i, j, re, im]);
  }
  return [...sums].filter(([key, t]) => Math.hypot(t[2], t[3]) > 1e-14 * (sizes.get(key) ?? 0)).map(([, t]) => t);
}
