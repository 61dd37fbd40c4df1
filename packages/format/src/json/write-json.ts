import { ThalwegError } from '@thalweg/core';
import { jsonPointer, type PathSegment } from './json-pointer.js';

/**
 * The text of a document for people and files: two spaces of indent, lists of plain values on one line, fields in the order given,
 * a line feed at the end. Fields that are undefined are left out. Throws `not-finite` with a pointer, since JSON has no NaN and no
 * infinity, and `internal` for what is not plain data.
 */
export function writeJson(value: unknown): string {
  return `${write(value, '', [])}\n`;
}

function write(value: unknown, indent: string, path: readonly PathSegment[]): string {
  if (Array.isArray(value)) return writeList(value, indent, path);
  if (typeof value === 'object' && value !== null) return writeObject(value as Record<string, unknown>, indent, path);
  if (typeof value === 'number' && !Number.isFinite(value)) {
    throw new ThalwegError(
      'not-finite',
      `expected a finite number in a document, got ${value}; write null with a note`,
      {
        pointer: jsonPointer(path),
      },
    );
  }
  const text = JSON.stringify(value) as string | undefined;
  if (text === undefined) {
    throw new ThalwegError('internal', `expected plain data in a document, got a ${typeof value}; leave it out`, {
      pointer: jsonPointer(path),
    });
  }
  return text;
}

function writeList(list: readonly unknown[], indent: string, path: readonly PathSegment[]): string {
  const inner = `${indent}  `;
  if (list.every((item) => Number.isFinite(item))) return `[${list.map((item) => JSON.stringify(item)).join(', ')}]`;
  const items = list.map((item, k) => write(item, inner, [...path, k]));
  if (list.every((item) => typeof item !== 'object' || item === null)) return `[${items.join(', ')}]`;
  return `[\n${items.map((item) => inner + item).join(',\n')}\n${indent}]`;
}

function writeObject(object: Record<string, unknown>, indent: string, path: readonly PathSegment[]): string {
  const inner = `${indent}  `;
  const fields = Object.entries(object)
    .filter(([, field]) => field !== undefined)
    .map(([key, field]) => `${inner}${JSON.stringify(key)}: ${write(field, inner, [...path, key])}`);
  return fields.length === 0 ? '{}' : `{\n${fields.join(',\n')}\n${indent}}`;
}
