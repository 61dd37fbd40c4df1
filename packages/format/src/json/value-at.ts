import type { PathSegment } from './json-pointer.js';

/** The value at a path, or undefined where the path leads nowhere. Inherited properties do not count. */
export function valueAt(root: unknown, path: readonly PathSegment[]): unknown {
  let value = root;
  for (const segment of path) {
    if (typeof value !== 'object' || value === null || !Object.hasOwn(value, segment)) return undefined;
    value = (value as Record<PathSegment, unknown>)[segment];
  }
  return value;
}
