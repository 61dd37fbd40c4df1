import { ThalwegError } from '@thalweg/core';
import { EXIT_STATUS, EXIT_STATUS_OF_ERROR, type ExitStatus } from '../exit-status.js';
import type { Terminal } from '../terminal.js';
import { colours } from './colours.js';

export interface ErrorStyle {
  readonly json: boolean;
  readonly color: boolean;
}

/**
 * Writes an error to stderr, as one message or as one JSON document, and returns the exit code that belongs to it. An error
 * that is not a ThalwegError is a fault of the program; its stack is shown only when THALWEG_DEBUG is set.
 */
export function printError(error: unknown, terminal: Terminal, style: ErrorStyle): ExitStatus {
  const known = error instanceof ThalwegError ? error : internalError(error);
  const status = EXIT_STATUS_OF_ERROR[known.code] ?? EXIT_STATUS.internal;
  terminal.stderr.write(style.json ? asJson(known, status) : asText(known, terminal, style));
  if (terminal.env.THALWEG_DEBUG) terminal.stderr.write(`${debugText(error)}\n`);
  return status;
}

function internalError(error: unknown): ThalwegError {
  const reason = error instanceof Error ? error.message : String(error);
  return new ThalwegError(
    'internal',
    `internal error: ${reason}. This is a fault of thalweg: please report it with the command and its input`,
    { cause: error },
  );
}

function asText(error: ThalwegError, terminal: Terminal, style: ErrorStyle): string {
  const paint = colours(terminal.stderr, terminal.env, style.color);
  return `${paint.red('thalweg:')} ${error.message}${place(error)}\n`;
}

/** Longer pointers are shown by their ends; --json has them whole. */
const POINTER_ROOM = 120;

/** ` (at /generator/jumps/0/rate of m.json)`, as much of it as is known. */
function place({ pointer, details }: ThalwegError): string {
  const name = typeof details?.document === 'string' ? details.document : null;
  if (pointer === undefined) return name === null ? '' : ` (in ${name})`;
  const half = POINTER_ROOM / 2;
  const shown = pointer.length <= POINTER_ROOM ? pointer : `${pointer.slice(0, half)}…${pointer.slice(-half)}`;
  return ` (at ${shown === '' ? 'the top' : shown}${name === null ? '' : ` of ${name}`})`;
}

function asJson(error: ThalwegError, exitStatus: ExitStatus): string {
  const { code, message, pointer, details } = error;
  return `${JSON.stringify({ schema: 'thalweg.error/1', code, message, pointer, details, exitStatus })}\n`;
}

function debugText(error: unknown): string {
  return error instanceof Error ? (error.stack ?? error.message) : String(error);
}
