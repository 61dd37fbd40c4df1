import type { Output } from './output/output.js';
import type { Terminal } from './terminal.js';

/** What an effect may use of the outside world. */
export interface Session {
  readonly terminal: Terminal;
  readonly output: Output;
  /** Aborted by SIGINT or SIGTERM. */
  readonly signal: AbortSignal;
}
