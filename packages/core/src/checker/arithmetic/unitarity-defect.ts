import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import {
  type ComplexIntervalMatrix,
  adjointComplexMatrix,
  complexPointMatrix,
  entryAt,
  setEntry,
} from './interval-matrix.js';
import { type Interval, ONE, sub } from './interval.js';
import { multiplyComplexMatrix, multiplyTightly } from './interval-product.js';
import { hermitianNormBound } from './norm-bound.js';
import { addDown, mulDown, sqrtDown } from './rounding.js';

/** Enclosure of ‖U*U − 1‖₂ for a finite matrix of doubles: from its largest entry to a bound of its norm. */
export function encloseUnitarityDefect(u: ComplexMatrix): Interval {
  const defect = unitarityResidual(u);
  let largest = 0;
  for (let k = 0; k < defect.re.lo.length; k++) {
    const x = Math.max(0, defect.re.lo[k], -defect.re.hi[k]);
    const y = Math.max(0, defect.im.lo[k], -defect.im.hi[k]);
    largest = Math.max(largest, x, y, sqrtDown(addDown(mulDown(x, x), mulDown(y, y))));
  }
  return { lo: largest, hi: hermitianNormBound(defect) };
}

/** U*U − 1. */
function unitarityResidual(u: ComplexMatrix): ComplexIntervalMatrix {
  const x = complexPointMatrix(u);
  const product = u.rows <= TIGHT_SIDE ? multiplyTightly : multiplyComplexMatrix;
  const defect = product(adjointComplexMatrix(x), x);
  for (let i = 0; i < u.cols; i++) {
    const entry = entryAt(defect, i, i);
    setEntry(defect, i, i, { re: sub(entry.re, ONE), im: entry.im });
  }
  return defect;
}

/** Up to this side products are formed entry by entry, which keeps exact cases exact. */
const TIGHT_SIDE = 40;
