import { coefficientRows, type CoefficientRows, type RowEntries } from './coefficient-rows.js';
import { conePattern, type ConePattern } from './cone-pattern.js';
import { type Programme } from './programme.js';
import { splitBlock, type Component } from './split-blocks.js';

/** All one-row components together: inequalities C_p − Σ_i y_i A_{p,i} ≥ 0, coordinate p. */
export interface LinearPattern {
  readonly size: number;
  /** Block and row in it of each inequality. */
  readonly block: Int32Array;
  readonly index: Int32Array;
  readonly rows: CoefficientRows;
}

/**
 * A programme with split blocks and scaled data: the coefficient of every kept unknown has norm 1, and so have b and C
 * (zero vectors are left alone). With the scaled quantities hatted,
 *
 *     y_i = ŷ_i · constantNorm / norm_i,   S = Ŝ · constantNorm,   X = X̂ · objectiveNorm.
 *
 * X and S are flat: per matrix cone n² real parts, then n² imaginary ones if complex; the linear cone last.
 */
export interface ConicForm {
  /** Kept unknowns, in the numbering of the programme. */
  readonly unknowns: Int32Array;
  readonly norms: Float64Array;
  /** 0 without coefficients. */
  readonly largestNorm: number;
  /** Scaled. */
  readonly objective: Float64Array;
  /** Scaled, flat. */
  readonly constant: Float64Array;
  readonly objectiveNorm: number;
  readonly constantNorm: number;
  readonly cones: readonly ConePattern[];
  readonly offsets: readonly number[];
  readonly linear: LinearPattern;
  readonly linearOffset: number;
  readonly length: number;
}

/** `kept`: the unknowns to keep, ascending. */
export function conicForm(programme: Programme, kept: Int32Array): ConicForm {
  const { blocks, objective } = programme;
  const number = new Int32Array(objective.length).fill(-1);
  kept.forEach((unknown, i) => (number[unknown] = i));
  const components = blocks.flatMap((block, k) => splitBlock(block, k));
  const cones = components
    .filter(({ indices }) => indices.length > 1)
    .map((component) => conePattern(blocks[component.block], component, (unknown) => number[unknown] >= 0));
  const singles = components.filter(({ indices }) => indices.length === 1);
  const linear = linearPattern(programme, singles, number);
  for (const { rows } of [...cones, linear]) rows.unknown.forEach((unknown, t) => (rows.unknown[t] = number[unknown]));
  const offsets: number[] = [];
  let length = 0;
  for (const { size, complex } of cones) {
    offsets.push(length);
    length += size * size * (complex ? 2 : 1);
  }
  const linearOffset = length;
  length += linear.size;
  const norms = normalise([...cones.map(({ rows }) => rows), linear.rows], kept.length);
  const scaledObjective = Float64Array.from(kept, (unknown, i) => objective[unknown] / norms[i]);
  const layout = { cones, offsets, linear, linearOffset, length };
  const constant = flatConstant(programme, layout);
  return {
    ...layout,
    unknowns: kept,
    norms,
    largestNorm: norms.reduce((top, norm) => Math.max(top, norm), 0),
    objective: scaledObjective,
    constant,
    objectiveNorm: scaleToUnit(scaledObjective),
    constantNorm: scaleToUnit(constant),
  };
}

function linearPattern({ blocks }: Programme, singles: readonly Component[], number: Int32Array): LinearPattern {
  const place = blocks.map((block) => new Int32Array(block.size).fill(-1));
  singles.forEach(({ block, indices }, p) => (place[block][indices[0]] = p));
  const entries = new Map<number, { unknown: number; coordinates: number[]; values: number[] }>();
  blocks.forEach((block, k) => {
    for (const { unknown, matrix } of block.coefficients) {
      if (number[unknown] < 0) continue;
      for (let i = 0; i < block.size; i++) {
        if (place[k][i] < 0 || matrix.rowStart[i] === matrix.rowStart[i + 1]) continue;
        const row = entries.get(unknown) ?? { unknown, coordinates: [], values: [] };
        entries.set(unknown, row);
        row.coordinates.push(place[k][i]);
        row.values.push(matrix.re[matrix.rowStart[i]]);
      }
    }
  });
  const rows: RowEntries[] = [...entries.values()];
  rows.sort((a, b) => b.values.length - a.values.length || a.unknown - b.unknown);
  return {
    size: singles.length,
    block: Int32Array.from(singles, ({ block }) => block),
    index: Int32Array.from(singles, ({ indices }) => indices[0]),
    rows: coefficientRows(rows, singles.length),
  };
}

/** Divides every coefficient by its norm over all cones, in place, and returns the norms; 1 for a zero coefficient. */
function normalise(parts: readonly CoefficientRows[], count: number): Float64Array {
  const top = new Float64Array(count);
  const squares = new Float64Array(count);
  const eachValue = (visit: (unknown: number, value: number) => void): void => {
    for (const { unknown, start, value } of parts) {
      for (let t = 0; t < unknown.length; t++)
        for (let e = start[t]; e < start[t + 1]; e++) visit(unknown[t], value[e]);
    }
  };
  eachValue((i, x) => (top[i] = Math.max(top[i], Math.abs(x))));
  eachValue((i, x) => (squares[i] += (x / top[i]) ** 2));
  const norms = top.map((x, i) => (x > 0 ? x * Math.sqrt(squares[i]) : 1));
  for (const { unknown, start, value, denseCount, dense, width } of parts) {
    for (let t = 0; t < unknown.length; t++) {
      for (let e = start[t]; e < start[t + 1]; e++) value[e] /= norms[unknown[t]];
      if (t < denseCount) for (let c = t * width; c < (t + 1) * width; c++) dense[c] /= norms[unknown[t]];
    }
  }
  return norms;
}

type Layout = Pick<ConicForm, 'cones' | 'offsets' | 'linear' | 'linearOffset' | 'length'>;

function flatConstant({ blocks }: Programme, { cones, offsets, linear, linearOffset, length }: Layout): Float64Array {
  const flat = new Float64Array(length);
  cones.forEach(({ block, size, complex, indices }, k) => {
    const { constant } = blocks[block];
    const place = new Int32Array(blocks[block].size).fill(-1);
    indices.forEach((i, p) => (place[i] = p));
    for (let p = 0; p < size; p++) {
      const i = indices[p];
      for (let e = constant.rowStart[i]; e < constant.rowStart[i + 1]; e++) {
        const q = place[constant.colIndex[e]];
        // Half to each triangle: the Hermitian part of what was given.
        flat[offsets[k] + p * size + q] += constant.re[e] / 2;
        flat[offsets[k] + q * size + p] += constant.re[e] / 2;
        if (!complex || p === q) continue;
        flat[offsets[k] + size * size + p * size + q] += constant.im[e] / 2;
        flat[offsets[k] + size * size + q * size + p] -= constant.im[e] / 2;
      }
    }
  });
  for (let p = 0; p < linear.size; p++) {
    const { constant } = blocks[linear.block[p]];
    const start = constant.rowStart[linear.index[p]];
    if (start < constant.rowStart[linear.index[p] + 1]) flat[linearOffset + p] = constant.re[start];
  }
  return flat;
}

/** Divides by the Euclidean norm in place and returns it; a zero vector stays, with norm 1. */
function scaleToUnit(x: Float64Array): number {
  const top = x.reduce((a, b) => Math.max(a, Math.abs(b)), 0);
  if (!(top > 0)) return 1;
  const norm = top * Math.sqrt(x.reduce((sum, b) => sum + (b / top) ** 2, 0));
  for (let i = 0; i < x.length; i++) x[i] /= norm;
  return norm;
}
