import { createHash, randomBytes } from 'node:crypto';

/** Tokens begin with this, so that a leaked one is recognised. */
const PREFIX = 'thw_';
const SECRET_BYTES = 24;
const CHECK_LENGTH = 6;

/** A new token: the prefix, 192 random bits, and a checksum by which a mistyped one is told from an unknown one. */
export function newToken(): string {
  const secret = randomBytes(SECRET_BYTES).toString('base64url');
  return `${PREFIX}${secret}${checksum(secret)}`;
}

/** Whether a text has the form of a token, checksum included. */
export function isToken(text: string): boolean {
  const match = /^thw_([\w-]{32})([\w-]{6})$/.exec(text);
  return match !== null && checksum(match[1] ?? '') === match[2];
}

/** What is stored of a token: its SHA-256. A token holds more than 160 random bits, so that no salt is needed. */
export function tokenDigest(token: string): Buffer {
  return createHash('sha256').update(token).digest();
}

function checksum(secret: string): string {
  return createHash('sha256').update(`${PREFIX}${secret}`).digest('base64url').slice(0, CHECK_LENGTH);
}
