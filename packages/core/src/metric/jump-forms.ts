import type { MatrixUnits } from '../algebra/matrix-units.js';
import type { MeanTable } from './mean-table.js';

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/**
 * Add one jump to the D×D tensor T of jumps of equal frequency, T[(k,l),(a,b)] = Σ_j w_j conj(V_ka) V_lb over matrix units: the
 * form of A ↦ Σ w V*AV. All forms of those jumps are contractions of it, at no cost that grows with their number.
 */
export function addJumpTensor(tensor: Parts, units: MatrixUnits, v: Parts, w: number): void {
  const { size: n, count: d, row, col } = units;
  const { re: vr, im: vi } = v;
  const { re, im } = tensor;
  for (let q = 0, at = 0; q < d; q++) {
    const k = row[q] * n;
    const l = col[q] * n;
    for (let p = 0; p < d; p++, at++) {
      const xr = w * vr[k + row[p]];
      const xi = -w * vi[k + row[p]];
      const yr = vr[l + col[p]];
      const yi = vi[l + col[p]];
      re[at] += xr * yr - xi * yi;
      im[at] += xr * yi + xi * yr;
    }
  }
}

/**
 * Add the jumps of one frequency and their adjoints, e^{∓ω/2} each, to the tensor of A ↦ Σ e^{−ω/2}V*AV; T holds one jump of
 * each pair with weight two. The adjoints have the tensor T[(b,a),(l,k)] at (k,l), (a,b).
 */
export function addPairedTensor(out: Parts, units: MatrixUnits, tensor: Parts, omega: number): void {
  const { count: d, adjoint } = units;
  const w = Math.exp(-omega / 2) / 2;
  const mirrored = Math.exp(omega / 2) / 2;
  for (let q = 0, at = 0; q < d; q++) {
    for (let p = 0; p < d; p++, at++) {
      const other = adjoint[p] * d + adjoint[q];
      out.re[at] += w * tensor.re[at] + mirrored * tensor.re[other];
      out.im[at] += w * tensor.im[at] + mirrored * tensor.im[other];
    }
  }
}

/** L(A) = Σ e^{−ω/2}(2V*AV − {V*V,A}) as a D×D matrix over units, and K = Σ e^{−ω/2}V*V (N×N), from the tensor of the first sum. */
export function generatorFromTensor(out: Parts, square: Parts, units: MatrixUnits, tensor: Parts): void {
  const { size: n, count: d, row, col, index } = units;
  square.re.fill(0);
  square.im.fill(0);
  for (let k = 0; k < n; k++) {
    const at = index[k * n + k] * d;
    for (let p = 0; p < d; p++) {
      square.re[row[p] * n + col[p]] += tensor.re[at + p];
      square.im[row[p] * n + col[p]] += tensor.im[at + p];
    }
  }
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      let re = 2 * tensor.re[q * d + p];
      let im = 2 * tensor.im[q * d + p];
      if (col[p] === col[q]) {
        re -= square.re[row[p] * n + row[q]];
        im -= square.im[row[p] * n + row[q]];
      }
      if (row[p] === row[q]) {
        re -= square.re[col[q] * n + col[p]];
        im -= square.im[col[q] * n + col[p]];
      }
      out.re[p * d + q] = re;
      out.im[p * d + q] = im;
    }
  }
}

/** η = L†ρ (N×N) at ρ = diag λ: 2 Σ_k λ_k Σ w V_ak conj(V_bk) − (λ_a + λ_b) K_ab, from the same tensor and K. */
export function flowFromTensor(
  eta: Parts,
  units: MatrixUnits,
  tensor: Parts,
  square: Parts,
  lambda: Float64Array,
): void {
  const { size: n, count: d, row, col, index, adjoint } = units;
  for (let p = 0; p < d; p++) {
    const at = adjoint[p] * d;
    let re = 0;
    let im = 0;
    for (let k = 0; k < n; k++) {
      re += lambda[k] * tensor.re[at + index[k * n + k]];
      im += lambda[k] * tensor.im[at + index[k * n + k]];
    }
    const here = row[p] * n + col[p];
    const sum = lambda[row[p]] + lambda[col[p]];
    eta.re[here] = 2 * re - sum * square.re[here];
    eta.im[here] = 2 * im - sum * square.im[here];
  }
}

/**
 * Add the metric form and ½<∂A,D[ρ;η]∂A> of the jumps in a tensor, over matrix units. ∂A = VA − AV, so each is a sum of terms
 * with V from the left twice (one column), from the right twice (one row), and one of each (crossed). forms = [metricRe,
 * metricIm, curvatureRe, curvatureIm]; work holds 2D numbers.
 */
export function addJumpForms(
  forms: readonly Float64Array[],
  units: MatrixUnits,
  tensor: Parts,
  table: MeanTable,
  eta: Parts,
  work: Float64Array,
): void {
  columnTerms(forms, units, tensor, table, eta, work);
  rowTerms(forms, units, tensor, table, eta, work);
  crossedTerms(forms, units, tensor, table, eta);
  derivativeTerms(forms, units, tensor, table, eta);
}

/** At (a,b), (c,b): Σ_k F_kb T[(k,k),(a,c)] and ½ Σ_km η_km T1_kmb T[(k,m),(a,c)]. */
function columnTerms(
  [gr, gi, qr, qi]: readonly Float64Array[],
  { size: n, count: d, row, col, index, blockOf }: MatrixUnits,
  { re: tr, im: ti }: Parts,
  { f, left }: MeanTable,
  { re: er, im: ei }: Parts,
  work: Float64Array,
): void {
  for (let b = 0; b < n; b++) {
    for (let q = 0; q < d; q++) {
      const at = row[q] * n + col[q];
      work[q] = er[at] * left[at * n + b];
      work[d + q] = ei[at] * left[at * n + b];
    }
    for (let p = 0; p < d; p++) {
      if (blockOf[row[p]] !== blockOf[b]) continue;
      let g0 = 0;
      let g1 = 0;
      for (let k = 0; k < n; k++) {
        const at = index[k * n + k] * d + p;
        g0 += f[k * n + b] * tr[at];
        g1 += f[k * n + b] * ti[at];
      }
      let q0 = 0;
      let q1 = 0;
      for (let q = 0, at = p; q < d; q++, at += d) {
        q0 += work[q] * tr[at] - work[d + q] * ti[at];
        q1 += work[q] * ti[at] + work[d + q] * tr[at];
      }
      const at = index[row[p] * n + b] * d + index[col[p] * n + b];
      gr[at] += g0;
      gi[at] += g1;
      qr[at] += q0 / 2;
      qi[at] += q1 / 2;
    }
  }
}

/** At (a,b), (a,e): Σ_l F_al T[(b,e),(l,l)] and ½ Σ_lm η_ml T2_aml T[(b,e),(l,m)]. */
function rowTerms(
  [gr, gi, qr, qi]: readonly Float64Array[],
  { size: n, count: d, row, col, index, blockOf }: MatrixUnits,
  { re: tr, im: ti }: Parts,
  { f, right }: MeanTable,
  { re: er, im: ei }: Parts,
  work: Float64Array,
): void {
  for (let a = 0; a < n; a++) {
    for (let p = 0; p < d; p++) {
      const at = col[p] * n + row[p];
      work[p] = er[at] * right[a * n * n + at];
      work[d + p] = ei[at] * right[a * n * n + at];
    }
    for (let q = 0; q < d; q++) {
      if (blockOf[row[q]] !== blockOf[a]) continue;
      let g0 = 0;
      let g1 = 0;
      for (let l = 0; l < n; l++) {
        const at = q * d + index[l * n + l];
        g0 += f[a * n + l] * tr[at];
        g1 += f[a * n + l] * ti[at];
      }
      let q0 = 0;
      let q1 = 0;
      for (let p = 0, at = q * d; p < d; p++, at++) {
        q0 += work[p] * tr[at] - work[d + p] * ti[at];
        q1 += work[p] * ti[at] + work[d + p] * tr[at];
      }
      const at = index[a * n + row[q]] * d + index[a * n + col[q]];
      gr[at] += g0;
      gi[at] += g1;
      qr[at] += q0 / 2;
      qi[at] += q1 / 2;
    }
  }
}

/** At p = (a,b), q = (c,e), and conjugated at q, p: −F_cb T[q,p] and −½(Σ_k η_kc T1_kcb T[(k,e),p] + Σ_m η_mb T2_cmb T[q,(a,m)]). */
function crossedTerms(
  [gr, gi, qr, qi]: readonly Float64Array[],
  { size: n, count: d, row, col, index, blockOf }: MatrixUnits,
  { re: tr, im: ti }: Parts,
  { f, left, right }: MeanTable,
  { re: er, im: ei }: Parts,
): void {
  for (let q = 0; q < d; q++) {
    const c = row[q];
    const e = col[q];
    for (let p = 0; p < d; p++) {
      const a = row[p];
      const b = col[p];
      const here = q * d + p;
      const mirror = p * d + q;
      const g0 = f[c * n + b] * tr[here];
      const g1 = f[c * n + b] * ti[here];
      gr[mirror] -= g0;
      gi[mirror] -= g1;
      gr[here] -= g0;
      gi[here] += g1;
      let q0 = 0;
      let q1 = 0;
      for (let k = 0; k < n; k++) {
        if (blockOf[k] === blockOf[c]) {
          const t = left[(k * n + c) * n + b];
          const at = index[k * n + e] * d + p;
          const xr = t * er[k * n + c];
          const xi = t * ei[k * n + c];
          q0 += xr * tr[at] - xi * ti[at];
          q1 += xr * ti[at] + xi * tr[at];
        }
        if (blockOf[k] === blockOf[b]) {
          const t = right[(c * n + k) * n + b];
          const at = q * d + index[a * n + k];
          const xr = t * er[k * n + b];
          const xi = t * ei[k * n + b];
          q0 += xr * tr[at] - xi * ti[at];
          q1 += xr * ti[at] + xi * tr[at];
        }
      }
      qr[mirror] -= q0 / 2;
      qi[mirror] -= q1 / 2;
      qr[here] -= q0 / 2;
      qi[here] += q1 / 2;
    }
  }
}

/** At (a,b), (c,e) in one block: ½(η_ac Σ_m T1_acm T[(b,e),(m,m)] + η_eb Σ_k T2_keb T[(k,k),(a,c)]). */
function derivativeTerms(
  [, , qr, qi]: readonly Float64Array[],
  { size: n, count: d, row, col, index, blockOf }: MatrixUnits,
  { re: tr, im: ti }: Parts,
  { left, right }: MeanTable,
  { re: er, im: ei }: Parts,
): void {
  for (let p = 0; p < d; p++) {
    const a = row[p];
    const b = col[p];
    for (let q = 0; q < d; q++) {
      const c = row[q];
      const e = col[q];
      if (blockOf[a] !== blockOf[c]) continue;
      const be = index[b * n + e] * d;
      const ac = index[a * n + c];
      let x0 = 0;
      let x1 = 0;
      let y0 = 0;
      let y1 = 0;
      for (let m = 0; m < n; m++) {
        const unit = index[m * n + m];
        const t = left[(a * n + c) * n + m];
        x0 += t * tr[be + unit];
        x1 += t * ti[be + unit];
        const s = right[(m * n + e) * n + b];
        y0 += s * tr[unit * d + ac];
        y1 += s * ti[unit * d + ac];
      }
      const xr = er[a * n + c];
      const xi = ei[a * n + c];
      const yr = er[e * n + b];
      const yi = ei[e * n + b];
      qr[p * d + q] += (xr * x0 - xi * x1 + yr * y0 - yi * y1) / 2;
      qi[p * d + q] += (xr * x1 + xi * x0 + yr * y1 + yi * y0) / 2;
    }
  }
}
