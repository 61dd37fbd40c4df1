import { Refusal } from './refusal.js';

/** A fault as plain data. */
export interface InsideFault {
  readonly message: string;
  readonly pointer?: string | undefined;
  /** Place in `generate.js`, from 1. */
  readonly line?: number | undefined;
  readonly column?: number | undefined;
  readonly outOfMemory?: boolean;
  /** It threw null: so does the interpreter when there is no memory left for an error. */
  readonly isNull?: boolean;
}

const PLACE = /generate\.js:(\d+)(?::(\d+))?/;

/** Whatever was thrown, as plain data; an object whose parts throw themselves is only called so. */
export function describeError(error: unknown): InsideFault {
  try {
    if (error instanceof Refusal) return { message: error.message, pointer: error.pointer };
    if (!(error instanceof Error)) {
      return { message: `it threw ${shown(error)}, which is no Error`, isNull: error === null };
    }
    const name = String(error.name);
    const message = String(error.message);
    const [, line, column] = PLACE.exec(String(error.stack)) ?? [];
    return {
      message: `${name}: ${message}`,
      outOfMemory: name === 'InternalError' && message === 'out of memory',
      ...(line !== undefined && { line: Number(line) }),
      ...(column !== undefined && { column: Number(column) }),
    };
  } catch {
    return { message: 'it threw something that cannot be shown' };
  }
}

function shown(value: unknown): string {
  if (typeof value === 'string') return JSON.stringify(value.slice(0, 200));
  return typeof value === 'object' && value !== null ? 'an object' : String(value).slice(0, 200);
}
