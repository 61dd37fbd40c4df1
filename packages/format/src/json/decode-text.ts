import { ThalwegError } from '@thalweg/core';

/** Bytes as UTF-8 text without its byte order mark; throws `not-json` when they are not UTF-8. */
export function decodeText(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (cause) {
    throw new ThalwegError('not-json', 'expected UTF-8 text, got bytes that are not UTF-8; save the file in UTF-8', {
      cause,
    });
  }
}
