import type { RingModel, RingTerm } from './ring-model.js';
import { type SparseOperator, addEntry, emptyOperator } from './sparse-operator.js';

/** Which of the two forms of §6. */
export type Side = 'left' | 'right';

/** A form as a Hermitian matrix. */
export interface LiftForm<T> {
  readonly rows: SparseOperator<T>;
  /** Of each row: the weight of its component, or the diagonal entry of its pair. */
  readonly weights: readonly T[];
  /** True for the rows of components. */
  readonly isComponent: readonly boolean[];
}

/**
 * A form of §6 as the Hermitian matrix M of Σ X_sM_stX_t* (left) or Σ X_s*M_stX_t (right). Left: X runs through the W_m*ζ_j that a
 * term uses and the ζ_k, with weights a_k = ratio·rate; M has rate_m a_j on the former, a_k(S − 2K) on the latter, and −a_k z W_r
 * between W_l*ζ_f (or ζ_f) and ζ_k for each term. Right: X runs through ζ_fW_r and ζ_k, a_k = rate, and the entry is −a_k z W_l*
 * between ζ_k and ζ_fW_r. The terms with −½S in L and in L̂ have cancelled on one side and doubled on the other. If M ⪰ 0, the
 * form is completely positive.
 */
export function liftForm<T>(model: RingModel<T>, side: Side): LiftForm<T> {
  const { ring, algebra, jumps, terms, drift, bound } = model;
  const isLeft = side === 'left';
  const slots = new Slots(terms, jumps.length, isLeft, (j) => algebra.blocks[isLeft ? jumps[j].col : jumps[j].row]);
  const rows = emptyOperator<T>(slots.size);
  const weights = new Array<T>(slots.size);
  const isComponent = new Array<boolean>(slots.size).fill(false);
  const a = jumps.map(({ rate, ratio }) => (isLeft ? ring.multiply(ratio, rate) : rate));
  jumps.forEach(({ row, col }, k) => {
    const offset = algebra.offsets[isLeft ? col : row];
    const start = slots.component[k];
    const minusTwoK = ring.multiply(ring.of(-2, 0), ring.multiply(a[k], bound));
    for (let i = 0; i < algebra.blocks[isLeft ? col : row]; i++) {
      weights[start + i] = a[k];
      isComponent[start + i] = true;
      addEntry(ring, rows, start + i, start + i, minusTwoK);
      for (const [j, x] of drift[offset + i])
        addEntry(ring, rows, start + i, start + j - offset, ring.multiply(a[k], x));
    }
  });
  for (const { start, size, outer, from } of slots.pairs.values()) {
    const weight = ring.multiply(jumps[outer].rate, a[from]);
    for (let i = start; i < start + size; i++) {
      weights[i] = weight;
      addEntry(ring, rows, i, i, weight);
    }
  }
  for (const term of terms) addTerm(model, rows, slots, term, ring.negate(ring.multiply(a[term.to], term.z)), isLeft);
  return { rows, weights, isComponent };
}

/** c·W_r in the rows of the pair or component, columns of ζ_to (left); c·W_l* in rows of ζ_to, columns of the pair (right). */
function addTerm<T>(
  { ring, algebra, jumps }: RingModel<T>,
  rows: SparseOperator<T>,
  slots: Slots,
  { left, right, from, to }: RingTerm<T>,
  c: T,
  isLeft: boolean,
): void {
  const inner = isLeft ? right : left;
  const outer = slots.startOf(isLeft ? left : right, from);
  const target = slots.component[to];
  const put = (i: number, j: number, x: T): void => {
    const [p, q] = isLeft ? [outer + i, target + j] : [target + i, outer + j];
    addEntry(ring, rows, p, q, x);
    addEntry(ring, rows, q, p, ring.conjugate(x));
  };
  if (inner < 0) {
    const { row, col } = jumps[from];
    for (let i = 0; i < algebra.blocks[isLeft ? col : row]; i++) put(i, i, c);
    return;
  }
  const { w, adjoint, row, col } = jumps[inner];
  const factor = isLeft ? w : adjoint;
  const [rowOffset, colOffset] = isLeft
    ? [algebra.offsets[row], algebra.offsets[col]]
    : [algebra.offsets[col], algebra.offsets[row]];
  factor.forEach((entries, i) => {
    for (const [j, x] of entries) put(i - rowOffset, j - colOffset, ring.multiply(c, x));
  });
}

/** Where components and pairs (outer jump, from) stand. */
class Slots {
  readonly component: number[] = [];
  readonly pairs = new Map<number, { start: number; size: number; outer: number; from: number }>();
  readonly #jumps: number;
  size = 0;

  constructor(terms: readonly RingTerm<unknown>[], jumps: number, isLeft: boolean, sizeOf: (j: number) => number) {
    this.#jumps = jumps;
    for (let k = 0; k < jumps; k++) {
      this.component.push(this.size);
      this.size += sizeOf(k);
    }
    for (const { left, right, from } of terms) {
      const outer = isLeft ? left : right;
      const key = outer * jumps + from;
      if (outer < 0 || this.pairs.has(key)) continue;
      this.pairs.set(key, { start: this.size, size: sizeOf(from), outer, from });
      this.size += sizeOf(from);
    }
  }

  startOf(outer: number, from: number): number {
    if (outer < 0) return this.component[from];
    return this.pairs.get(outer * this.#jumps + from)?.start ?? -1;
  }
}
