import { interruptedError } from './interrupted-error.js';
import { restoreError, type Task, type TaskRegistry, type TaskRequest } from './protocol.js';
import { Thread } from './thread.js';

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
   * `onDone` hears after every task how many are done.
   */
  run<Name extends keyof Registry & string>(
    name: Name,
    inputs: readonly InputOf<Registry[Name]>[],
    onDone?: (done: number) => void,
  ): Promise<TaskOutcome<ResultOf<Registry[Name]>>[]>;
  /** Ends the threads. */
  close(): Promise<void>;
}

/** Creates a pool; threads start when there are tasks for them and are kept until `close`. */
export function createPool<Registry extends TaskRegistry>(options: PoolOptions): Pool<Registry> {
  const idle: Thread[] = [];
  return {
    run: (name, inputs, onDone) => new Batch(options, idle, name, inputs, onDone).run() as Promise<never>,
    close: async () => {
      await Promise.all(idle.splice(0).map((thread) => thread.end()));
    },
  };
}

/** One call of `run`. */
class Batch {
  readonly #options: PoolOptions;
  readonly #idle: Thread[];
  readonly #name: string;
  readonly #inputs: readonly unknown[];
  readonly #outcomes: TaskOutcome<unknown>[];
  readonly #onDone: ((done: number) => void) | undefined;
  readonly #busy = new Set<Thread>();
  readonly #deadline: number | null;
  #next = 0;
  #failure: { index: number; error: unknown } | null = null;
  #settle: () => void = () => undefined;

  constructor(
    options: PoolOptions,
    idle: Thread[],
    name: string,
    inputs: readonly unknown[],
    onDone?: (done: number) => void,
  ) {
    this.#options = options;
    this.#idle = idle;
    this.#name = name;
    this.#inputs = inputs;
    this.#outcomes = inputs.map(() => ({ done: false }));
    this.#onDone = onDone;
    this.#deadline = options.timeLimit === null ? null : Date.now() + options.timeLimit;
  }

  async run(): Promise<TaskOutcome<unknown>[]> {
    const { signal, timeLimit } = this.#options;
    const interrupt = () => {
      this.#stop({ index: -1, error: interruptedError() });
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
      const thread = this.#idle.pop() ?? new Thread(this.#options.worker);
      const index = this.#next;
      this.#next += 1;
      this.#busy.add(thread);
      this.#assign(thread, index);
    }
    if (this.#busy.size === 0) this.#settle();
  }

  #assign(thread: Thread, index: number): void {
    const request: TaskRequest = { index, name: this.#name, input: this.#inputs[index], deadline: this.#deadline };
    thread.start(request, {
      reply: (message) => {
        if (message.kind === 'progress') {
          this.#options.progress?.(message.text);
          return;
        }
        if (message.kind === 'done') this.#finish(index, message.result);
        else this.#fail(index, restoreError(message.error));
        this.#idle.push(thread);
        this.#release(thread);
      },
      crash: (error) => {
        this.#fail(index, error);
        this.#release(thread);
      },
    });
  }

  #finish(index: number, result: unknown): void {
    this.#outcomes[index] = { done: true, result };
    this.#onDone?.(this.#outcomes.filter(({ done }) => done).length);
  }

  #release(thread: Thread): void {
    this.#busy.delete(thread);
    this.#startMore();
  }

  /** Keeps the failure of lowest index. Tasks start in order, so every task before it has started and will be awaited. */
  #fail(index: number, error: unknown): void {
    if (this.#failure === null || index < this.#failure.index) this.#failure = { index, error };
  }

  #stop(failure: { index: number; error: unknown } | null): void {
    this.#next = this.#inputs.length;
    if (failure !== null) this.#fail(failure.index, failure.error);
    for (const thread of this.#busy) void thread.end();
    this.#busy.clear();
    this.#settle();
  }
}
