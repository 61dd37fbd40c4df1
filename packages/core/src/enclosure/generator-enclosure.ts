import type { MatrixUnits } from '../algebra/matrix-units.js';
import {
  type ComplexInterval,
  addComplex,
  conjugateComplex,
  mulComplex,
  scaleComplex,
} from '../checker/arithmetic/complex-interval.js';
import {
  type ComplexIntervalMatrix,
  adjointComplexMatrix,
  complexIntervalZeros,
  entryAt,
  scaleComplexMatrix,
  setEntry,
  subComplexMatrix,
} from '../checker/arithmetic/interval-matrix.js';
import { multiplyTightly } from '../checker/arithmetic/interval-product.js';
import { type Interval, neg, point } from '../checker/arithmetic/interval.js';

/** L(A) = i[H,A] + Σ_m w_m (V_m*AV_m − ½{V_m*V_m,A}), projected to the blocks. */
export interface IntervalGenerator {
  readonly jumps: readonly { readonly matrix: ComplexIntervalMatrix; readonly weight: Interval }[];
  readonly hamiltonian: ComplexIntervalMatrix | null;
}

/** The D×D matrix of L on matrix units: entry (p,q) is the coefficient of e_p in L(e_q). Cost J·D². */
export function encloseOnUnits({ jumps, hamiltonian }: IntervalGenerator, units: MatrixUnits): ComplexIntervalMatrix {
  const { count: d, row, col } = units;
  const drift = driftOf(jumps, hamiltonian, units.size);
  const out = complexIntervalZeros(d);
  for (let p = 0; p < d; p++) {
    const [k, l] = [row[p], col[p]];
    for (let q = 0; q < d; q++) {
      const [a, b] = [row[q], col[q]];
      let sum: ComplexInterval = ZERO_ENTRY;
      for (const { matrix: v, weight } of jumps) {
        const left = entryAt(v, a, k);
        const right = entryAt(v, b, l);
        if (isZero(left) || isZero(right)) continue;
        sum = addComplex(sum, scaleComplex(mulComplex(conjugateComplex(left), right), weight));
      }
      if (a === k) sum = addComplex(sum, entryAt(drift, b, l));
      if (b === l) sum = addComplex(sum, conjugateComplex(entryAt(drift, a, k)));
      setEntry(out, p, q, sum);
    }
  }
  return out;
}

const ZERO_ENTRY: ComplexInterval = { re: point(0), im: point(0) };
const HALF = point(0.5);

function isZero({ re, im }: ComplexInterval): boolean {
  return re.lo === 0 && re.hi === 0 && im.lo === 0 && im.hi === 0;
}

/** Y = −½ Σ w V*V − iH, with which L(A) = Σ w V*AV + AY + Y*A. */
function driftOf(
  jumps: IntervalGenerator['jumps'],
  hamiltonian: ComplexIntervalMatrix | null,
  n: number,
): ComplexIntervalMatrix {
  let drift = complexIntervalZeros(n);
  for (const { matrix, weight } of jumps) {
    const square = scaleComplexMatrix(multiplyTightly(adjointComplexMatrix(matrix), matrix), weight);
    drift = subComplexMatrix(drift, scaleComplexMatrix(square, HALF));
  }
  if (!hamiltonian) return drift;
  const turned = complexIntervalZeros(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const { re, im } = entryAt(hamiltonian, i, j);
      // i(x + iy) = −y + ix.
      setEntry(turned, i, j, { re: neg(im), im: re });
    }
  }
  return subComplexMatrix(drift, turned);
}
