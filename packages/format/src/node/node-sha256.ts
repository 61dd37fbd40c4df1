import { createHash } from 'node:crypto';
import type { RunningHash } from '../digest/sha256.js';

/** SHA-256 by node:crypto, several times faster than the plain one; give it to `digestModel`. */
export function createNodeSha256(): RunningHash {
  return createHash('sha256');
}
