import { innerProduct } from '../linalg/complex-matrix.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import { TRANSFER_DUST } from '../tolerances.js';
import type { FoundLift } from './find-lift.js';
import type { LiftTerm } from './lift-terms.js';

type Coefficients = FoundLift['coefficients'];
interface Complex {
  readonly re: number;
  readonly im: number;
}

/**
 * The coefficients of the same lift over other jumps of the same generator: V_j = Σ u_jk V′_k with u unitary, for two canonical
 * forms without frequencies. A tensor of four indices is turned, one index after the other.
 */
export function transferLift(
  coefficients: Coefficients,
  from: Pick<CanonicalForm, 'jumps'>,
  to: Pick<CanonicalForm, 'jumps'>,
): Coefficients {
  const mixing = from.jumps.map(({ matrix }) =>
    to.jumps.map((other): Complex => {
      const { re, im } = innerProduct(other.matrix, matrix);
      return { re: re / other.norm ** 2, im: im / other.norm ** 2 };
    }),
  );
  const conjugated = mixing.map((row) => row.map(({ re, im }): Complex => ({ re, im: -im })));
  // R_l* and the component that is written to turn with conj u, ξ_f and R_r with u.
  const turned = (['left', 'right', 'from', 'to'] as const).reduce(
    (terms, slot) => turnSlot(terms, slot, slot === 'left' || slot === 'to' ? conjugated : mixing),
    coefficients,
  );
  const top = Math.max(...turned.map(({ re, im }) => Math.hypot(re, im)));
  return turned.filter(({ re, im }) => Math.hypot(re, im) > TRANSFER_DUST * top);
}

function turnSlot(
  coefficients: Coefficients,
  slot: keyof LiftTerm,
  mixing: readonly (readonly Complex[])[],
): Coefficients {
  const sums = new Map<string, { term: LiftTerm; re: number; im: number }>();
  const add = (term: LiftTerm, re: number, im: number): void => {
    const key = `${term.left},${term.right},${term.from},${term.to}`;
    const known = sums.get(key);
    if (known) {
      known.re += re;
      known.im += im;
    } else sums.set(key, { term, re, im });
  };
  for (const { term, re, im } of coefficients) {
    if (term[slot] < 0) {
      add(term, re, im);
      continue;
    }
    mixing[term[slot]].forEach((u, k) => {
      if (u.re === 0 && u.im === 0) return;
      add({ ...term, [slot]: k }, re * u.re - im * u.im, re * u.im + im * u.re);
    });
  }
  return [...sums.values()];
}
