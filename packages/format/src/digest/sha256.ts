import { sha256 } from '@noble/hashes/sha2.js';

/** A running SHA-256, as @noble/hashes and node:crypto both provide it. */
export interface RunningHash {
  update(bytes: Uint8Array): unknown;
  digest(): Uint8Array;
}

/** A SHA-256 in plain JavaScript, the same everywhere. */
export function createSha256(): RunningHash {
  return sha256.create();
}

/** The SHA-256 of bytes or of the UTF-8 form of a text, in lower-case hexadecimal. */
export function sha256Hex(content: Uint8Array | string): string {
  return toHex(sha256(typeof content === 'string' ? new TextEncoder().encode(content) : content));
}

export function toHex(bytes: Uint8Array): string {
  return Array.from(bytes, (byte) => byte.toString(16).padStart(2, '0')).join('');
}
