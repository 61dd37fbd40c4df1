import { encloseSmallestPencil } from '../checker/arithmetic/pencil-enclosure.js';
import {
  type ComplexIntervalMatrix,
  complexIntervalZeros,
  entryAt,
  setEntry,
} from '../checker/arithmetic/interval-matrix.js';
import { scaleComplex } from '../checker/arithmetic/complex-interval.js';
import { type Interval, add, div, mul, neg, point, sqrt, sub } from '../checker/arithmetic/interval.js';
import type { Structure } from '../structure/structure.js';
import { attempt } from './attempt.js';
import { type FixedClasses, complement, fixedClasses } from './fixed-classes.js';
import { encloseOnUnits } from './generator-enclosure.js';
import { modelBox } from './model-box.js';
import { jumpsInFrame } from './rotated-jumps.js';

/**
 * Enclosure of the gap over the box of the model (`modelBox`); null where there is none. In the eigenbasis of σ, with
 * w_p = √(σ_kσ_l) for e_p = e_kl, the gap is the smallest λ with −w_pL_pq x = λ B x on a complement of the fixed points, B being
 * the square of the distance to them: B_pq = w_pδ_pq − w_pw_q/Σ_{C}w for p, q of one class C of them, and w_pδ_pq elsewhere.
 */
export function encloseGap(structure: Structure): Interval | null {
  const box = modelBox(structure);
  const classes = box && fixedClasses(structure, box.frame);
  if (!box || !classes || classes.count === classes.units.count) return null;
  const { row, col } = classes.units;
  const weights = Array.from(row, (k, p) => sqrt(mul(box.weights[k], box.weights[col[p]])));
  const kept = complement(classes, (p) => weights[p].hi);
  const onUnits = encloseOnUnits({ jumps: jumpsInFrame(box), hamiltonian: null }, classes.units);
  // Units are scaled by doubles near w^{-1/2}, which changes both forms alike.
  const scales = weights.map((w) => point(1 / Math.sqrt(w.hi)));
  const m = kept.length;
  const form = complexIntervalZeros(m);
  kept.forEach((p, i) => {
    kept.forEach((q, j) => {
      const factor = neg(mul(mul(scales[p], scales[q]), weights[p]));
      setEntry(form, i, j, scaleComplex(entryAt(onUnits, p, q), factor));
    });
  });
  return attempt(() => encloseSmallestPencil(form, distanceForm(classes, kept, weights, scales)));
}

function distanceForm(
  { classOf, count }: FixedClasses,
  kept: readonly number[],
  weights: readonly Interval[],
  scales: readonly Interval[],
): ComplexIntervalMatrix {
  const totals = new Array<Interval>(count).fill(point(0));
  classOf.forEach((c, p) => {
    if (c >= 0) totals[c] = add(totals[c], weights[p]);
  });
  const out = complexIntervalZeros(kept.length);
  kept.forEach((p, i) => {
    kept.forEach((q, j) => {
      let entry = p === q ? weights[p] : point(0);
      const c = classOf[p];
      if (c >= 0 && c === classOf[q]) entry = sub(entry, div(mul(weights[p], weights[q]), totals[c]));
      setEntry(out, i, j, { re: mul(mul(scales[p], scales[q]), entry), im: point(0) });
    });
  });
  return out;
}
