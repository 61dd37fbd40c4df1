import { FLOW_STEP } from '../tolerances.js';
import type { CurvatureForms } from './curvature-forms.js';
import { type MeanTable, emptyMeanTable, fillMeanTable } from './mean-table.js';
import type { MetricModel } from './metric-model.js';
import { nearDiagonalEigen } from './near-diagonal-eigen.js';
import type { OperatorMean } from './operator-mean.js';
import { rotateBackInto, rotateInto } from './rotate.js';

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * Derivative of a simple smallest eigenvalue of the curvature pencil with respect to the state, by the eigenvector
 * formula: the gradient in ρ of q_ρ(A) − κ‖A‖²_ρ at fixed A with ‖A‖²_ρ = 1. Written in the frame of ρ into `out` (N×N
 * Hermitian G, d = Re Tr G*dρ) from forms just evaluated there. The second derivative of ρ ↦ [ρ] along L†ρ is a central
 * difference of the exact first one. No allocation.
 */
export interface CurvatureGradient {
  /** a: the observable A in the frame of ρ, N×N. */
  at(lambda: Float64Array, a: Parts, kappa: number, out: Parts): void;
}

export function curvatureGradient(model: MetricModel, mean: OperatorMean, forms: CurvatureForms): CurvatureGradient {
  const n = model.algebra.size;
  const nn = n * n;
  const parts = (): Parts => ({ re: new Float64Array(nn), im: new Float64Array(nn) });
  const derivations = model.jumps.map(parts);
  const [la, image, norm, moved, vectors, turned, slope] = Array.from({ length: 7 }, parts);
  const scratch = new Float64Array(2 * nn);
  const values = new Float64Array(n);
  const tables = model.frequencies.map(() => emptyMeanTable(n));
  const groups = new Set(forms.usedJumps.map(({ group }) => group));
  const { blockOf } = model.algebra;

  function at(lambda: Float64Array, a: Parts, kappa: number, out: Parts): void {
    clear(out);
    clear(norm);
    applyOnUnits(forms, a, la);
    forms.usedJumps.forEach(({ index, weight, group }) => {
      commutatorInto(derivations[index], forms.rotated[index], a, n);
      commutatorInto(image, forms.rotated[index], la, n);
      addNormGradient(norm, forms.tables[group], derivations[index], weight, n, blockOf);
      addFormGradient(out, forms.tables[group], derivations[index], image, -weight, n, blockOf);
    });
    applyOnUnits(forms, norm, la);
    addScaled(out, la, 0.5);
    addFlowDerivative(lambda, out);
    addScaled(out, norm, -kappa);
  }

  /** out += ½ d/ds ∇‖A‖²(ρ + s L†ρ) at s = 0. */
  function addFlowDerivative(lambda: Float64Array, out: Parts): void {
    const step = FLOW_STEP / relativeSpeed(forms.eta, lambda, n);
    if (!Number.isFinite(step)) return;
    for (const sign of [1, -1]) {
      for (let p = 0; p < nn; p++) {
        moved.re[p] = sign * step * forms.eta.re[p];
        moved.im[p] = sign * step * forms.eta.im[p];
      }
      for (let i = 0; i < n; i++) moved.re[i * n + i] += lambda[i];
      nearDiagonalEigen(moved.re, moved.im, n, vectors.re, vectors.im);
      for (let i = 0; i < n; i++) values[i] = moved.re[i * n + i];
      for (const k of groups) fillMeanTable(tables[k], mean, values, model.frequencies[k]);
      clear(slope);
      forms.usedJumps.forEach(({ index, weight, group }) => {
        rotateInto(turned, derivations[index], vectors, n, scratch);
        addNormGradient(slope, tables[group], turned, weight, n, blockOf);
      });
      rotateBackInto(turned, slope, vectors, n, scratch);
      addScaled(out, turned, (0.25 * sign) / step);
    }
  }
  return { at };
}

/** Largest |η_ij|/√(λ_iλ_j), times n: how fast the state moves relative to itself. */
function relativeSpeed(eta: Parts, lambda: Float64Array, n: number): number {
  let speed = 0;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const size = Math.hypot(eta.re[i * n + j], eta.im[i * n + j]) / Math.sqrt(lambda[i] * lambda[j]);
      if (size > speed) speed = size;
    }
  }
  return speed * n;
}

/** out = L(a) through the generator on matrix units. */
function applyOnUnits(forms: CurvatureForms, a: Parts, out: Parts): void {
  const { count: d, row, col, size: n } = forms.units;
  const { re: gr, im: gi } = forms.generator;
  clear(out);
  for (let p = 0; p < d; p++) {
    let re = 0;
    let im = 0;
    for (let q = 0; q < d; q++) {
      const at = row[q] * n + col[q];
      re += gr[p * d + q] * a.re[at] - gi[p * d + q] * a.im[at];
      im += gr[p * d + q] * a.im[at] + gi[p * d + q] * a.re[at];
    }
    out.re[row[p] * n + col[p]] = re;
    out.im[row[p] * n + col[p]] = im;
  }
}

function commutatorInto(out: Parts, v: Parts, a: Parts, n: number): void {
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const ik = i * n + k;
        const kj = k * n + j;
        re += v.re[ik] * a.re[kj] - v.im[ik] * a.im[kj] - a.re[ik] * v.re[kj] + a.im[ik] * v.im[kj];
        im += v.re[ik] * a.im[kj] + v.im[ik] * a.re[kj] - a.re[ik] * v.im[kj] - a.im[ik] * v.re[kj];
      }
      out.re[i * n + j] = re;
      out.im[i * n + j] = im;
    }
  }
}

/** out += weight × the gradient in ρ of <X,[ρ]X>, Hermitian, blocks only. */
function addNormGradient(
  out: Parts,
  { left, right }: MeanTable,
  x: Parts,
  weight: number,
  n: number,
  blockOf: Int32Array,
): void {
  const { re: xr, im: xi } = x;
  for (let a = 0; a < n; a++) {
    for (let c = a; c < n; c++) {
      if (blockOf[a] !== blockOf[c]) continue;
      let re = 0;
      let im = 0;
      for (let b = 0; b < n; b++) {
        const t = left[(a * n + c) * n + b];
        const ab = a * n + b;
        const cb = c * n + b;
        re += t * (xr[ab] * xr[cb] + xi[ab] * xi[cb]);
        im += t * (xi[ab] * xr[cb] - xr[ab] * xi[cb]);
        const s = right[(b * n + a) * n + c];
        const bc = b * n + c;
        const ba = b * n + a;
        re += s * (xr[bc] * xr[ba] + xi[bc] * xi[ba]);
        im += s * (xi[bc] * xr[ba] - xr[bc] * xi[ba]);
      }
      out.re[a * n + c] += weight * re;
      out.im[a * n + c] += weight * im;
      if (a === c) continue;
      out.re[c * n + a] += weight * re;
      out.im[c * n + a] -= weight * im;
    }
  }
}

/** out += weight × the Hermitian part, blocks only, of the gradient in ρ of Re <X,[ρ]Y>. */
function addFormGradient(
  out: Parts,
  table: MeanTable,
  x: Parts,
  y: Parts,
  weight: number,
  n: number,
  blockOf: Int32Array,
): void {
  const { left, right } = table;
  const half = weight / 2;
  for (let a = 0; a < n; a++) {
    for (let c = 0; c < n; c++) {
      if (blockOf[a] !== blockOf[c]) continue;
      let re = 0;
      let im = 0;
      for (let b = 0; b < n; b++) {
        const t = left[(a * n + c) * n + b];
        const ab = a * n + b;
        const cb = c * n + b;
        re += t * (x.re[ab] * y.re[cb] + x.im[ab] * y.im[cb]);
        im += t * (x.im[ab] * y.re[cb] - x.re[ab] * y.im[cb]);
        const s = right[(b * n + a) * n + c];
        const bc = b * n + c;
        const ba = b * n + a;
        re += s * (x.re[bc] * y.re[ba] + x.im[bc] * y.im[ba]);
        im += s * (x.im[bc] * y.re[ba] - x.re[bc] * y.im[ba]);
      }
      out.re[a * n + c] += half * re;
      out.im[a * n + c] += half * im;
      out.re[c * n + a] += half * re;
      out.im[c * n + a] -= half * im;
    }
  }
}

function addScaled(out: Parts, x: Parts, c: number): void {
  for (let p = 0; p < out.re.length; p++) {
    out.re[p] += c * x.re[p];
    out.im[p] += c * x.im[p];
  }
}

function clear(x: Parts): void {
  x.re.fill(0);
  x.im.fill(0);
}
