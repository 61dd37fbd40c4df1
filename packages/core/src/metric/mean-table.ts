import type { OperatorMean } from './operator-mean.js';

/** F and its divided differences over all pairs and triples of eigenvalues of a state, for one frequency. */
export interface MeanTable {
  /** n×n: F(e^{ω/2}λ_a, e^{−ω/2}λ_b). */
  readonly f: Float64Array;
  /** n×n×n, index (a·n+c)·n+b: (F_ab − F_cb)/(λ_a − λ_c). */
  readonly left: Float64Array;
  /** n×n×n, index (a·n+c)·n+b: (F_ac − F_ab)/(λ_c − λ_b). */
  readonly right: Float64Array;
}

export function emptyMeanTable(n: number): MeanTable {
  return { f: new Float64Array(n * n), left: new Float64Array(n ** 3), right: new Float64Array(n ** 3) };
}

/** Fill the table for eigenvalues λ > 0 (length n) and frequency ω; method of Carlen & Maas (2017), §5, for F = Λ. */
export function fillMeanTable(table: MeanTable, mean: OperatorMean, lambda: Float64Array, omega: number): void {
  const n = lambda.length;
  const up = Math.exp(omega / 2);
  const down = Math.exp(-omega / 2);
  const { f, left, right } = table;
  for (let a = 0; a < n; a++) {
    const x = up * lambda[a];
    for (let b = 0; b < n; b++) f[a * n + b] = mean.value(x, down * lambda[b]);
  }
  // At frequency zero a symmetric mean has the same differences on both sides.
  const same = omega === 0 && mean.symmetric;
  for (let a = 0; a < n; a++) {
    for (let c = a; c < n; c++) {
      for (let b = 0; b < n; b++) {
        const l =
          up * mean.firstDifference(up * lambda[a], up * lambda[c], down * lambda[b], f[a * n + b], f[c * n + b]);
        left[(a * n + c) * n + b] = l;
        left[(c * n + a) * n + b] = l;
        const r = same
          ? l
          : down *
            mean.secondDifference(up * lambda[b], down * lambda[a], down * lambda[c], f[b * n + a], f[b * n + c]);
        right[(b * n + a) * n + c] = r;
        right[(b * n + c) * n + a] = r;
      }
    }
  }
}
