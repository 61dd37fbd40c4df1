import type { GeneratorRun } from '@thalweg/sandbox';
import type { Sandbox } from '@thalweg/sandbox/node';
import { createPool } from './compute/pool.js';
import type { TASKS } from './compute/tasks.js';
import { inDocument } from './input/in-document.js';
import { createOutput, type OutputOptions } from './output/output.js';
import type { Session } from './session.js';
import type { Terminal } from './terminal.js';

/** Generators that run at once, at most; each has a process, started when it is needed. */
const SANDBOX_PROCESSES = 256;

/** A session, and what it says an interrupt leaves behind; null for nothing. */
export interface OpenSession extends Session {
  readonly kept: () => string | null;
}

/** The session of one command line; `signal` interrupts its computations. */
export function createSession(terminal: Terminal, options: OutputOptions, signal: AbortSignal): OpenSession {
  const output = createOutput(terminal, options);
  const generate = sandboxed(signal);
  let kept: string | null = null;
  return {
    terminal,
    output,
    signal,
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
    generate,
    keep: (text) => {
      kept = text;
    },
    kept: () => kept,
  };
}

/** The sandbox is loaded when the first generator runs, and ended by an interrupt. */
function sandboxed(signal: AbortSignal): Session['generate'] {
  let opened: Promise<Sandbox> | null = null;
  const open = async (): Promise<Sandbox> => {
    const { createSandbox } = await import('@thalweg/sandbox/node');
    const sandbox = createSandbox({ processes: SANDBOX_PROCESSES });
    if (signal.aborted) sandbox.close();
    signal.addEventListener('abort', () => sandbox.close(), { once: true });
    return sandbox;
  };
  return async (run: GeneratorRun, name: string) => {
    opened ??= open();
    const sandbox = await opened;
    try {
      return (await sandbox.run(run)).json;
    } catch (error) {
      return inDocument(name, () => {
        throw error;
      });
    }
  };
}
