import {
  type ComplexIntervalMatrix,
  addComplexMatrix,
  adjointComplexMatrix,
  complexIntervalZeros,
  entryAt,
  scaleComplexMatrix,
  setEntry,
  subComplexMatrix,
} from './interval-matrix.js';
import { scaleComplex } from './complex-interval.js';
import { multiplyTightly } from './interval-product.js';
import { type Interval, add, point } from './interval.js';

/** A jump in the frame of the state, with the enclosure of its weight e^{−ω/2}. */
export interface RotatedJump {
  readonly matrix: ComplexIntervalMatrix;
  readonly weight: Interval;
}

/** L(A) = −Σ_j w_j(V_j*[V_j,A] + [V_j,A*]*V_j) on the blocks: through commutators, multiples of 1 in A cost nothing. */
export function encloseGenerator(
  blocks: readonly number[],
  jumps: readonly RotatedJump[],
  a: ComplexIntervalMatrix,
): ComplexIntervalMatrix {
  const adjointA = adjointComplexMatrix(a);
  let sum = complexIntervalZeros(a.rows);
  for (const { matrix: v, weight } of jumps) {
    const first = multiplyTightly(adjointComplexMatrix(v), commutator(v, a));
    const second = multiplyTightly(adjointComplexMatrix(commutator(v, adjointA)), v);
    sum = subComplexMatrix(sum, scaleComplexMatrix(addComplexMatrix(first, second), weight));
  }
  return onBlocks(blocks, sum);
}

/** L†(diag λ) = Σ_j w_j(2V_j diag(λ) V_j* − {V_j*V_j, diag(λ)}) on the blocks. */
export function encloseDualAtDiagonal(
  blocks: readonly number[],
  jumps: readonly RotatedJump[],
  lambda: readonly Interval[],
): ComplexIntervalMatrix {
  const n = lambda.length;
  let sum = complexIntervalZeros(n);
  for (const { matrix: v, weight } of jumps) {
    const adjointV = adjointComplexMatrix(v);
    const gain = multiplyTightly(
      byColumns(v, (_, b) => lambda[b]),
      adjointV,
    );
    const loss = byColumns(multiplyTightly(adjointV, v), (a, b) => add(lambda[a], lambda[b]));
    sum = addComplexMatrix(sum, scaleComplexMatrix(subComplexMatrix(scaleComplexMatrix(gain, TWO), loss), weight));
  }
  return onBlocks(blocks, sum);
}

const TWO = point(2);

/** The matrix of x_ab·f(a,b). */
function byColumns(x: ComplexIntervalMatrix, f: (a: number, b: number) => Interval): ComplexIntervalMatrix {
  const out = complexIntervalZeros(x.rows, x.cols);
  for (let a = 0; a < x.rows; a++) {
    for (let b = 0; b < x.cols; b++) setEntry(out, a, b, scaleComplex(entryAt(x, a, b), f(a, b)));
  }
  return out;
}

/** VA − AV. */
export function commutator(v: ComplexIntervalMatrix, a: ComplexIntervalMatrix): ComplexIntervalMatrix {
  return subComplexMatrix(multiplyTightly(v, a), multiplyTightly(a, v));
}

/** The entries inside the blocks, the rest zero. */
function onBlocks(blocks: readonly number[], x: ComplexIntervalMatrix): ComplexIntervalMatrix {
  const out = complexIntervalZeros(x.rows);
  let start = 0;
  for (const size of blocks) {
    for (let i = start; i < start + size; i++) {
      for (let j = start; j < start + size; j++) setEntry(out, i, j, entryAt(x, i, j));
    }
    start += size;
  }
  return out;
}
