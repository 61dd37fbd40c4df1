import { createPool } from './compute/pool.js';
import type { TASKS } from './compute/tasks.js';
import { createOutput, type OutputOptions } from './output/output.js';
import type { Session } from './session.js';
import type { Terminal } from './terminal.js';

/** The session of one command line; `signal` interrupts its computations. */
export function createSession(terminal: Terminal, options: OutputOptions, signal: AbortSignal): Session {
  const output = createOutput(terminal, options);
  return {
    terminal,
    output,
    compute: async (limits, work) => {
      // Beside this module in the bundle; every module of the bundle lies in one folder.
      const worker = new URL('./worker.js', import.meta.url);
      const pool = createPool<typeof TASKS>({ ...limits, worker, signal, progress: output.progress });
      try {
        return await work(pool);
      } finally {
        output.progress('');
        await pool.close();
      }
    },
  };
}
