import type { Generator } from '../generator/generator.js';
import { requireWhole } from './check-parameter.js';
import { mixedSpinSystem } from './mixed-spin-system.js';

/**
 * Fermionic Ornstein–Uhlenbeck semigroup on the Clifford algebra M_{2^m} of m modes, that is of 2m anticommuting self-adjoint
 * generators: L acts on a product of k of them as −k, k = 0…2m. ge = cge = 1 (Carlen & Maas, Commun. Math. Phys. 331 (2014)).
 */
export function fermionicNumber(modes: number): Generator {
  requireWhole(modes, 1, 10, 'the number of modes');
  const m = 2 * modes;
  return mixedSpinSystem(Array.from({ length: m }, () => new Array<number>(m).fill(-1)));
}
