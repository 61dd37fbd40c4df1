import type { GeneratorRun } from '@thalweg/sandbox';
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
  /** Aborted by an interrupt. */
  readonly signal: AbortSignal;
  /** Gives `work` a pool of threads, and ends them when it is done. An interrupt ends them at once. */
  compute<Result>(limits: ComputeLimits, work: (pool: Pool<typeof TASKS>) => Promise<Result>): Promise<Result>;
  /**
   * Runs an example's generator in the sandbox and resolves to the JSON text of what it returned; `name` names it in errors. As
   * many run at once as are asked for. An interrupt ends them at once.
   */
  generate(run: GeneratorRun, name: string): Promise<string>;
  /** Says what stays when an interrupt comes from now on. */
  keep(text: string): void;
}
