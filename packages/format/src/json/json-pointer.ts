/** One step into a document: a field name or an array index. */
export type PathSegment = string | number;

/** The JSON pointer (RFC 6901) of a path; the empty text for the whole document. */
export function jsonPointer(path: readonly PathSegment[]): string {
  return path.map((segment) => `/${String(segment).replaceAll('~', '~0').replaceAll('/', '~1')}`).join('');
}
