import type { Interval } from '../checker/arithmetic/interval.js';
import { encloseEntropyQuotient } from '../enclosure/enclose-entropy.js';
import { encloseGradientEstimate } from '../enclosure/enclose-gradient-estimate.js';
import type { Witness } from '../sheet/bracket.js';
import type { Structure } from '../structure/structure.js';

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

/** The witness stating the upper end of its enclosure, where there is one: what `verifyWitness` proves of it. */
export function provedWitness(structure: Structure, witness: Witness): Witness {
  const enclosure = encloseWitness(structure, witness);
  return enclosure ? { ...witness, value: enclosure.hi } : witness;
}
