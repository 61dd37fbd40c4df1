import type { CompleteBakryEmery } from './bakry-emery.js';
import type { CarreDuChamp } from './carre-du-champ.js';

/**
 * The direction that shows cbe = −∞ as text: observables A_k = Σ coefficient·e_ij, k over the indices of one block, at which
 * Σ <k|Γ(A_k,A_l)|l> vanishes while Γ₂ is negative there or has a cross term that nothing balances. Null where cbe is finite. The
 * coefficients are rounded to two digits, and those below 1 % of the largest left out.
 */
export function unboundedDirection({ units }: CarreDuChamp, cbe: CompleteBakryEmery): string | null {
  if (cbe.value !== -Infinity) return null;
  const { re, im } = cbe.vector;
  const side = re.length / units.count;
  const top = re.reduce((most, x, i) => Math.max(most, Math.hypot(x, im[i])), 0);
  const observables = Array.from({ length: side }, (_, k) => {
    const terms = Array.from({ length: units.count }, (__, p): string | null => {
      const at = p * side + k;
      if (Math.hypot(re[at], im[at]) < SHOWN_SHARE * top) return null;
      return `${coefficient(re[at], im[at], SHOWN_SHARE * top)} e_${units.row[p]},${units.col[p]}`;
    }).filter((term) => term !== null);
    return terms.length === 0 ? null : `A_${k} = ${terms.join(' + ').replaceAll('+ −', '− ')}`;
  }).filter((text) => text !== null);
  return `Γ vanishes and Γ₂ does not stay positive at ${observables.join(', ')}`;
}

/** Components below this share of the largest are not shown. */
const SHOWN_SHARE = 0.01;

function coefficient(re: number, im: number, least: number): string {
  if (Math.abs(im) < least) return signed(re);
  if (Math.abs(re) < least) return `${signed(im)}i`;
  return `(${signed(re)} + ${signed(im)}i)`.replace('+ −', '− ');
}

function signed(x: number): string {
  return x.toPrecision(2).replace('-', '−');
}
