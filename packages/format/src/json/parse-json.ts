import { ThalwegError, type ErrorCode } from '@thalweg/core';
import { shorten } from '../describe-value.js';
import { JSON_LIMITS, type JsonLimits } from '../limits.js';
import { decodeText } from './decode-text.js';
import { jsonPointer, type PathSegment } from './json-pointer.js';
import type { JsonValue } from './json-value.js';
import { TextScanner } from './text-scanner.js';

/**
 * Reads strict JSON (RFC 8259 within I-JSON, RFC 7493): no duplicate keys, no lone surrogates, no number beyond the double
 * range, bounded depth and length. Bytes must be UTF-8; a byte order mark is skipped.
 * Throws `not-json`, `duplicate-key`, `not-finite`, `unknown-field` (for `__proto__`) or `too-large`, with line and column.
 */
export function parseJson(source: string | Uint8Array, limits: JsonLimits = JSON_LIMITS): JsonValue {
  if (source.length > limits.length) {
    const message = `expected at most ${limits.length} characters of JSON, got ${source.length}; move large matrices to .npy files`;
    throw new ThalwegError('too-large', message, { details: { limit: limits.length, length: source.length } });
  }
  const text = typeof source === 'string' ? source : decodeText(source);
  return new Reader(new TextScanner(text), limits.depth).document();
}

const NUMBER = /-?(?:0|[1-9]\d*)(?:\.\d+)?(?:[eE][+-]?\d+)?/y;
/** Anything but a double quote, a backslash and the control characters below the space. */
const PLAIN_TEXT = /[ !#-[\]-\uffff]*/y;
const LONE_SURROGATE = /\p{Surrogate}/u;
const HEX4 = /[0-9a-fA-F]{4}/y;
const ESCAPES: Record<string, string> = {
  '"': '"',
  '\\': '\\',
  '/': '/',
  b: '\b',
  f: '\f',
  n: '\n',
  r: '\r',
  t: '\t',
};
const LITERALS = new Map<string, JsonValue>([
  ['true', true],
  ['false', false],
  ['null', null],
]);

class Reader {
  private readonly scan: TextScanner;
  private readonly maxDepth: number;
  /** Where the reader is; null in a container whose first key has not been read. */
  private readonly path: (PathSegment | null)[] = [];

  constructor(scan: TextScanner, maxDepth: number) {
    this.scan = scan;
    this.maxDepth = maxDepth;
  }

  document(): JsonValue {
    const value = this.value();
    this.scan.skipSpace();
    if (this.scan.next !== undefined) this.unexpected('the end of the text after the document', 'remove what follows');
    return value;
  }

  private value(): JsonValue {
    this.scan.skipSpace();
    switch (this.scan.next) {
      case '{':
        return this.object();
      case '[':
        return this.array();
      case '"':
        return this.string();
      default:
        return this.scalar();
    }
  }

  private object(): JsonValue {
    const result: Record<string, JsonValue> = {};
    this.enter();
    if (!this.scan.take('}')) {
      do {
        const key = this.key(result);
        if (!this.scan.take(':')) this.unexpected(`":" after ${quote(key)}`, 'add the colon');
        result[key] = this.value();
      } while (this.scan.take(','));
      if (!this.scan.take('}')) this.unexpected('"," or "}" in an object', 'close the object or add the comma');
    }
    this.path.pop();
    return result;
  }

  private key(object: Record<string, JsonValue>): string {
    this.scan.skipSpace();
    if (this.scan.next !== '"') {
      this.unexpected('a field name in double quotes', 'remove a trailing comma or add the quotes');
    }
    const start = this.scan.position;
    const key = this.string();
    this.path[this.path.length - 1] = key;
    if (Object.hasOwn(object, key)) {
      this.fail('duplicate-key', `expected each field once, got ${quote(key)} again`, 'remove one of them', start);
    }
    if (key === '__proto__') {
      this.fail('unknown-field', 'expected the fields of a document, got "__proto__"', 'remove it', start);
    }
    return key;
  }

  private array(): JsonValue {
    const result: JsonValue[] = [];
    this.enter();
    if (!this.scan.take(']')) {
      do {
        this.path[this.path.length - 1] = result.length;
        result.push(this.value());
      } while (this.scan.take(','));
      if (!this.scan.take(']')) this.unexpected('"," or "]" in a list', 'close the list or add the comma');
    }
    this.path.pop();
    return result;
  }

  private scalar(): JsonValue {
    const start = this.scan.position;
    const digits = this.scan.match(NUMBER);
    const rest = this.scan.word();
    if (digits !== '' && rest === '') {
      const value = Number(digits);
      if (Number.isFinite(value)) return value;
      const problem = `expected a number below 1.8e308 in size, got ${shorten(digits)}`;
      this.fail('not-finite', problem, 'write a finite number', start);
    }
    const literal = LITERALS.get(rest);
    if (digits === '' && literal !== undefined) return literal;
    this.scan.position = start;
    if (/^[+-]?(nan|inf|infinity)$/i.test(rest)) {
      this.fail('not-finite', `expected a finite number, got ${rest}`, 'JSON has no such number: leave it out');
    }
    this.unexpected('a JSON value', 'write a number, a text in double quotes, [...], {...}, true, false or null');
  }

  private string(): string {
    const start = this.scan.position++;
    let value = '';
    for (;;) {
      value += this.scan.match(PLAIN_TEXT);
      if (this.scan.next === '"') break;
      if (this.scan.next === undefined) this.unexpected('a text to end', 'close it with a double quote');
      if (this.scan.next !== '\\') {
        this.unexpected('no control character inside a text', 'write line breaks as \\n and tabs as \\t');
      }
      this.scan.position++;
      value += this.escape();
    }
    this.scan.position++;
    if (LONE_SURROGATE.test(value)) {
      const problem = 'expected Unicode text, got half of a surrogate pair';
      this.fail('not-json', problem, 'write both halves or remove it', start);
    }
    return value;
  }

  private escape(): string {
    const letter = this.scan.next ?? '';
    if (letter === 'u') {
      this.scan.position++;
      const hex = this.scan.match(HEX4);
      if (hex === '') this.unexpected('four hexadecimal digits after \\u', 'write for example \\u03c3');
      return String.fromCharCode(Number.parseInt(hex, 16));
    }
    const value = ESCAPES[letter];
    if (value === undefined) {
      this.unexpected('an escape such as \\n or \\" after a backslash', 'double the backslash to mean itself');
    }
    this.scan.position++;
    return value;
  }

  private enter(): void {
    if (this.path.length === this.maxDepth) {
      this.fail('too-large', `expected at most ${this.maxDepth} levels of nesting, got more`, 'flatten the document');
    }
    this.path.push(null);
    this.scan.position++;
  }

  private unexpected(expected: string, advice: string): never {
    this.fail('not-json', `expected ${expected}, got ${this.scan.found()}`, advice);
  }

  private fail(code: ErrorCode, problem: string, advice: string, offset = this.scan.position): never {
    const { line, column } = this.scan.place(offset);
    throw new ThalwegError(code, `${problem} (line ${line}, column ${column}); ${advice}`, {
      pointer: jsonPointer(this.path.filter((segment) => segment !== null)),
      details: { line, column, offset },
    });
  }
}

function quote(text: string): string {
  return JSON.stringify(shorten(text));
}
