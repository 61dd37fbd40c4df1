import { ThalwegError } from '@thalweg/core';

/**
 * Reads or analyses a document; its errors say which document it was (`details.document`). A constructor's complaint about a
 * value that stands in the document is a fault of the document, not of the command line.
 */
export function inDocument<Result>(name: string, run: () => Result): Result {
  try {
    return run();
  } catch (error) {
    if (!(error instanceof ThalwegError) || error.details?.document !== undefined) throw error;
    const { message, pointer, details } = error;
    const code = error.code === 'usage' && pointer !== undefined ? 'wrong-schema' : error.code;
    throw new ThalwegError(code, message, {
      ...(pointer === undefined ? {} : { pointer }),
      details: { ...details, document: name },
      cause: error,
    });
  }
}
