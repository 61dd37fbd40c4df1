import { totalmem } from 'node:os';
import { memoryText, ThalwegError, type BlockAlgebra } from '@thalweg/core';

/** Vectors of D numbers that the matrix-free gap holds at once, and complex N×N matrices beside them, both rounded up. */
const VECTORS = 80;
const MATRICES = 8;

const BYTES_PER_NUMBER = 8;
const BYTES_PER_COMPLEX = 16;

/** Bytes that a computation on this algebra needs at least, when it is too large for dense matrices on it. */
function memoryNeed({ dimension, size }: Pick<BlockAlgebra, 'dimension' | 'size'>): number {
  return VECTORS * BYTES_PER_NUMBER * dimension + MATRICES * BYTES_PER_COMPLEX * size * size;
}

/** Refuses a model that does not fit into memory, before anything is allocated for it. Throws `too-large`. */
export function requireMemory(algebra: Pick<BlockAlgebra, 'dimension' | 'size'>, available = memoryLimit()): void {
  const need = memoryNeed(algebra);
  if (need <= available) return;
  throw new ThalwegError(
    'too-large',
    `expected a model that fits into the ${memoryText(available)} of memory here, got one of algebra dimension ${algebra.dimension} that needs about ${memoryText(need)}; reduce the model or use a larger machine`,
    { details: { dimension: algebra.dimension, need, available } },
  );
}

/** What this process may use: the machine's memory, or the limit of its container. */
function memoryLimit(): number {
  const constrained = process.constrainedMemory() ?? 0;
  return constrained > 0 ? Math.min(constrained, totalmem()) : totalmem();
}
