import { ERROR_CODES, ThalwegError, type ErrorCode } from '@thalweg/core';

/** What a task may ask of the thread it runs on. */
export interface TaskContext {
  /** True once the time limit has passed: a search then returns the best it has. */
  readonly isOutOfTime: () => boolean;
  /** Shows one line of progress to the person waiting. */
  readonly progress: (text: string) => void;
}

/** A heavy computation: plain data in, plain data out, no other effect. It may be a promise. */
export type Task<Input, Result> = (input: Input, context: TaskContext) => Result | Promise<Result>;

/** Named tasks. Inputs and results cross threads by structured clone. */
// eslint-disable-next-line @typescript-eslint/no-explicit-any -- a registry holds tasks of every input; callers see each task's own type.
export type TaskRegistry = Readonly<Record<string, Task<any, unknown>>>;

/** Main thread to worker: run one task. */
export interface TaskRequest {
  readonly index: number;
  readonly name: string;
  readonly input: unknown;
  /** Milliseconds since 1970 after which the task should stop; null for no limit. */
  readonly deadline: number | null;
}

/** Worker to main thread. */
export type TaskReply =
  | { readonly kind: 'progress'; readonly index: number; readonly text: string }
  | { readonly kind: 'done'; readonly index: number; readonly result: unknown }
  | { readonly kind: 'failed'; readonly index: number; readonly error: ErrorRecord };

/** An error as plain data. `code` is null for an error that is not a ThalwegError. */
export interface ErrorRecord {
  readonly code: ErrorCode | null;
  readonly message: string;
  readonly stack: string | undefined;
  readonly pointer: string | undefined;
  readonly details: Record<string, unknown> | undefined;
}

export function recordError(error: unknown): ErrorRecord {
  const record = { code: null, message: String(error), stack: undefined, pointer: undefined, details: undefined };
  if (!(error instanceof Error)) return record;
  const { message, stack } = error;
  if (!(error instanceof ThalwegError)) return { ...record, message, stack };
  return { code: error.code, message, stack, pointer: error.pointer, details: plainDetails(error.details) };
}

export function restoreError(record: ErrorRecord): Error {
  const { code, message, pointer, details } = record;
  if (code === null || !(code in ERROR_CODES)) return Object.assign(new Error(message), { stack: record.stack });
  return new ThalwegError(code, message, {
    ...(pointer === undefined ? {} : { pointer }),
    ...(details === undefined ? {} : { details }),
  });
}

/** Details must survive structured clone; what does not is left out. */
function plainDetails(details: Record<string, unknown> | undefined): Record<string, unknown> | undefined {
  if (details === undefined) return undefined;
  try {
    return structuredClone(details);
  } catch {
    return undefined;
  }
}
