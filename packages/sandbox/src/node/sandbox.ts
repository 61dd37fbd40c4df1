import { ThalwegError } from '@thalweg/core';
import { completeRun, type CompleteRun, type GeneratorResult, type GeneratorRun } from '../generator-run.js';
import { readReply } from '../reply.js';
import { processScript } from './process-script.js';
import { GuardedProcess } from './guarded-process.js';

/** Runs generators in processes of its own. */
export interface Sandbox {
  /**
   * Runs a generator as soon as a process is free. Throws `generator-failed` with its message and line, `time-limit`, `too-large` beyond the
   * limits on memory and output, `usage` for a run that cannot be meant, `interrupted` after `close`.
   */
  run(run: GeneratorRun): Promise<GeneratorResult>;
  /** Ends the processes at once, and with them whatever runs. */
  close(): void;
}

/** A sandbox of at most so many processes; they start when there is work, are kept for the next, and end with this program. */
export function createSandbox({ processes = 1 }: { readonly processes?: number } = {}): Sandbox {
  const script = processScript();
  const idle: GuardedProcess[] = [];
  const all = new Set<GuardedProcess>();
  const waiting: (() => void)[] = [];
  let free = processes;
  let closed = false;

  const run = async (request: GeneratorRun): Promise<GeneratorResult> => {
    const complete = completeRun(request);
    if (free > 0) free -= 1;
    else await new Promise<void>((resolve) => waiting.push(resolve));
    try {
      return readReply(await runOnce(complete));
    } catch (error) {
      throw closed ? closedError() : error;
    } finally {
      const next = waiting.shift();
      if (next) next();
      else free += 1;
    }
  };

  const runOnce = async (complete: CompleteRun): Promise<unknown> => {
    if (closed) throw closedError();
    const process = idle.pop() ?? new GuardedProcess(script);
    all.add(process);
    const reply = await process.run(complete);
    if (process.alive) idle.push(process);
    else all.delete(process);
    return reply;
  };

  const close = (): void => {
    closed = true;
    for (const process of all) process.kill();
    all.clear();
  };

  return { run, close };
}

function closedError(): ThalwegError {
  return new ThalwegError('interrupted', 'the sandbox was closed while a generator ran or waited');
}
