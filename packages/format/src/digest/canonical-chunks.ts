import { canonicalJson } from '../json/canonical-json.js';
import type { JsonValue } from '../json/json-value.js';
import type { DecodedMatrix } from '../matrix/decode-matrix.js';
import { isReal } from '../matrix/encode-matrix.js';
import { matrixRows } from '../matrix/matrix-rows.js';

/**
 * The canonical text (RFC 8785) of JSON data with decoded matrices in it, each written densely, in pieces of at most one matrix
 * row: a ten-qubit model is hashed without ever holding its dense text. Fields that are undefined are left out.
 */
export function* canonicalChunks(value: unknown): Generator<string> {
  if (isMatrix(value)) {
    yield* matrixChunks(value);
  } else if (Array.isArray(value)) {
    yield* listChunks(value);
  } else if (typeof value === 'object' && value !== null) {
    yield* objectChunks(value as Record<string, unknown>);
  } else {
    yield canonicalJson(value as JsonValue);
  }
}

function* listChunks(list: readonly unknown[]): Generator<string> {
  let separator = '[';
  for (const item of list) {
    yield separator;
    yield* canonicalChunks(item);
    separator = ',';
  }
  yield separator === '[' ? '[]' : ']';
}

/** Keys in the order of their UTF-16 units, which is the default order of `sort`. */
function* objectChunks(object: Record<string, unknown>): Generator<string> {
  let separator = '{';
  for (const key of Object.keys(object).sort()) {
    if (object[key] === undefined) continue;
    yield `${separator}${canonicalJson(key)}:`;
    yield* canonicalChunks(object[key]);
    separator = ',';
  }
  yield separator === '{' ? '{}' : '}';
}

function* matrixChunks(matrix: DecodedMatrix): Generator<string> {
  if (isReal(matrix)) {
    yield* rowChunks(matrix, 're');
    return;
  }
  yield '{"im":';
  yield* rowChunks(matrix, 'im');
  yield ',"re":';
  yield* rowChunks(matrix, 're');
  yield '}';
}

/** `Array.join` writes a number as RFC 8785 asks: both follow ECMAScript's Number::toString. */
function* rowChunks(matrix: DecodedMatrix, part: 're' | 'im'): Generator<string> {
  let separator = '[';
  for (const row of matrixRows(matrix, part)) {
    yield `${separator}[${row.join(',')}]`;
    separator = ',';
  }
  yield ']';
}

function isMatrix(value: unknown): value is DecodedMatrix {
  return typeof value === 'object' && value !== null && 're' in value && value.re instanceof Float64Array;
}
