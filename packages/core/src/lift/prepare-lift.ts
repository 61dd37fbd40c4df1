import type { CanonicalForm } from '../structure/canonical-form.js';
import { type LiftModel, liftModel } from './lift-jumps.js';
import { type LiftUnknown, liftUnknowns } from './lift-orbits.js';
import { candidateUnitaries, diagonalCharges, jumpSymmetries } from './lift-symmetries.js';
import { type LiftAnsatz, liftTerms } from './lift-terms.js';
import { inStateBasis } from './state-basis.js';

/** An ansatz for one choice of jumps, with its real unknowns after symmetries: cheap to make, and it tells what a solution costs. */
export interface PreparedLift {
  readonly ansatz: LiftAnsatz;
  readonly model: LiftModel;
  readonly unknowns: readonly LiftUnknown[];
  /** How many symmetries tie the unknowns. */
  readonly symmetries: number;
}

/** Lay out the terms of an ansatz and tie those that symmetries of the generator carry into each other. */
export function prepareLift(canonical: CanonicalForm, ansatz: LiftAnsatz): PreparedLift {
  const model = liftModel(inStateBasis(canonical));
  const symmetries = jumpSymmetries(model, candidateUnitaries(model));
  const terms = liftTerms(model, ansatz, diagonalCharges(model));
  return { ansatz, model, unknowns: liftUnknowns(model, terms, symmetries), symmetries: symmetries.length };
}
