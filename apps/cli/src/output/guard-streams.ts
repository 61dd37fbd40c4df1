import { ThalwegError } from '@thalweg/core';
import type { OutputStream, Terminal } from '../terminal.js';

export interface StreamGuard {
  /** Waits until all results are written; throws `cannot-write` when they could not be. */
  flush(): Promise<void>;
  /** Stops guarding. */
  release(): void;
}

/**
 * Hears the errors of stdout and stderr. A reader that went away (EPIPE) is no error: what is written to it is dropped. Any
 * other failure of stdout loses results and is told by `flush`; there is nowhere to tell a failure of stderr.
 */
export function guardStreams({ stdout, stderr }: Pick<Terminal, 'stdout' | 'stderr'>): StreamGuard {
  let failure: NodeJS.ErrnoException | null = null;
  const onOutputError = (error: NodeJS.ErrnoException) => {
    if (!isClosedPipe(error)) failure ??= error;
  };
  const onNoteError = () => undefined;
  stdout.on('error', onOutputError);
  stderr.on('error', onNoteError);
  return {
    flush: async () => {
      await drained(stdout);
      if (failure === null) return;
      throw new ThalwegError('cannot-write', `cannot write to standard output: ${failure.message}`, { cause: failure });
    },
    release: () => {
      stdout.off('error', onOutputError);
      stderr.off('error', onNoteError);
    },
  };
}

function drained(stream: OutputStream): Promise<void> {
  return new Promise((resolve) => {
    if (stream.destroyed) resolve();
    // An error event follows the callback of the write that failed, so look only after it.
    else stream.write('', () => setImmediate(resolve));
  });
}

function isClosedPipe(error: NodeJS.ErrnoException): boolean {
  return error.code === 'EPIPE' || error.code === 'ERR_STREAM_DESTROYED';
}
