import { type BlockAlgebra, blockAlgebra, toCoordinates } from '../algebra/block-algebra.js';
import { decomposeAlgebra, reduceToBlocks } from '../algebra/decompose-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, diagonal, fromEntries, scale, zeros } from '../linalg/complex-matrix.js';
import { type FiniteGroup, type GroupForm, finiteGroup } from './finite-group.js';
import type { Generator } from './generator.js';
import { groupLength } from './group-length.js';

export interface LengthForm {
  readonly group: GroupForm;
  /** ℓ(g) for each element, rates, or "word" for the word length in the usual generators. */
  readonly length: readonly number[] | 'word';
  /** Must have the blocks of the group algebra, in any order; they are found, ascending, when left out. */
  readonly algebra?: BlockAlgebra;
}

/**
 * L λ_g = −ℓ(g) λ_g on the group algebra, decomposed into blocks. The declared state is the canonical trace
 * τ(λ_g) = δ_ge, whose density on a block of size n is n/|G|; L is GNS-symmetric for it. See `finiteGroup` for the order of the
 * elements. Throws `not-a-group`, `length-not-conditionally-negative`, `dimension-mismatch`, `too-large`, `usage`.
 */
export function lengthGenerator(form: LengthForm): Generator {
  const group = finiteGroup(form.group);
  const values = groupLength(group, form.length);
  const found = groupAlgebra(group);
  const { algebra, elements } = form.algebra ? inGivenOrder(found, form.algebra) : found;
  return {
    algebra,
    hamiltonian: null,
    jumps: [],
    superoperator: multiplier(algebra, elements, values),
    declaredState: diagonal(Float64Array.from(algebra.blockOf, (b) => algebra.blocks[b] / group.order)),
    origin: { kind: 'length' },
  };
}

interface GroupAlgebra {
  readonly algebra: BlockAlgebra;
  /** λ_g, N×N. */
  readonly elements: readonly ComplexMatrix[];
}

/** The blocks of the left regular representation, ascending, and λ_g reduced to them. */
export function groupAlgebra(group: FiniteGroup): GroupAlgebra {
  const { order: n, product } = group;
  const regular = Array.from({ length: n }, (_, g) => {
    const a = zeros(n);
    for (let h = 0; h < n; h++) a.re[product[g * n + h] * n + h] = 1;
    return a;
  });
  const decomposition = decomposeAlgebra(regular, n);
  return {
    algebra: blockAlgebra(decomposition.blocks),
    elements: regular.map((a) => reduceToBlocks(decomposition, a)),
  };
}

/**
 * −Σ_g ℓ(g) λ_g τ(λ_g* ·) in the Hermitian basis. With a_g, b_g the coordinates of the Hermitian and anti-Hermitian part of
 * λ_g, and a'_g, b'_g those parts weighted by the density of τ, the pair g, g⁻¹ adds up to −ℓ(g)(a a'ᵀ + b b'ᵀ) for each of them.
 */
function multiplier(algebra: BlockAlgebra, elements: readonly ComplexMatrix[], values: Float64Array): Float64Array {
  const d = algebra.dimension;
  const weights = Float64Array.from(algebra.row, (i) => algebra.blocks[algebra.blockOf[i]] / elements.length);
  const out = new Float64Array(d * d);
  elements.forEach((element, g) => {
    for (const x of [toCoordinates(algebra, element), toCoordinates(algebra, scale(element, 0, -1))]) {
      for (let k = 0; k < d; k++) {
        const factor = -values[g] * x[k];
        for (let l = 0; l < d; l++) out[k * d + l] += factor * weights[l] * x[l];
      }
    }
  });
  return out;
}

/** The same with the blocks in the order of the document. */
function inGivenOrder(found: GroupAlgebra, algebra: BlockAlgebra): GroupAlgebra {
  const { blocks, offsets } = found.algebra;
  const ascending = [...algebra.blocks].sort((a, b) => a - b);
  if (ascending.join() !== blocks.join()) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected the blocks [${blocks.join(', ')}] of the group algebra in any order, got [${algebra.blocks.join(', ')}]; ` +
        'leave "algebra" out to have them found',
      { pointer: '/algebra' },
    );
  }
  const free = new Set(blocks.keys());
  const source = algebra.blocks.flatMap((size) => {
    const b = [...free].find((k) => blocks[k] === size) as number;
    free.delete(b);
    return Array.from({ length: size }, (_, i) => offsets[b] + i);
  });
  const n = algebra.size;
  const elements = found.elements.map((a) =>
    fromEntries(n, n, (i, j) => [a.re[source[i] * n + source[j]], a.im[source[i] * n + source[j]]]),
  );
  return { algebra, elements };
}
