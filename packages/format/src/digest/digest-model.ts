import type { ResolvedModel } from '../model/resolve-model.js';
import { canonicalChunks } from './canonical-chunks.js';
import { createSha256, toHex, type RunningHash } from './sha256.js';

/**
 * The digest of a model: SHA-256, in hexadecimal, of the RFC 8785 form of its document with matrices written densely. It depends
 * on the content only: not on the form of a matrix, on the file it sits in, on spacing or on the order of fields.
 */
export function digestModel(model: ResolvedModel, createHash: () => RunningHash = createSha256): string {
  const hash = createHash();
  const encoder = new TextEncoder();
  for (const chunk of canonicalChunks(model)) hash.update(encoder.encode(chunk));
  return toHex(hash.digest());
}
