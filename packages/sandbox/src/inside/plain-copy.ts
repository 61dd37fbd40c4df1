import { Refusal } from './refusal.js';

const UNPAIRED = /[\uD800-\uDBFF](?![\uDC00-\uDFFF])|(?<![\uD800-\uDBFF])[\uDC00-\uDFFF]/;

/**
 * A copy of plain data, so that what is checked is what is written: null, true, false, finite numbers, texts, arrays
 * without holes, objects without methods. Fields that are undefined are left out. Throws a `Refusal` with a JSON pointer for anything else.
 */
export function plainCopy(value: unknown, depthLimit: number, pointer = ''): unknown {
  switch (typeof value) {
    case 'boolean':
      return value;
    case 'string':
      if (UNPAIRED.test(value)) refuse('well-formed text', 'a text with half of a surrogate pair', pointer);
      return value;
    case 'number':
      if (!Number.isFinite(value)) refuse('finite numbers', String(value), pointer);
      return value;
    case 'object':
      if (value === null) return null;
      if (depthLimit === 0) refuse('plain data', 'nesting that is too deep or a cycle', pointer);
      return Array.isArray(value) ? copyItems(value, depthLimit, pointer) : copyFields(value, depthLimit, pointer);
    default:
      return refuse('plain data', describeKind(value), pointer);
  }
}

function copyItems(items: readonly unknown[], depthLimit: number, pointer: string): unknown[] {
  const { length } = items;
  const copy: unknown[] = [];
  for (let k = 0; k < length; k++) {
    const item = items[k];
    if (typeof item === 'number' && Number.isFinite(item)) copy.push(item);
    else if (item === undefined && !(k in items)) refuse('arrays without holes', 'a missing item', `${pointer}/${k}`);
    else copy.push(plainCopy(item, depthLimit - 1, `${pointer}/${k}`));
  }
  return copy;
}

function copyFields(value: object, depthLimit: number, pointer: string): Record<string, unknown> {
  requirePlain(value, pointer);
  const copy = Object.create(null) as Record<string, unknown>;
  for (const key of Object.keys(value)) {
    const place = `${pointer}/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`;
    if (UNPAIRED.test(key)) refuse('well-formed text', 'a name with half of a surrogate pair', place);
    const field = (value as Record<string, unknown>)[key];
    if (field !== undefined) copy[key] = plainCopy(field, depthLimit - 1, place);
  }
  return copy;
}

function requirePlain(value: object, pointer: string): void {
  if (typeof (value as { then?: unknown }).then === 'function') {
    const message = 'expected a value at once, got a promise: a generator runs in one go, without async and await';
    throw new Refusal(message, pointer);
  }
  const prototype: unknown = Object.getPrototypeOf(value);
  if (prototype === Object.prototype || prototype === null) return;
  refuse('plain objects and arrays', `an instance of ${className(prototype)}`, pointer);
}

function className(prototype: unknown): string {
  const { constructor } = prototype as { constructor?: { name?: unknown } };
  return typeof constructor?.name === 'string' ? constructor.name : 'a class';
}

/** What kind of value it is, with its article. */
export function describeKind(value: unknown): string {
  if (typeof value === 'object') return 'an object';
  return value === undefined ? 'undefined' : typeof value === 'bigint' ? 'a BigInt' : `a ${typeof value}`;
}

function refuse(expected: string, got: string, pointer: string): never {
  throw new Refusal(`expected ${expected}, got ${got}`, pointer);
}
