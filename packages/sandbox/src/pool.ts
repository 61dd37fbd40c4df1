import { ThalwegError } from '@thalweg/core';
import { completeRun, type CompleteRun, type GeneratorResult, type GeneratorRun } from './generator-run.js';
import { readReply } from './reply.js';

/** Runs generators where they can do no harm. */
export interface Sandbox {
  /**
   * Runs a generator as soon as a process or worker is free. Throws `generator-failed` with its message and line, `time-limit`, `too-large` beyond
   * the limits on memory and output, `usage` for a run that cannot be meant, `interrupted` after `close`.
   */
  run(run: GeneratorRun): Promise<GeneratorResult>;
  /** Ends the processes or workers at once, and with them whatever runs. */
  close(): void;
}

/** What runs generators, one at a time, and can be ended from outside. */
export interface Guarded {
  readonly alive: boolean;
  run(run: CompleteRun): Promise<unknown>;
  kill(): void;
}

/** A sandbox of at most so many guarded runners; they start when there is work and are kept for the next. */
export function createPool(start: () => Guarded, size: number): Sandbox {
  const idle: Guarded[] = [];
  const all = new Set<Guarded>();
  const waiting: (() => void)[] = [];
  let free = size;
  let closed = false;

  const runOnce = async (complete: CompleteRun): Promise<unknown> => {
    if (closed) return null;
    const runner = takeAlive(idle) ?? start();
    all.add(runner);
    const reply = await runner.run(complete);
    if (runner.alive) idle.push(runner);
    else all.delete(runner);
    return reply;
  };

  const run = async (request: GeneratorRun): Promise<GeneratorResult> => {
    const complete = completeRun(request);
    if (free > 0) free -= 1;
    else await new Promise<void>((resolve) => waiting.push(resolve));
    try {
      const reply = await runOnce(complete);
      if (closed) throw new ThalwegError('interrupted', 'the sandbox was closed before the generator came to an end');
      return readReply(reply);
    } finally {
      const next = waiting.shift();
      if (next) next();
      else free += 1;
    }
  };

  const close = (): void => {
    closed = true;
    for (const runner of all) runner.kill();
    all.clear();
  };

  return { run, close };
}

/** One that did not end while it was idle. */
function takeAlive(idle: Guarded[]): Guarded | null {
  for (let runner = idle.pop(); runner !== undefined; runner = idle.pop()) {
    if (runner.alive) return runner;
  }
  return null;
}
