import { ThalwegError } from '@thalweg/core';

/**
 * Runs a part of a document as if it were the whole; errors get the pointer of the part in front. Fields of the whole that the
 * part inherits keep theirs.
 */
export function withBasePointer<T>(base: string, run: () => T, inherited: readonly string[] = []): T {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof ThalwegError) || error.pointer === undefined || inherited.includes(error.pointer))
      throw error;
    const { code, message, pointer, details } = error;
    throw new ThalwegError(code, message, { pointer: base + pointer, ...(details && { details }), cause: error });
  }
}
