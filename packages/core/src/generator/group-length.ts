import { ThalwegError } from '../errors.js';
import { symmetricEigenvalues } from '../linalg/symmetric-eigen.js';
import { INPUT_TOLERANCE, POSITIVITY_TOLERANCE } from '../tolerances.js';
import type { FiniteGroup } from './finite-group.js';

const POINTER = '/generator/length';

/**
 * The values ℓ(g), checked: ℓ(e) = 0, ℓ(g) = ℓ(g⁻¹), and k(g,h) = ½(ℓ(g)+ℓ(h)−ℓ(g⁻¹h)) ⪰ 0, which by Schoenberg makes every
 * e^{−tℓ} positive definite. Throws `length-not-conditionally-negative` with the least eigenvalue of k, `usage` or
 * `not-finite` for values that are no length.
 */
export function groupLength(group: FiniteGroup, length: readonly number[] | 'word'): Float64Array {
  const values = length === 'word' ? wordLength(group) : Float64Array.from(length);
  requireLength(group, values);
  const n = group.order;
  const k = gromovForm(group, values);
  const top = values.reduce((a, b) => Math.max(a, b), 0);
  const smallest = symmetricEigenvalues(k, n)[0];
  if (smallest >= -POSITIVITY_TOLERANCE * n * top) return values;
  throw new ThalwegError(
    'length-not-conditionally-negative',
    `expected k(g,h) = ½(ℓ(g)+ℓ(h)−ℓ(g⁻¹h)) to be positive semidefinite, got the eigenvalue ${smallest.toPrecision(6)}; ` +
      'this length does not generate a Markov semigroup, give one that is conditionally negative',
    { pointer: POINTER, details: { eigenvalue: smallest } },
  );
}

/** k(g,h) = ½(ℓ(g)+ℓ(h)−ℓ(g⁻¹h)), row-major, order × order. */
export function gromovForm(group: FiniteGroup, values: Float64Array): Float64Array {
  const { order: n, product, inverse } = group;
  const k = new Float64Array(n * n);
  for (let g = 0; g < n; g++) {
    for (let h = 0; h < n; h++) {
      k[g * n + h] = (values[g] + values[h] - values[product[inverse[g] * n + h]]) / 2;
    }
  }
  return k;
}

/** Word length in the usual generators, by breadth-first search from the identity. */
function wordLength(group: FiniteGroup): Float64Array {
  const { generators } = group;
  if (!generators) {
    throw new ThalwegError(
      'usage',
      'expected explicit lengths for a group given by its table, got "word"; list ℓ(g) for each g',
      {
        pointer: POINTER,
      },
    );
  }
  const values = new Float64Array(group.order).fill(-1);
  values[group.identity] = 0;
  let frontier = [group.identity];
  while (frontier.length > 0) {
    const next: number[] = [];
    for (const g of frontier) {
      for (const step of generators) {
        const h: number = group.product[g * group.order + step];
        if (values[h] >= 0) continue;
        values[h] = values[g] + 1;
        next.push(h);
      }
    }
    frontier = next;
  }
  return values;
}

function requireLength(group: FiniteGroup, values: Float64Array): void {
  const { order, identity, inverse } = group;
  if (values.length !== order) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected ${order} lengths, one for each element, got ${values.length}; list them in the order of the elements`,
      {
        pointer: POINTER,
      },
    );
  }
  const bad = values.findIndex((x) => !Number.isFinite(x));
  if (bad >= 0) {
    throw new ThalwegError('not-finite', `expected a finite length of element ${bad}, got ${values[bad]}; correct it`, {
      pointer: `${POINTER}/${bad}`,
    });
  }
  const top = values.reduce((a, b) => Math.max(a, Math.abs(b)), 0);
  if (Math.abs(values[identity]) > INPUT_TOLERANCE * top) {
    throw new ThalwegError(
      'usage',
      `expected ℓ = 0 at the identity, element ${identity}, got ${values[identity]}; check the order of the elements`,
      {
        pointer: `${POINTER}/${identity}`,
      },
    );
  }
  const lopsided = values.findIndex((x, g) => Math.abs(x - values[inverse[g]]) > INPUT_TOLERANCE * top);
  if (lopsided < 0) return;
  const other = inverse[lopsided];
  throw new ThalwegError(
    'usage',
    `expected ℓ(g) = ℓ(g⁻¹), got ${values[lopsided]} at element ${lopsided} and ${values[other]} at its inverse ${other}; make them equal`,
    { pointer: `${POINTER}/${lopsided}` },
  );
}
