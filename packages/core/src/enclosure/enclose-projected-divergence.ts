import { addComplex, scaleComplex } from '../checker/arithmetic/complex-interval.js';
import { encloseEigenvalues } from '../checker/arithmetic/eigenvalue-enclosure.js';
import {
  type ComplexIntervalMatrix,
  complexIntervalZeros,
  entryAt,
  setEntry,
} from '../checker/arithmetic/interval-matrix.js';
import { log } from '../checker/arithmetic/interval-log.js';
import { type Interval, ZERO, add, div, mul, point, sub } from '../checker/arithmetic/interval.js';
import { amplifiedAlgebra } from '../entropy/amplify.js';
import type { Structure } from '../structure/structure.js';
import type { FramedState } from './enclose-divergence.js';
import { type FixedClasses, fixedClasses } from './fixed-classes.js';
import { encloseFrame, encloseStateMatrix } from './frame-enclosure.js';
import type { ModelBox } from './model-box.js';

/**
 * D(ρ‖E†ρ) = Tr ρ log ρ − Tr E†ρ log E†ρ, in the trace of ρ, for E ⊗ id with E the trace-preserving projection onto fixed points of
 * the kind of `fixedClasses`, which averages over each class. Null for other fixed points and without tracial symmetry.
 */
export function encloseProjectedDivergence(
  structure: Structure,
  { jumps }: ModelBox,
  state: FramedState,
): Interval | null {
  const tracial = jumps.every(({ frequency }) => frequency.lo === 0 && frequency.hi === 0);
  const classes = tracial ? fixedClasses(structure, null) : null;
  if (!classes) return null;
  const { lambda, k } = state;
  const rho = encloseStateMatrix(encloseFrame(state.u, amplifiedAlgebra(structure.algebra, k)), lambda);
  const projected = encloseEigenvalues(averaged(rho, classes, k));
  const own = lambda.reduce((sum, x) => add(sum, entropyTerm(point(x))), ZERO);
  return projected.reduce((sum, x) => sub(sum, entropyTerm(x)), own);
}

/** Entry (p, cd) replaced by its mean over the class of p; zero where p has none. */
function averaged(
  rho: ComplexIntervalMatrix,
  { units, classOf, count }: FixedClasses,
  k: number,
): ComplexIntervalMatrix {
  const out = complexIntervalZeros(rho.rows);
  for (let member = 0; member < count; member++) {
    const members = [...classOf.keys()].filter((p) => classOf[p] === member);
    const share = div(point(1), point(members.length));
    for (let c = 0; c < k; c++) {
      for (let d = 0; d < k; d++) {
        const at = (p: number): [number, number] => [units.row[p] * k + c, units.col[p] * k + d];
        const total = members.reduce((sum, p) => addComplex(sum, entryAt(rho, ...at(p))), { re: ZERO, im: ZERO });
        const mean = scaleComplex(total, share);
        for (const p of members) setEntry(out, ...at(p), mean);
      }
    }
  }
  return out;
}

/** x log x over the part of x that is not negative, as eigenvalues of a state are: it falls to −1/e at 1/e and rises from there. */
function entropyTerm(x: Interval): Interval {
  const low = Math.max(0, x.lo);
  if (!(x.hi > 0)) return ZERO;
  const ends = [low > 0 ? mul(point(low), log(point(low))) : ZERO, mul(point(x.hi), log(point(x.hi)))];
  const bottom = low < INVERSE_E + NEAR && x.hi > INVERSE_E - NEAR ? -INVERSE_E : Infinity;
  return { lo: Math.min(bottom, ends[0].lo, ends[1].lo), hi: Math.max(ends[0].hi, ends[1].hi) };
}

/** 1/e, rounded up, and how near to it an argument counts as being on both sides. */
const INVERSE_E = 0.36787944117144239;
const NEAR = 1e-12;
