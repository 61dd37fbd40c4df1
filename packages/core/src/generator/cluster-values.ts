/**
 * Each value replaced by the middle of its cluster; sorted values are split where neighbours differ by more than the tolerance.
 * A list that is symmetric under change of sign stays exactly so (a running mean would not).
 */
export function clusterMiddles(values: Float64Array, tolerance: number): Float64Array {
  const order = Array.from(values.keys()).sort((a, b) => values[a] - values[b]);
  const out = new Float64Array(values.length);
  let start = 0;
  for (let k = 1; k <= order.length; k++) {
    if (k < order.length && values[order[k]] - values[order[k - 1]] <= tolerance) continue;
    const middle = (values[order[start]] + values[order[k - 1]]) / 2;
    for (let at = start; at < k; at++) out[order[at]] = middle;
    start = k;
  }
  return out;
}
