import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { LiftCertificate } from './lift-certificate.js';
import type { Ring } from './ring.js';
import { type SparseOperator, addEntry, addProduct, adjointOperator, emptyOperator } from './sparse-operator.js';

/** A jump of a certificate in one arithmetic. */
export interface RingJump<T> {
  readonly w: SparseOperator<T>;
  readonly adjoint: SparseOperator<T>;
  readonly rate: T;
  readonly ratio: T;
  readonly partner: number;
  /** Blocks of the rows and of the columns. */
  readonly row: number;
  readonly col: number;
}

export interface RingTerm<T> {
  readonly left: number;
  readonly right: number;
  readonly from: number;
  readonly to: number;
  readonly z: T;
}

/** The numbers of a certificate in one arithmetic. Shapes must have been checked. */
export interface RingModel<T> {
  readonly ring: Ring<T>;
  readonly algebra: BlockAlgebra;
  readonly sigma: SparseOperator<T>;
  readonly jumps: readonly RingJump<T>[];
  readonly terms: readonly RingTerm<T>[];
  /** S = Σ rate W*W. */
  readonly drift: SparseOperator<T>;
  /** K. */
  readonly bound: T;
}

export function ringModel<T>(ring: Ring<T>, algebra: BlockAlgebra, certificate: LiftCertificate): RingModel<T> {
  const read = (entries: LiftCertificate['state']): SparseOperator<T> => {
    const out = emptyOperator<T>(algebra.size);
    for (const [i, j, re, im] of entries) addEntry(ring, out, i, j, ring.of(re, im));
    return out;
  };
  const jumps = certificate.jumps.map(({ entries, rate, ratio, partner }): RingJump<T> => {
    const w = read(entries);
    const [i, j] = entries[0];
    const [row, col] = [algebra.blockOf[i], algebra.blockOf[j]];
    return {
      w,
      adjoint: adjointOperator(ring, w),
      rate: ring.of(rate, 0),
      ratio: ring.of(ratio, 0),
      partner,
      row,
      col,
    };
  });
  const drift = emptyOperator<T>(algebra.size);
  for (const { w, adjoint, rate } of jumps) addProduct(ring, drift, rate, adjoint, w);
  return {
    ring,
    algebra,
    sigma: read(certificate.state),
    jumps,
    terms: certificate.lift.map(({ re, im, ...term }) => ({ ...term, z: ring.of(re, im) })),
    drift,
    bound: ring.of(certificate.bound, 0),
  };
}
