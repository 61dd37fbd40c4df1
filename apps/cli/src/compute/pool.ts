import { Worker } from 'node:worker_threads';
import { ThalwegError } from '@thalweg/core';
import { restoreError, type Task, type TaskRegistry, type TaskReply, type TaskRequest } from './protocol.js';

/** After the time limit a task may still return what it has; this much later its thread is ended. */
const GRACE_MILLISECONDS = 2000;

export interface PoolOptions {
  /** Module that calls `serveTasks`. */
  readonly worker: URL;
  /** Most threads at a time, at least 1. Results do not depend on it. */
  readonly threads: number;
  /** Milliseconds that one call of `run` may take; null for no limit. */
  readonly timeLimit: number | null;
  /** Ends every thread at once and makes `run` throw `interrupted`. */
  readonly signal: AbortSignal;
  readonly progress?: (text: string) => void;
}

/** What became of one task: its result, or none because its thread had to be ended at the time limit. */
export type TaskOutcome<Result> = { readonly done: true; readonly result: Result } | { readonly done: false };

type InputOf<T> = T extends Task<infer Input, unknown> ? Input : never;
type ResultOf<T> = T extends Task<never, infer Result> ? Awaited<Result> : never;

/** Threads that run heavy computations, so that the main thread stays free to answer an interrupt. */
export interface Pool<Registry extends TaskRegistry> {
  /**
   * Runs one task for each input, in any order and on any thread, and resolves to the outcomes in the order of the inputs.
   * When tasks fail, throws the error of the first of them in that order, whichever failed first in time.
   */
  run<Name extends keyof Registry & string>(
    name: Name,
    inputs: readonly InputOf<Registry[Name]>[],
  ): Promise<TaskOutcome<ResultOf<Registry[Name]>>[]>;
  /** Ends the threads. */
  close(): Promise<void>;
}

/** Creates a pool; threads start when there are tasks for them and are kept until `close`. */
export function createPool<Registry extends TaskRegistry>(options: PoolOptions): Pool<Registry> {
  const idle: Worker[] = [];
  return {
    run: (name, inputs) => new Batch(options, idle, name, inputs).run() as Promise<never>,
    close: async () => {
      await Promise.all(idle.splice(0).map((worker) => worker.terminate()));
    },
  };
}

/** One call of `run`. */
class Batch {
  readonly #options: PoolOptions;
  readonly #idle: Worker[];
  readonly #name: string;
  readonly #inputs: readonly unknown[];
  readonly #outcomes: TaskOutcome<unknown>[];
  readonly #busy = new Map<Worker, number>();
  readonly #deadline: number | null;
  #next = 0;
  #failure: { index: number; error: unknown } | null = null;
  #settle: () => void = () => undefined;

  constructor(options: PoolOptions, idle: Worker[], name: string, inputs: readonly unknown[]) {
    this.#options = options;
    this.#idle = idle;
    this.#name = name;
    this.#inputs = inputs;
    this.#outcomes = inputs.map(() => ({ done: false }));
    this.#deadline = options.timeLimit === null ? null : Date.now() + options.timeLimit;
  }

  async run(): Promise<TaskOutcome<unknown>[]> {
    const { signal, timeLimit } = this.#options;
    const interrupt = () => {
      this.#stop({ index: -1, error: new ThalwegError('interrupted', 'interrupted: nothing was written') });
    };
    const timer = timeLimit === null ? null : setTimeout(() => this.#stop(null), timeLimit + GRACE_MILLISECONDS);
    signal.addEventListener('abort', interrupt, { once: true });
    try {
      await new Promise<void>((resolve) => {
        this.#settle = resolve;
        if (signal.aborted) interrupt();
        else this.#startMore();
      });
    } finally {
      signal.removeEventListener('abort', interrupt);
      if (timer !== null) clearTimeout(timer);
    }
    if (this.#failure !== null) throw this.#failure.error;
    return this.#outcomes;
  }

  /** Gives tasks to threads, in order, while both are left. A failure keeps later tasks from starting. */
  #startMore(): void {
    while (this.#next < this.#inputs.length && this.#busy.size < this.#options.threads && this.#failure === null) {
      const worker = this.#idle.pop() ?? new Worker(this.#options.worker);
      const index = this.#next;
      this.#next += 1;
      this.#busy.set(worker, index);
      this.#assign(worker, index);
    }
    if (this.#busy.size === 0) this.#settle();
  }

  #assign(worker: Worker, index: number): void {
    const release = (reusable: boolean) => {
      worker.removeAllListeners();
      this.#busy.delete(worker);
      if (reusable) this.#idle.push(worker);
      this.#startMore();
    };
    worker.on('message', (reply: TaskReply) => {
      if (reply.kind === 'progress') {
        this.#options.progress?.(reply.text);
        return;
      }
      if (reply.kind === 'done') this.#outcomes[index] = { done: true, result: reply.result };
      else this.#fail(index, restoreError(reply.error));
      release(true);
    });
    worker.on('error', (error) => {
      this.#fail(index, describeCrash(error));
      release(false);
    });
    worker.on('messageerror', (error) => {
      this.#fail(index, error);
      release(false);
    });
    const request: TaskRequest = { index, name: this.#name, input: this.#inputs[index], deadline: this.#deadline };
    worker.postMessage(request);
  }

  /** Keeps the failure of lowest index. Tasks start in order, so every task before it has started and will be awaited. */
  #fail(index: number, error: unknown): void {
    if (this.#failure === null || index < this.#failure.index) this.#failure = { index, error };
  }

  #stop(failure: { index: number; error: unknown } | null): void {
    this.#next = this.#inputs.length;
    if (failure !== null) this.#fail(failure.index, failure.error);
    for (const worker of this.#busy.keys()) {
      worker.removeAllListeners();
      worker.on('error', () => undefined);
      void worker.terminate();
    }
    this.#busy.clear();
    this.#settle();
  }
}

function describeCrash(error: unknown): unknown {
  if ((error as NodeJS.ErrnoException).code !== 'ERR_WORKER_OUT_OF_MEMORY') return error;
  return new ThalwegError(
    'too-large',
    'the computation needed more memory than a thread may use: give a smaller model or fewer constants (--only)',
  );
}
