import canonicalize from 'canonicalize';
import { ThalwegError } from '@thalweg/core';
import type { JsonValue } from './json-value.js';

/**
 * The one text of a JSON value under RFC 8785: keys sorted by UTF-16 units, shortest numbers, no spaces, −0 as 0.
 * Throws `not-json` on what JSON cannot hold: NaN, infinities, lone surrogates, cycles.
 */
export function canonicalJson(value: JsonValue): string {
  let text: string | undefined;
  try {
    text = canonicalize(value);
  } catch (cause) {
    const reason = cause instanceof Error ? cause.message : String(cause);
    throw new ThalwegError('not-json', `expected plain JSON data, got a value with no canonical form (${reason})`, {
      cause,
    });
  }
  if (text === undefined)
    throw new ThalwegError('not-json', 'expected plain JSON data, got undefined; pass null instead');
  return text;
}
