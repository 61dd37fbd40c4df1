import type { RingModel } from './ring-model.js';
import {
  type SparseOperator,
  addEntry,
  addProduct,
  addScaled,
  emptyOperator,
  isEmpty,
  product,
} from './sparse-operator.js';

/** Matrix units e_ab of the algebra. */
export function unitsOf({ algebra }: Pick<RingModel<unknown>, 'algebra'>): [number, number][] {
  const out: [number, number][] = [];
  for (let a = 0; a < algebra.size; a++) {
    for (let b = 0; b < algebra.size; b++) if (algebra.blockOf[a] === algebra.blockOf[b]) out.push([a, b]);
  }
  return out;
}

/** L(e_ab) = Σ rate (W*e_abW − ½{W*W, e_ab}). */
export function imageOfUnit<T>({ ring, algebra, jumps, drift }: RingModel<T>, a: number, b: number): SparseOperator<T> {
  const out = emptyOperator<T>(algebra.size);
  const minusHalf = ring.of(-0.5, 0);
  // W*e_abW has the entries conj(W_ai) W_bj.
  for (const { w, rate } of jumps) {
    for (const [i, x] of w[a]) {
      const scaled = ring.multiply(rate, ring.conjugate(x));
      for (const [j, y] of w[b]) addEntry(ring, out, i, j, ring.multiply(scaled, y));
    }
  }
  for (let i = 0; i < algebra.size; i++) {
    const x = drift[i].get(a);
    if (x !== undefined) addEntry(ring, out, i, b, ring.multiply(minusHalf, x));
  }
  for (const [j, x] of drift[b]) addEntry(ring, out, a, j, ring.multiply(minusHalf, x));
  return out;
}

/** [W_j, A] for every jump. */
function derivativesOf<T>({ ring, algebra, jumps }: RingModel<T>, a: SparseOperator<T>): SparseOperator<T>[] {
  return jumps.map(({ w }) => {
    const out = emptyOperator<T>(algebra.size);
    addProduct(ring, out, ring.of(1, 0), w, a);
    addProduct(ring, out, ring.of(-1, 0), a, w);
    return out;
  });
}

/** The components of (∂L − L̂∂)(e_ab). */
export function liftDefect<T>(model: RingModel<T>, a: number, b: number): SparseOperator<T>[] {
  const { ring, algebra, jumps, terms, drift } = model;
  const unit = emptyOperator<T>(algebra.size);
  unit[a].set(b, ring.of(1, 0));
  const xi = derivativesOf(model, unit);
  const out = derivativesOf(model, imageOfUnit(model, a, b));
  const half = ring.of(0.5, 0);
  xi.forEach((x, k) => {
    if (isEmpty(x)) return;
    addProduct(ring, out[k], half, drift, x);
    addProduct(ring, out[k], half, x, drift);
  });
  const lefts = new Map<number, SparseOperator<T>>();
  const leftImage = (left: number, from: number): SparseOperator<T> => {
    if (left < 0) return xi[from];
    const key = left * jumps.length + from;
    let image = lefts.get(key);
    if (!image) lefts.set(key, (image = product(ring, jumps[left].adjoint, xi[from])));
    return image;
  };
  for (const { left, right, from, to, z } of terms) {
    if (isEmpty(xi[from])) continue;
    const image = leftImage(left, from);
    if (right < 0) addScaled(ring, out[to], ring.negate(z), image);
    else addProduct(ring, out[to], ring.negate(z), image, jumps[right].w);
  }
  return out;
}
