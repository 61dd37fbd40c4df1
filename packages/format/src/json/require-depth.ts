import { ThalwegError } from '@thalweg/core';
import { JSON_LIMITS } from '../limits.js';
import { jsonPointer, type PathSegment } from './json-pointer.js';

/**
 * Throws `too-large` where a value nests deeper than a text may, which a value that contains itself always does. For values that
 * come from a program: text is bounded when it is read.
 */
export function requireDepth(value: unknown, limit: number = JSON_LIMITS.depth): void {
  visit(value, limit, []);
}

function visit(value: unknown, limit: number, path: PathSegment[]): void {
  if (typeof value !== 'object' || value === null) return;
  if (path.length === limit) {
    const message = `expected at most ${limit} levels of nesting, got more; flatten the document or break the cycle`;
    throw new ThalwegError('too-large', message, { pointer: jsonPointer(path) });
  }
  for (const [key, item] of Object.entries(value)) {
    if (typeof item !== 'object') continue;
    path.push(Array.isArray(value) ? Number(key) : key);
    visit(item, limit, path);
    path.pop();
  }
}
