import type { CanonicalForm } from '../structure/canonical-form.js';
import { LIFT_CLOSED } from '../tolerances.js';
import { type FoundLift, type LiftOptions, findLift } from './find-lift.js';
import { type JumpBasis, inJumpBasis } from './jump-bases.js';
import { liftModel } from './lift-jumps.js';
import type { LiftAnsatz } from './lift-terms.js';

/** A rung of the ladder: which jumps, how rich a lift. */
export interface LiftRung {
  readonly basis: JumpBasis;
  readonly ansatz: LiftAnsatz;
}

/** The best lift met while climbing, with the rung and the canonical form it belongs to. */
export interface LadderResult {
  readonly lift: FoundLift;
  readonly rung: LiftRung;
  readonly canonical: CanonicalForm;
  /** `closed`: K reached the target; `exhausted`: every rung was tried; `stopped`: the time ended. */
  readonly reason: 'closed' | 'exhausted' | 'stopped';
}

export interface LadderOptions extends LiftOptions {
  /** An upper bound on K at which to stop: `cbe`. */
  readonly target: number;
  /** Rungs whose form would be larger than this are left out. */
  readonly maxSide: number;
  /** Only the rungs with this ansatz; all where left out. */
  readonly ansatz?: LiftAnsatz;
}

/** From cheap to rich. */
const LIFT_LADDER: readonly LiftRung[] = [
  { basis: 'given', ansatz: 'diagonal' },
  { basis: 'pauli', ansatz: 'diagonal' },
  { basis: 'weyl', ansatz: 'diagonal' },
  { basis: 'given', ansatz: 'full' },
  { basis: 'pauli', ansatz: 'full' },
  { basis: 'weyl', ansatz: 'full' },
];

/** Climb the ladder of ansätze until the target is reached; null when no rung has a lift. */
export function climbLadder(canonical: CanonicalForm, options: LadderOptions): LadderResult | null {
  let best: LadderResult | null = null;
  for (const rung of LIFT_LADDER) {
    if (options.ansatz && rung.ansatz !== options.ansatz) continue;
    if (options.stop?.()) return best && { ...best, reason: 'stopped' };
    const rebased = inJumpBasis(canonical, rung.basis);
    if (!rebased || formSide(rebased, rung.ansatz) > options.maxSide) continue;
    const lift = findLift(rebased, rung.ansatz, options);
    if (!lift) continue;
    if (!best || lift.optimum > best.lift.optimum) best = { lift, rung, canonical: rebased, reason: 'exhausted' };
    if (lift.optimum >= options.target - LIFT_CLOSED * Math.max(1, Math.abs(options.target)))
      return { ...best, reason: 'closed' };
  }
  return best;
}

/** Rows of the left form: components and pairs (m,j), as many as could occur. */
function formSide(canonical: CanonicalForm, ansatz: LiftAnsatz): number {
  const { algebra, jumps } = liftModel(canonical);
  let side = 0;
  for (const { row, col } of jumps) {
    const pairs = jumps.filter((jump) => jump.row === row && (ansatz === 'full' || jump.col === row)).length;
    side += algebra.blocks[col] * (1 + pairs);
  }
  return side;
}
