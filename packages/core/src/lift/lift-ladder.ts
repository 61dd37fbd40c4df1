import type { CanonicalForm } from '../structure/canonical-form.js';
import { LIFT_CLOSED } from '../tolerances.js';
import { type FoundLift, type LiftOptions, solveLift } from './find-lift.js';
import { type JumpBasis, inJumpBasis } from './jump-bases.js';
import { liftModel } from './lift-jumps.js';
import type { LiftAnsatz } from './lift-terms.js';
import { type PreparedLift, prepareLift } from './prepare-lift.js';

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
  /** The canonical form that the ladder started from. */
  readonly given: CanonicalForm;
  /** `closed`: K reached the target; `exhausted`: every rung was tried; `stopped`: the time ended. */
  readonly reason: 'closed' | 'exhausted' | 'stopped';
}

export interface LadderOptions extends LiftOptions {
  /** An upper bound on K at which to stop: `cbe`. */
  readonly target: number;
  /** Rungs whose form would be larger than this are left out. */
  readonly maxSide: Readonly<Record<LiftAnsatz, number>>;
  /** Only the rungs with this ansatz; all where left out. */
  readonly ansatz?: LiftAnsatz;
}

/** From cheap to rich. */
const ANSATZE: readonly LiftAnsatz[] = ['diagonal', 'full'];
const BASES: readonly JumpBasis[] = ['given', 'pauli', 'weyl'];

/**
 * Climb the ladder of ansätze until the target is reached; null when no rung has a lift. Within an ansatz the choice of jumps with
 * the fewest unknowns, the one that most symmetries permute, comes first. Mixing jumps of one frequency maps the full form
 * onto itself: one choice of jumps is enough there.
 */
export function climbLadder(canonical: CanonicalForm, options: LadderOptions): LadderResult | null {
  let best: LadderResult | null = null;
  for (const ansatz of ANSATZE) {
    if (options.ansatz && ansatz !== options.ansatz) continue;
    for (const { rung, rebased, prepared } of rungsOf(canonical, ansatz, options)) {
      if (options.stop?.()) return best && { ...best, reason: 'stopped' };
      const lift = solveLift(prepared, options);
      if (!lift) continue;
      if (!best || lift.optimum > best.lift.optimum)
        best = { lift, rung, canonical: rebased, given: canonical, reason: 'exhausted' };
      if (lift.optimum >= options.target - LIFT_CLOSED * Math.max(1, Math.abs(options.target)))
        return { ...best, reason: 'closed' };
      if (ansatz === 'full') break;
    }
  }
  return best;
}

interface PreparedRung {
  readonly rung: LiftRung;
  readonly rebased: CanonicalForm;
  readonly prepared: PreparedLift;
}

/** The rungs of one ansatz that are not too large, fewest unknowns first. */
function rungsOf(canonical: CanonicalForm, ansatz: LiftAnsatz, { maxSide }: LadderOptions): PreparedRung[] {
  return BASES.flatMap((basis): PreparedRung[] => {
    const rebased = inJumpBasis(canonical, basis);
    if (!rebased || formSide(rebased, ansatz) > maxSide[ansatz]) return [];
    return [{ rung: { basis, ansatz }, rebased, prepared: prepareLift(rebased, ansatz) }];
  }).sort((a, b) => a.prepared.unknowns.length - b.prepared.unknowns.length);
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
