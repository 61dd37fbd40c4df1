export { findLift, type FoundLift, type LiftOptions } from './find-lift.js';
export { inJumpBasis, type JumpBasis } from './jump-bases.js';
export { climbLadder, type LadderOptions, type LadderResult, type LiftRung } from './lift-ladder.js';
export { type LiftAnsatz, type LiftTerm } from './lift-terms.js';
export { transferLift } from './transfer-lift.js';
