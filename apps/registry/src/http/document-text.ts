import { canonicalJson, type JsonValue } from '@thalweg/format';

/** The text that is sent for a document: its canonical form (RFC 8785). */
export function documentText(document: object): string {
  return canonicalJson(document as JsonValue);
}
