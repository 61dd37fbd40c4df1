import type { MeanTable } from './mean-table.js';
import type { MatrixUnits } from '../algebra/matrix-units.js';

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** Add w(2 V*AV − {V*V,A}) on matrix units to the D×D complex matrix of the generator; scratch holds 2N² numbers. */
export function addGeneratorUnits(out: Parts, units: MatrixUnits, v: Parts, w: number, scratch: Float64Array): void {
  const { size: n, count: d, row, col } = units;
  const { re: vr, im: vi } = v;
  const sr = scratch.subarray(0, n * n);
  const si = scratch.subarray(n * n, 2 * n * n);
  for (let a = 0; a < n; a++) {
    for (let c = 0; c < n; c++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        re += vr[k * n + a] * vr[k * n + c] + vi[k * n + a] * vi[k * n + c];
        im += vr[k * n + a] * vi[k * n + c] - vi[k * n + a] * vr[k * n + c];
      }
      sr[a * n + c] = w * re;
      si[a * n + c] = w * im;
    }
  }
  for (let p = 0; p < d; p++) {
    const a = row[p];
    const b = col[p];
    for (let q = 0; q < d; q++) {
      const c = row[q];
      const e = col[q];
      const xr = vr[c * n + a];
      const xi = -vi[c * n + a];
      const yr = vr[e * n + b];
      const yi = vi[e * n + b];
      let re = 2 * w * (xr * yr - xi * yi);
      let im = 2 * w * (xr * yi + xi * yr);
      if (b === e) {
        re -= sr[a * n + c];
        im -= si[a * n + c];
      }
      if (a === c) {
        re -= sr[e * n + b];
        im -= si[e * n + b];
      }
      out.re[p * d + q] += re;
      out.im[p * d + q] += im;
    }
  }
}

/**
 * Add one jump's part of the metric form and of ½<∂A,D[ρ;η]∂A> over matrix units.
 * ∂e_ab = Σ_k V_ka e_kb − Σ_l V_bl e_al has at most 2N entries; the eight products of two such terms are summed
 * with the index that stays fixed (b, then a) outermost. forms = [metricRe, metricIm, curvatureRe, curvatureIm].
 */
export function addJumpForms(
  forms: readonly Float64Array[],
  units: MatrixUnits,
  v: Parts,
  table: MeanTable,
  eta: Parts,
  weight: number,
  scratch: Float64Array,
): void {
  columnTerms(forms, units, v, table, eta, weight, scratch);
  rowTerms(forms, units, v, table, eta, weight, scratch);
}

/** Terms in which the first factor is Σ_k V_ka e_kb: b fixed. */
// eslint-disable-next-line max-lines-per-function -- a numeric kernel whose loops share their products
function columnTerms(
  forms: readonly Float64Array[],
  units: MatrixUnits,
  v: Parts,
  table: MeanTable,
  eta: Parts,
  weight: number,
  scratch: Float64Array,
): void {
  const [gr, gi, qr, qi] = forms;
  const { size: n, count: d, index, blockOf } = units;
  const { re: vr, im: vi } = v;
  const { re: er, im: ei } = eta;
  const { f, left, right } = table;
  const wr = scratch.subarray(0, n * n);
  const wi = scratch.subarray(n * n, 2 * n * n);
  const xr = scratch.subarray(2 * n * n, 3 * n * n);
  const xi = scratch.subarray(3 * n * n, 4 * n * n);
  const half = weight / 2;
  for (let b = 0; b < n; b++) {
    // W[a,m] = Σ_k conj(V_ka) η_km T1_kmb and X[e,c] = Σ_m V_em η_mb T2_cmb.
    for (let a = 0; a < n; a++) {
      for (let m = 0; m < n; m++) {
        let re = 0;
        let im = 0;
        let re2 = 0;
        let im2 = 0;
        for (let k = 0; k < n; k++) {
          const t = left[(k * n + m) * n + b];
          const yr = t * er[k * n + m];
          const yi = t * ei[k * n + m];
          const cr = vr[k * n + a];
          const ci = -vi[k * n + a];
          re += cr * yr - ci * yi;
          im += cr * yi + ci * yr;
          const s = right[(m * n + k) * n + b];
          const zr = s * er[k * n + b];
          const zi = s * ei[k * n + b];
          const ar = vr[a * n + k];
          const ai = vi[a * n + k];
          re2 += ar * zr - ai * zi;
          im2 += ar * zi + ai * zr;
        }
        wr[a * n + m] = re;
        wi[a * n + m] = im;
        xr[a * n + m] = re2;
        xi[a * n + m] = im2;
      }
    }
    for (let a = 0; a < n; a++) {
      const p = index[a * n + b];
      if (p < 0) continue;
      for (let c = 0; c < n; c++) {
        // Same column: Σ_k conj(V_ka) F_kb V_kc and Σ_m W[a,m] V_mc.
        const same = index[c * n + b];
        if (same >= 0) {
          let g0 = 0;
          let g1 = 0;
          let q0 = 0;
          let q1 = 0;
          for (let k = 0; k < n; k++) {
            const ur = vr[k * n + c];
            const ui = vi[k * n + c];
            const fr = f[k * n + b] * vr[k * n + a];
            const fi = -f[k * n + b] * vi[k * n + a];
            g0 += fr * ur - fi * ui;
            g1 += fr * ui + fi * ur;
            q0 += wr[a * n + k] * ur - wi[a * n + k] * ui;
            q1 += wr[a * n + k] * ui + wi[a * n + k] * ur;
          }
          gr[p * d + same] += weight * g0;
          gi[p * d + same] += weight * g1;
          qr[p * d + same] += half * q0;
          qi[p * d + same] += half * q1;
        }
        const hr = vr[c * n + a];
        const hi = -vi[c * n + a];
        const fr = f[c * n + b] * hr;
        const fi = f[c * n + b] * hi;
        for (let e = 0; e < n; e++) {
          const q = index[c * n + e];
          if (q < 0) continue;
          // Crossed: −conj(V_ca) F_cb V_eb, −W[a,c] V_eb, −conj(V_ca) X[e,c].
          const ur = vr[e * n + b];
          const ui = vi[e * n + b];
          gr[p * d + q] -= weight * (fr * ur - fi * ui);
          gi[p * d + q] -= weight * (fr * ui + fi * ur);
          const kr = xr[e * n + c];
          const ki = xi[e * n + c];
          let q0 = -(wr[a * n + c] * ur - wi[a * n + c] * ui) - (hr * kr - hi * ki);
          let q1 = -(wr[a * n + c] * ui + wi[a * n + c] * ur) - (hr * ki + hi * kr);
          // Both in columns: η_eb Σ_k conj(V_ka) T2_keb V_kc.
          if (blockOf[e] === blockOf[b]) {
            let s0 = 0;
            let s1 = 0;
            for (let k = 0; k < n; k++) {
              const t = right[(k * n + e) * n + b];
              const ar = t * vr[k * n + a];
              const ai = -t * vi[k * n + a];
              s0 += ar * vr[k * n + c] - ai * vi[k * n + c];
              s1 += ar * vi[k * n + c] + ai * vr[k * n + c];
            }
            const yr = er[e * n + b];
            const yi = ei[e * n + b];
            q0 += yr * s0 - yi * s1;
            q1 += yr * s1 + yi * s0;
          }
          qr[p * d + q] += half * q0;
          qi[p * d + q] += half * q1;
        }
      }
    }
  }
}

/** Terms in which the first factor is −Σ_l V_bl e_al: a fixed. */
// eslint-disable-next-line max-lines-per-function -- a numeric kernel whose loops share their products
function rowTerms(
  forms: readonly Float64Array[],
  units: MatrixUnits,
  v: Parts,
  table: MeanTable,
  eta: Parts,
  weight: number,
  scratch: Float64Array,
): void {
  const [gr, gi, qr, qi] = forms;
  const { size: n, count: d, index, blockOf } = units;
  const { re: vr, im: vi } = v;
  const { re: er, im: ei } = eta;
  const { f, left, right } = table;
  const zr = scratch.subarray(0, n * n);
  const zi = scratch.subarray(n * n, 2 * n * n);
  const yr = scratch.subarray(2 * n * n, 3 * n * n);
  const yi = scratch.subarray(3 * n * n, 4 * n * n);
  const half = weight / 2;
  for (let a = 0; a < n; a++) {
    // Z[e,c] = Σ_m η_am T1_ame V_mc and Y[b,m] = Σ_l conj(V_bl) η_ml T2_aml.
    for (let e = 0; e < n; e++) {
      for (let c = 0; c < n; c++) {
        let re = 0;
        let im = 0;
        let re2 = 0;
        let im2 = 0;
        for (let m = 0; m < n; m++) {
          const t = left[(a * n + m) * n + e];
          const hr = t * er[a * n + m];
          const hi = t * ei[a * n + m];
          const ur = vr[m * n + c];
          const ui = vi[m * n + c];
          re += hr * ur - hi * ui;
          im += hr * ui + hi * ur;
          const s = right[(a * n + c) * n + m];
          const kr = s * er[c * n + m];
          const ki = s * ei[c * n + m];
          const cr = vr[e * n + m];
          const ci = -vi[e * n + m];
          re2 += cr * kr - ci * ki;
          im2 += cr * ki + ci * kr;
        }
        zr[e * n + c] = re;
        zi[e * n + c] = im;
        yr[e * n + c] = re2;
        yi[e * n + c] = im2;
      }
    }
    for (let b = 0; b < n; b++) {
      const p = index[a * n + b];
      if (p < 0) continue;
      for (let e = 0; e < n; e++) {
        // Same row: Σ_l conj(V_bl) F_al V_el and Σ_m Y[b,m] V_em.
        const same = index[a * n + e];
        if (same >= 0) {
          let g0 = 0;
          let g1 = 0;
          let q0 = 0;
          let q1 = 0;
          for (let l = 0; l < n; l++) {
            const ur = vr[e * n + l];
            const ui = vi[e * n + l];
            const fr = f[a * n + l] * vr[b * n + l];
            const fi = -f[a * n + l] * vi[b * n + l];
            g0 += fr * ur - fi * ui;
            g1 += fr * ui + fi * ur;
            q0 += yr[b * n + l] * ur - yi[b * n + l] * ui;
            q1 += yr[b * n + l] * ui + yi[b * n + l] * ur;
          }
          gr[p * d + same] += weight * g0;
          gi[p * d + same] += weight * g1;
          qr[p * d + same] += half * q0;
          qi[p * d + same] += half * q1;
        }
        const hr = vr[b * n + e];
        const hi = -vi[b * n + e];
        for (let c = 0; c < n; c++) {
          const q = index[c * n + e];
          if (q < 0) continue;
          // Crossed: −conj(V_be) F_ae V_ac, −conj(V_be) Z[e,c], −V_ac Y[b,e].
          const ur = vr[a * n + c];
          const ui = vi[a * n + c];
          const fr = f[a * n + e] * ur;
          const fi = f[a * n + e] * ui;
          gr[p * d + q] -= weight * (hr * fr - hi * fi);
          gi[p * d + q] -= weight * (hr * fi + hi * fr);
          const kr = zr[e * n + c];
          const ki = zi[e * n + c];
          let q0 = -(hr * kr - hi * ki) - (ur * yr[b * n + e] - ui * yi[b * n + e]);
          let q1 = -(hr * ki + hi * kr) - (ur * yi[b * n + e] + ui * yr[b * n + e]);
          // Both in rows: η_ac Σ_l conj(V_bl) T1_acl V_el.
          if (blockOf[a] === blockOf[c]) {
            let s0 = 0;
            let s1 = 0;
            for (let l = 0; l < n; l++) {
              const t = left[(a * n + c) * n + l];
              const ar = t * vr[b * n + l];
              const ai = -t * vi[b * n + l];
              s0 += ar * vr[e * n + l] - ai * vi[e * n + l];
              s1 += ar * vi[e * n + l] + ai * vr[e * n + l];
            }
            const wr = er[a * n + c];
            const wi = ei[a * n + c];
            q0 += wr * s0 - wi * s1;
            q1 += wr * s1 + wi * s0;
          }
          qr[p * d + q] += half * q0;
          qi[p * d + q] += half * q1;
        }
      }
    }
  }
}
