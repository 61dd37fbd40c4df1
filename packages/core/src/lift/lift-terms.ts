import { FREQUENCY_TOLERANCE } from '../tolerances.js';
import type { LiftModel } from './lift-jumps.js';

/**
 * One term of a lift in jump form, (L̂ξ)_to ∋ z R_left* ξ_from R_right, where an index −1 stands for the identity: β has both
 * sides, γ the left one, γ′ the right one, δ none.
 */
export interface LiftTerm {
  readonly left: number;
  readonly right: number;
  readonly from: number;
  readonly to: number;
}

/** How rich a lift is tried: `diagonal` keeps R_m*ξ_kR_m and multiples of ξ_k, `full` everything that fits. */
export type LiftAnsatz = 'diagonal' | 'full';

/** A conserved charge of each jump: a term must not change it. */
export type Charges = readonly Float64Array[];

/**
 * The terms that map corners to corners and keep every charge, frequencies among them: averaging a lift over the modular
 * group, or over any group of phases that fixes the generator, removes all others.
 */
export function liftTerms(model: LiftModel, ansatz: LiftAnsatz, charges: Charges): LiftTerm[] {
  const { jumps } = model;
  const count = jumps.length;
  const out: LiftTerm[] = [];
  if (ansatz === 'diagonal') {
    for (let k = 0; k < count; k++) {
      out.push({ left: -1, right: -1, from: k, to: k });
      for (let m = 0; m < count; m++) if (fits(model, m, m, k, k)) out.push({ left: m, right: m, from: k, to: k });
    }
    return out;
  }
  const all = [frequenciesOf(model), ...charges];
  for (let to = 0; to < count; to++) {
    for (let from = 0; from < count; from++) {
      for (let left = -1; left < count; left++) {
        for (let right = -1; right < count; right++) {
          if (fits(model, left, right, from, to) && keeps(all, left, right, from, to))
            out.push({ left, right, from, to });
        }
      }
    }
  }
  return out;
}

/** R_left* ξ_from R_right lies in the corner of `to`. */
function fits({ jumps }: LiftModel, left: number, right: number, from: number, to: number): boolean {
  let { row, col } = jumps[from];
  if (left >= 0) {
    if (jumps[left].row !== row) return false;
    row = jumps[left].col;
  }
  if (right >= 0) {
    if (jumps[right].row !== col) return false;
    col = jumps[right].col;
  }
  return jumps[to].row === row && jumps[to].col === col;
}

function keeps(charges: Charges, left: number, right: number, from: number, to: number): boolean {
  return charges.every((charge) => {
    const before = charge[from] - (left < 0 ? 0 : charge[left]) + (right < 0 ? 0 : charge[right]);
    return Math.abs(before - charge[to]) <= 1e3 * FREQUENCY_TOLERANCE * (1 + Math.abs(before));
  });
}

function frequenciesOf({ jumps }: LiftModel): Float64Array {
  return Float64Array.from(jumps, (jump) => jump.frequency);
}
