import type { Pool } from './compute/pool.js';
import type { TASKS } from './compute/tasks.js';
import type { Output } from './output/output.js';
import type { Terminal } from './terminal.js';

/** The options that bound a computation. */
export interface ComputeLimits {
  readonly threads: number;
  /** Milliseconds; null for no limit. */
  readonly timeLimit: number | null;
}

/** What an effect may use of the outside world. */
export interface Session {
  readonly terminal: Terminal;
  readonly output: Output;
  /** Gives `work` a pool of threads, and ends them when it is done. An interrupt ends them at once. */
  compute<Result>(limits: ComputeLimits, work: (pool: Pool<typeof TASKS>) => Promise<Result>): Promise<Result>;
}
