import { ThalwegError } from '@thalweg/core';
import type { GeneratorResult } from './generator-run.js';
import { MESSAGE_LIMIT } from './limits.js';

/** Why a run gave nothing. */
export interface RunFault {
  readonly code: 'generator-failed' | 'time-limit' | 'too-large' | 'internal';
  readonly message: string;
  /** JSON pointer into the returned value. */
  readonly pointer?: string;
  /** Place in `generate.js`, from 1. */
  readonly line?: number;
  readonly column?: number;
}

/** What a run came to, as plain data. */
export type RunReply =
  | { readonly json: string }
  /** `poisoned`: the host itself threw, so that nothing in the thread can be trusted any more. */
  | { readonly fault: RunFault; readonly poisoned?: boolean };

/** The result, or the fault thrown as an error. A reply of any other shape is an `internal` error: it may come from a broken process. */
export function readReply(reply: unknown): GeneratorResult {
  const { json, fault } = (typeof reply === 'object' && reply !== null ? reply : {}) as Record<string, unknown>;
  if (typeof json === 'string') return { json };
  throw faultError(fault);
}

function faultError(value: unknown): ThalwegError {
  const fault = (typeof value === 'object' && value !== null ? value : {}) as Record<string, unknown>;
  const { code, message, pointer, line, column } = fault;
  if (!isCode(code) || typeof message !== 'string') {
    return new ThalwegError('internal', 'expected a reply of the sandbox, got something else; run it again');
  }
  const place = { ...(isPlace(line) && { line }), ...(isPlace(column) && { column }) };
  return new ThalwegError(code, printable(message), {
    ...(typeof pointer === 'string' && { pointer: printable(pointer) }),
    ...(Object.keys(place).length > 0 && { details: place }),
  });
}

function isCode(code: unknown): code is RunFault['code'] {
  return code === 'generator-failed' || code === 'time-limit' || code === 'too-large' || code === 'internal';
}

function isPlace(value: unknown): value is number {
  return Number.isInteger(value) && (value as number) > 0;
}

/** Texts from inside are shown on terminals and pages: without control characters and of bounded length. */
function printable(text: string): string {
  const plain = text.replace(/[\p{Cc}\p{Cf}\p{Cs}\u2028\u2029]+/gu, ' ');
  return plain.length > MESSAGE_LIMIT ? `${plain.slice(0, MESSAGE_LIMIT)}…` : plain;
}
