import type { Interval } from '../checker/arithmetic/interval.js';
import { encloseEntropyQuotient } from '../enclosure/enclose-entropy.js';
import { encloseGradientEstimate } from '../enclosure/enclose-gradient-estimate.js';
import { ENCLOSURE_WIDTH } from '../enclosure/limits.js';
import type { Witness } from '../sheet/bracket.js';
import type { Structure } from '../structure/structure.js';
import { CLOSED_FLOOR } from '../tolerances.js';

/**
 * The quotient at a witness in interval arithmetic, over the box of the model (see `modelBox`): its upper end is a proved upper end
 * of the constant. Null where nothing is proved.
 */
export function encloseWitness(structure: Structure, witness: Witness): Interval | null {
  const { constant, mean, state, observable, amplification } = witness;
  switch (constant) {
    case 'ge':
      return observable && encloseGradientEstimate(structure, mean ?? 'logarithmic', state, observable);
    case 'mlsi':
    case 'clsi':
    case 'lsi':
      return encloseEntropyQuotient(structure, constant, state, amplification);
    default:
      return null;
  }
}

/**
 * The enclosure of a witness's quotient where it is narrow enough to be stated: ENCLOSURE_WIDTH of itself, or of CLOSED_FLOOR times
 * the mean rate at which the jumps leave a level.
 */
export function narrowEnclosure(structure: Structure, witness: Witness): Interval | null {
  const enclosure = encloseWitness(structure, witness);
  if (!enclosure) return null;
  const { algebra, canonical } = structure;
  const rate = (canonical?.jumps ?? []).reduce((sum, { norm }) => sum + 2 * norm * norm, 0) / algebra.size;
  const scale = Math.max(Math.abs(enclosure.hi), CLOSED_FLOOR * rate);
  return enclosure.hi - enclosure.lo <= ENCLOSURE_WIDTH * scale ? enclosure : null;
}

/** The witness stating the upper end of its enclosure, where there is a narrow one: what `verifyWitness` proves of it. */
export function provedWitness(structure: Structure, witness: Witness): Witness {
  const enclosure = narrowEnclosure(structure, witness);
  return enclosure ? { ...witness, value: enclosure.hi } : witness;
}
