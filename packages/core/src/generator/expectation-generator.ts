import { type BlockAlgebra, blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { identity, scale } from '../linalg/complex-matrix.js';
import { algebraSpan } from './algebra-span.js';
import type { Generator } from './generator.js';
import { type MatrixInput, requireRate, squareDense } from './matrix-input.js';
import { requireDenseDimension } from './superoperator-parts.js';

/** The subalgebra that the conditional expectation maps onto. */
export type ExpectationTarget =
  | { readonly scalars: true }
  | { readonly diagonal: true }
  /** Block sizes along the diagonal, each inside one block of the algebra. */
  | { readonly blocks: readonly number[] }
  /** Matrices whose span is a *-algebra with 1. */
  | { readonly spannedBy: readonly MatrixInput[] };

export interface ExpectationForm {
  readonly algebra: BlockAlgebra;
  readonly onto: ExpectationTarget;
  /** Factor, a rate; 1 when left out. */
  readonly rate?: number;
}

/**
 * L = rate (E − id), E the trace-preserving conditional expectation, that is the orthogonal projection for Tr A*B.
 * The maximally mixed state is declared. Throws `negative-rate`, `dimension-mismatch`, `not-an-algebra`, `too-large`.
 */
export function expectationGenerator(form: ExpectationForm): Generator {
  const { algebra, onto, rate = 1 } = form;
  requireRate(rate, '/generator/rate', 'the rate');
  requireDenseDimension(algebra, 'a conditional expectation');
  const superoperator = projectionOnto(algebra, onto);
  const d = algebra.dimension;
  for (let k = 0; k < d; k++) superoperator[k * d + k] -= 1;
  for (let k = 0; k < d * d; k++) superoperator[k] *= rate;
  return {
    algebra,
    hamiltonian: null,
    jumps: [],
    superoperator,
    declaredState: scale(identity(algebra.size), 1 / algebra.size),
    origin: { kind: 'expectation', rate, tracial: true },
  };
}

function projectionOnto(algebra: BlockAlgebra, onto: ExpectationTarget): Float64Array {
  if ('scalars' in onto) return projectionOnSpan(algebra, [scaledIdentity(algebra)]);
  if ('diagonal' in onto) return blockProjection(algebra, new Array<number>(algebra.size).fill(1));
  if ('blocks' in onto) return blockProjection(algebra, onto.blocks);
  const matrices = onto.spannedBy.map((a, k) => squareDense(a, algebra.size, `/generator/onto/spannedBy/${k}`));
  return projectionOnSpan(algebra, algebraSpan(algebra, matrices, '/generator/onto/spannedBy'));
}

/** Coordinates of 1/√N. */
function scaledIdentity(algebra: BlockAlgebra): Float64Array {
  return Float64Array.from(algebra.row, (i, k) => (i === algebra.col[k] ? 1 / Math.sqrt(algebra.size) : 0));
}

/** Σ_b |b)(b| over orthonormal coordinate vectors. */
function projectionOnSpan(algebra: BlockAlgebra, basis: readonly Float64Array[]): Float64Array {
  const d = algebra.dimension;
  const out = new Float64Array(d * d);
  for (const b of basis) {
    for (let k = 0; k < d; k++) {
      const factor = b[k];
      if (factor === 0) continue;
      for (let l = 0; l < d; l++) out[k * d + l] += factor * b[l];
    }
  }
  return out;
}

/** Drops the entries outside the given blocks: a diagonal matrix of ones and zeros in the Hermitian basis. */
function blockProjection(algebra: BlockAlgebra, blocks: readonly number[]): Float64Array {
  const inner = blockAlgebra(blocks);
  requireRefinement(algebra, inner);
  const d = algebra.dimension;
  const out = new Float64Array(d * d);
  for (let k = 0; k < d; k++) {
    if (inner.blockOf[algebra.row[k]] === inner.blockOf[algebra.col[k]]) out[k * d + k] = 1;
  }
  return out;
}

function requireRefinement(algebra: BlockAlgebra, inner: BlockAlgebra): void {
  const inside = inner.offsets.every(
    (start, b) => algebra.blockOf[start] === algebra.blockOf[start + inner.blocks[b] - 1],
  );
  if (inner.size === algebra.size && inside) return;
  throw new ThalwegError(
    'dimension-mismatch',
    `expected blocks that divide the blocks [${algebra.blocks.join(', ')}] of the algebra, got [${inner.blocks.join(', ')}]`,
    { pointer: '/generator/onto/blocks' },
  );
}
