import type { z } from 'zod';
import { ERROR_CODES, type ErrorCode } from '@thalweg/core';
import { count, describeValue } from '../describe-value.js';
import type { Fault } from '../fault.js';
import { jsonPointer, type PathSegment } from '../json/json-pointer.js';
import { valueAt } from '../json/value-at.js';
import { mainIssue, type Issue } from './main-issue.js';

/** The one fault to report for a value that a schema refused. */
export function describeFailure(error: z.ZodError, root: unknown): Fault {
  return describeIssue(mainIssue(error.issues, root), root);
}

function describeIssue(issue: Issue, root: unknown): Fault {
  const path = issue.path as PathSegment[];
  if (issue.code === 'custom') return describeCustom(issue);
  if (issue.code === 'unrecognized_keys') return describeUnknownField(issue);
  const value = valueAt(root, path);
  const name = path.at(-1);
  const missing = value === undefined && name !== undefined;
  const advice = missing
    ? `add ${typeof name === 'number' ? `item ${name}` : `the field "${name}"`}`
    : correction(path);
  const code: ErrorCode = typeof value === 'number' && !Number.isFinite(value) ? 'not-finite' : 'wrong-schema';
  return { code, path, message: `expected ${expectation(issue)}, got ${describeValue(value)}; ${advice}` };
}

/** The message of a `withoutFault` check, complete as it is. */
function describeCustom(issue: Issue & { code: 'custom' }): Fault {
  const { code, details } = (issue.params ?? {}) as { code?: ErrorCode; details?: Record<string, unknown> };
  const known = code !== undefined && code in ERROR_CODES ? code : 'wrong-schema';
  return { code: known, path: issue.path as PathSegment[], message: issue.message, ...(details && { details }) };
}

/** `strict` puts the names of the known fields into the message. */
function describeUnknownField(issue: Issue & { code: 'unrecognized_keys' }): Fault {
  const [key = ''] = issue.keys;
  const path = [...(issue.path as PathSegment[]), key];
  const message = `expected only the fields ${issue.message}, got ${JSON.stringify(key)}; remove it or correct its spelling`;
  return { code: 'unknown-field', path, message };
}

function expectation(issue: Issue): string {
  if (issue.message.startsWith('expected ')) return issue.message.slice('expected '.length);
  switch (issue.code) {
    case 'invalid_type':
      return TYPE_NAMES[issue.expected] ?? issue.expected;
    case 'invalid_value':
      return alternatives(issue.values);
    case 'invalid_union':
      return 'options' in issue ? alternatives(issue.options as unknown[]) : 'plain JSON data';
    case 'too_small':
      return sized(issue.origin, 'at least', issue.minimum, issue.inclusive);
    case 'too_big':
      return sized(issue.origin, 'at most', issue.maximum, issue.inclusive);
    default:
      return 'another value';
  }
}

const TYPE_NAMES: Record<string, string> = {
  number: 'a number',
  int: 'a whole number',
  string: 'a text',
  boolean: 'true or false',
  array: 'a list',
  tuple: 'a list',
  object: 'an object',
  record: 'an object',
  null: 'null',
};

function alternatives(values: readonly unknown[]): string {
  const shown = values.map((value) => JSON.stringify(value));
  return shown.length > 1 ? `one of ${shown.join(', ')}` : (shown[0] ?? 'another value');
}

function sized(origin: string, relation: 'at least' | 'at most', bound: number | bigint, inclusive = true): string {
  if (origin === 'array') return `a list of ${relation} ${count(Number(bound), 'item')}`;
  if (origin === 'string') return `a text of ${relation} ${count(Number(bound), 'character')}`;
  const strictly = relation === 'at least' ? 'above' : 'below';
  return `a number ${inclusive ? `of ${relation}` : strictly} ${bound}`;
}

function correction(path: readonly PathSegment[]): string {
  return path.length === 0 ? 'correct the document' : `correct ${jsonPointer(path)}`;
}
