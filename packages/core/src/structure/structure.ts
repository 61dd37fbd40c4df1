import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import { SYMMETRY_TOLERANCE } from '../tolerances.js';
import { type CanonicalForm, canonicalForm } from './canonical-form.js';
import { type FixedPoints, fixedPoints } from './fixed-points.js';
import { type MarkovChecks, isMarkov, markovChecks } from './positivity.js';
import { type ReferenceState, referenceState } from './reference-state.js';
import { type Symmetry, symmetryOf } from './symmetry.js';

/** All that is found out about a generator before its constants are computed. */
export interface Structure {
  readonly generator: Generator;
  readonly algebra: BlockAlgebra;
  readonly markov: MarkovChecks;
  /** Null when L is no Markov generator. */
  readonly state: ReferenceState | null;
  readonly symmetry: Symmetry;
  /** Null when L is no Markov generator, or the algebra is too large to find them. */
  readonly fixedPoints: FixedPoints | null;
  /** Null unless L is GNS-symmetric for a faithful state. */
  readonly canonical: CanonicalForm | null;
  /** What a reader should know about how this was found, one sentence each. */
  readonly notes: readonly string[];
}

/**
 * Find the structure of a generator. A model that is no Markov semigroup is described, not refused; an invalid declared state
 * throws (see `referenceState`).
 */
export function analyse(generator: Generator): Structure {
  const known = structures.get(generator);
  if (known) return known;
  const structure = analyseAnew(generator);
  structures.set(generator, structure);
  return structure;
}

const structures = new WeakMap<Generator, Structure>();

const NO_SYMMETRY: Symmetry = {
  kind: 'none',
  residuals: { tracial: 1, gns: 1, kms: 1 },
  tolerance: SYMMETRY_TOLERANCE,
  probed: false,
};

function analyseAnew(generator: Generator): Structure {
  const { algebra } = generator;
  const markov = markovChecks(generator);
  const notes = markovNotes(markov);
  if (!isMarkov(markov)) {
    return {
      generator,
      algebra,
      markov,
      state: null,
      symmetry: NO_SYMMETRY,
      fixedPoints: null,
      canonical: null,
      notes,
    };
  }
  const state = referenceState(generator);
  if (!state.faithful) {
    notes.push(
      `The reference state is not faithful (smallest eigenvalue ${state.smallest.toPrecision(3)}): symmetry, canonical form and the constants that need them are not available.`,
    );
  }
  const symmetry = symmetryOf(generator, state);
  if (symmetry.probed)
    notes.push('The algebra is large: its symmetry was tested on random observables, not on all of it.');
  const accepted =
    symmetry.kind === 'GNS' ? symmetry.residuals.gns : symmetry.kind === 'KMS' ? symmetry.residuals.kms : 0;
  if (accepted > SYMMETRY_TOLERANCE) {
    notes.push(
      `The reference state is not exactly diagonal and has eigenvalues down to ${state.smallest.toPrecision(3)}: the symmetry is accepted with a residual of ${accepted.toPrecision(3)}.`,
    );
  }
  const fixed = fixedPoints(generator, state, symmetry);
  if (!fixed) notes.push('The fixed points were not found: the algebra is too large for linear algebra on it.');
  const canonical = canonicalOrNull(generator, state, symmetry, notes);
  return { generator, algebra, markov, state, symmetry, fixedPoints: fixed, canonical, notes };
}

function markovNotes({ hermitian, unital, completelyPositive }: MarkovChecks): string[] {
  const notes: string[] = [];
  if (!hermitian.holds) notes.push(`L does not preserve Hermiticity (residual ${hermitian.residual.toPrecision(3)}).`);
  if (!unital.holds)
    notes.push(`L(1) is not 0 (residual ${unital.residual.toPrecision(3)}): the semigroup is not unital.`);
  if (!completelyPositive.holds) {
    notes.push(
      `The semigroup is not completely positive (smallest eigenvalue ${completelyPositive.smallestEigenvalue.toPrecision(6)}).`,
    );
  }
  return notes;
}

function canonicalOrNull(
  generator: Generator,
  state: ReferenceState,
  symmetry: Symmetry,
  notes: string[],
): CanonicalForm | null {
  if (symmetry.kind !== 'tracial' && symmetry.kind !== 'GNS') return null;
  try {
    return canonicalForm(generator, state);
  } catch (error) {
    if (!(error instanceof ThalwegError)) throw error;
    notes.push(`There is no canonical form: ${error.message}.`);
    return null;
  }
}
