import { ThalwegError } from '@thalweg/core';
import { describeValue } from '../describe-value.js';
import { NPY_HEADER_LIMIT } from '../limits.js';

/** What the header of a NumPy file says (format versions 1.0, 2.0 and 3.0, numpy.lib.format). */
export interface NpyHeader {
  /** The type of an entry as NumPy writes it, for example "<c16". */
  readonly descr: string;
  readonly fortranOrder: boolean;
  readonly shape: readonly number[];
  /** Offset of the first entry. */
  readonly dataOffset: number;
}

/**
 * Reads the header, a Python dictionary of exactly descr, fortran_order and shape, by its own small grammar: nothing is evaluated.
 * Throws `bad-file`, `truncated-file`, `not-supported` or `too-large`.
 */
export function readNpyHeader(bytes: Uint8Array): NpyHeader {
  const version = readVersion(bytes);
  const lengthBytes = version === 1 ? 2 : 4;
  const start = 8 + lengthBytes;
  requireBytes(bytes, start);
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const length = version === 1 ? view.getUint16(8, true) : view.getUint32(8, true);
  if (length > NPY_HEADER_LIMIT) {
    throw new ThalwegError(
      'too-large',
      `expected a NumPy header of at most ${NPY_HEADER_LIMIT} bytes, got ${length}; save the array again with numpy.save`,
    );
  }
  requireBytes(bytes, start + length);
  const text = new TextDecoder(version === 3 ? 'utf-8' : 'latin1').decode(bytes.subarray(start, start + length));
  return { ...parseDictionary(text), dataOffset: start + length };
}

const MAGIC = [0x93, 0x4e, 0x55, 0x4d, 0x50, 0x59];

function readVersion(bytes: Uint8Array): number {
  if (MAGIC.some((byte, k) => k < bytes.length && bytes[k] !== byte)) {
    throw new ThalwegError(
      'bad-file',
      'expected a NumPy file (it starts with \\x93NUMPY), got other bytes; save the array with numpy.save',
    );
  }
  requireBytes(bytes, 8);
  const [major = 0, minor = 0] = bytes.subarray(6, 8);
  if (major >= 1 && major <= 3 && minor === 0) return major;
  throw new ThalwegError(
    'not-supported',
    `expected NumPy file format 1.0, 2.0 or 3.0, got ${major}.${minor}; save the array again with numpy.save`,
  );
}

function requireBytes(bytes: Uint8Array, needed: number): void {
  if (bytes.length >= needed) return;
  throw new ThalwegError(
    'truncated-file',
    `expected a NumPy header of ${needed} bytes, got a file of ${bytes.length}; copy the file again`,
    {
      details: { needed, length: bytes.length },
    },
  );
}

const TOKEN = /\s*(?:'([^'\\]*)'|"([^"\\]*)"|(\d+)L?(?![\w.])|(True|False)(?!\w)|([{}():,[\]]))/y;

type Token = string | number | boolean | { readonly mark: string };

function parseDictionary(text: string): Omit<NpyHeader, 'dataOffset'> {
  const tokens = new Tokens(text);
  const fields = new Map<string, unknown>();
  tokens.expect('{');
  while (!tokens.take('}')) {
    const key = tokens.next();
    if (typeof key !== 'string' || fields.has(key)) throw tokens.fault('each field once, in quotes');
    tokens.expect(':');
    fields.set(key, key === 'shape' ? readShape(tokens) : readScalar(tokens));
    if (!tokens.take(',')) {
      tokens.expect('}');
      break;
    }
  }
  tokens.end();
  return checkFields(fields);
}

function readScalar(tokens: Tokens): string | boolean {
  const value = tokens.next();
  if (typeof value === 'object' && value.mark === '[') {
    throw new ThalwegError(
      'not-supported',
      'expected an array of numbers, got a structured NumPy array; save its numeric field alone',
    );
  }
  if (typeof value === 'string' || typeof value === 'boolean') return value;
  throw tokens.fault('a text in quotes, True or False');
}

function readShape(tokens: Tokens): number[] {
  const shape: number[] = [];
  tokens.expect('(');
  while (!tokens.take(')')) {
    const length = tokens.next();
    if (typeof length !== 'number') throw tokens.fault('a shape such as (2, 2)');
    shape.push(length);
    if (!tokens.take(',')) {
      tokens.expect(')');
      break;
    }
  }
  return shape;
}

function checkFields(fields: Map<string, unknown>): Omit<NpyHeader, 'dataOffset'> {
  const descr = fields.get('descr');
  const fortranOrder = fields.get('fortran_order');
  const shape = fields.get('shape');
  if (fields.size === 3 && typeof descr === 'string' && typeof fortranOrder === 'boolean' && shape) {
    return { descr, fortranOrder, shape: shape as number[] };
  }
  const got = [...fields.keys()].slice(0, 5).map(describeValue).join(', ') || 'none';
  throw new ThalwegError(
    'bad-file',
    `expected a NumPy header with descr, fortran_order and shape, got ${got}; save the array again with numpy.save`,
  );
}

/** The header as tokens: texts, whole numbers, booleans and punctuation. Anything else is a fault. */
class Tokens {
  private readonly text: string;
  private position = 0;

  constructor(text: string) {
    this.text = text;
  }

  next(): Token {
    TOKEN.lastIndex = this.position;
    const found = TOKEN.exec(this.text);
    if (!found) throw this.fault('a Python dictionary of texts, numbers and booleans');
    this.position = TOKEN.lastIndex;
    const [, single, double, digits, boolean, mark] = found;
    if (mark !== undefined) return { mark };
    if (digits !== undefined) return Number(digits);
    return boolean !== undefined ? boolean === 'True' : (single ?? double ?? '');
  }

  take(mark: string): boolean {
    const start = this.position;
    const token = this.next();
    if (typeof token === 'object' && token.mark === mark) return true;
    this.position = start;
    return false;
  }

  expect(mark: string): void {
    if (!this.take(mark)) throw this.fault(`"${mark}"`);
  }

  end(): void {
    if (this.text.slice(this.position).trim() !== '') throw this.fault('nothing after the dictionary');
  }

  fault(expected: string): ThalwegError {
    const rest = this.text.slice(this.position).trim();
    const got = rest === '' ? 'its end' : describeValue(rest);
    return new ThalwegError(
      'bad-file',
      `expected ${expected} in the NumPy header, got ${got}; save the array again with numpy.save`,
    );
  }
}
