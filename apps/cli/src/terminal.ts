import type { Readable, Writable } from 'node:stream';

/** An output stream that may be a terminal. */
export interface OutputStream extends Writable {
  readonly isTTY?: boolean;
  readonly columns?: number;
}

/** What the command line needs of its surroundings; `process` is one, tests pass their own. */
export interface Terminal {
  readonly stdin: Readable & { readonly isTTY?: boolean };
  readonly stdout: OutputStream;
  readonly stderr: OutputStream;
  readonly env: Readonly<Record<string, string | undefined>>;
  on(event: 'SIGINT' | 'SIGTERM', listener: () => void): unknown;
  off(event: 'SIGINT' | 'SIGTERM', listener: () => void): unknown;
}
