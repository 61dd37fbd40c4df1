import type { SparseMatrix } from '../linalg/sparse-matrix.js';
import type { Generator } from './generator.js';

/** An upper bound on ‖L‖ as a map on N×N matrices in the operator norm: 2‖H‖ + 2Σ‖R_m‖² + ‖S‖_F, each bounded in turn. */
export function generatorNormBound(g: Generator): number {
  let bound = g.hamiltonian ? 2 * operatorNormBound(g.hamiltonian) : 0;
  for (const { matrix } of g.jumps) bound += 2 * operatorNormBound(matrix) ** 2;
  if (g.superoperator) bound += Math.sqrt(g.superoperator.reduce((sum, x) => sum + x * x, 0));
  return bound;
}

/** √(‖A‖₁‖A‖_∞) ≥ ‖A‖₂. */
function operatorNormBound(a: SparseMatrix): number {
  const columns = new Float64Array(a.cols);
  let rows = 0;
  for (let i = 0; i < a.rows; i++) {
    let sum = 0;
    for (let p = a.rowStart[i]; p < a.rowStart[i + 1]; p++) {
      const size = Math.hypot(a.re[p], a.im[p]);
      sum += size;
      columns[a.colIndex[p]] += size;
    }
    rows = Math.max(rows, sum);
  }
  return Math.sqrt(rows * columns.reduce((top, x) => Math.max(top, x), 0));
}
