import { ThalwegError, type ErrorCode } from '@thalweg/core';
import { jsonPointer, type PathSegment } from './json/json-pointer.js';

/** What is wrong inside a value that has the right JSON types, and where, counted from that value. */
export interface Fault {
  readonly code: ErrorCode;
  readonly message: string;
  readonly path: readonly PathSegment[];
  readonly details?: Record<string, unknown>;
}

export function fault(
  code: ErrorCode,
  message: string,
  path: readonly PathSegment[] = [],
  details?: Record<string, unknown>,
): Fault {
  return { code, message, path, ...(details && { details }) };
}

/** The fault as an error; `base` is the pointer of the value it was found in. */
export function faultError({ code, message, path, details }: Fault, base = ''): ThalwegError {
  return new ThalwegError(code, message, { pointer: base + jsonPointer(path), ...(details && { details }) });
}
