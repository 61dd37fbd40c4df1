import { encloseEigenvalues } from '../checker/arithmetic/eigenvalue-enclosure.js';
import { complexIntervalZeros, setEntry } from '../checker/arithmetic/interval-matrix.js';
import { type Interval, ZERO, add, hull, mul, point, sub } from '../checker/arithmetic/interval.js';
import { addUp, mulUp, subUp } from '../checker/arithmetic/rounding.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import { AXIS_ROOM, NEAR_AXES } from './limits.js';
import type { Symmetric3 } from './tracial-qubit-forms.js';

/** C of a tracial qubit in its principal axes, and how many angles of the state's axis matter. */
export interface QubitAxes {
  readonly body: Symmetric3<Interval>;
  readonly angles: 0 | 1 | 2;
}

/**
 * C = Re Σ_j v_jv_j* for V_j = v_j·σ of the canonical form, turned to its principal axes, where it is the diagonal of its eigenvalues.
 * These are enclosed and widened by AXIS_ROOM·Tr C and the residual of the canonical form, so that the rounding of the extraction is
 * covered. Eigenvalues that nearly agree, a ≤ c_i ≤ b, are taken together: in any axes their part of C has diagonal entries in
 * [a,b] and others up to (b−a)/2. Null for other algebras, and when C has rank one: not primitive.
 */
export function qubitAxes({ algebra, jumps, residual }: CanonicalForm): QubitAxes | null {
  if (algebra.blocks.length !== 1 || algebra.size !== 2) return null;
  const matrix = complexIntervalZeros(3);
  const entries = new Array<Interval>(9).fill(ZERO);
  for (const jump of jumps) {
    const v = blochParts(jump.matrix.re, jump.matrix.im);
    for (let at = 0; at < 9; at++) {
      const [a, b] = [v[Math.floor(at / 3)], v[at % 3]];
      entries[at] = add(entries[at], add(mul(a.re, b.re), mul(a.im, b.im)));
    }
  }
  entries.forEach((re, at) => setEntry(matrix, Math.floor(at / 3), at % 3, { re, im: ZERO }));
  const trace = add(add(entries[0], entries[4]), entries[8]).hi;
  const room = mulUp(trace, addUp(AXIS_ROOM, mulUp(8, residual)));
  const [low, middle, high] = encloseEigenvalues(matrix).map((c) => add(c, { lo: -room, hi: room }));
  if (!(middle.lo > 0)) return null;
  const same = (a: Interval, b: Interval): boolean => subUp(hull(a, b).hi, hull(a, b).lo) <= NEAR_AXES * trace;
  if (same(low, high)) return together([hull(low, high), hull(low, high), hull(low, high)], 0);
  if (same(low, middle)) return together([hull(low, middle), hull(low, middle), high], 1);
  if (same(middle, high)) return together([hull(middle, high), hull(middle, high), low], 1);
  return together([low, middle, high], 2);
}

/** v with V = v·σ up to a multiple of 1. */
function blochParts(re: Float64Array, im: Float64Array): { re: Interval; im: Interval }[] {
  const half = (x: number, y: number, sign: 1 | -1): Interval =>
    mul(point(0.5), sign > 0 ? add(point(x), point(y)) : sub(point(x), point(y)));
  return [
    { re: half(re[1], re[2], 1), im: half(im[1], im[2], 1) },
    { re: half(im[2], im[1], -1), im: half(re[1], re[2], -1) },
    { re: half(re[0], re[3], -1), im: half(im[0], im[3], -1) },
  ];
}

/** The matrix in the principal axes; where fewer angles matter, with room for turns among the eigenvalues taken together. */
function together([a, b, c]: readonly Interval[], angles: 0 | 1 | 2): QubitAxes {
  const reach = subUp(a.hi, a.lo) / 2;
  const room: Interval = { lo: -reach, hi: reach };
  const pair = angles < 2 ? room : ZERO;
  const third = angles < 1 ? room : ZERO;
  return { body: [a, pair, third, pair, b, third, third, third, c], angles };
}
