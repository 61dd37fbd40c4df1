import { Worker } from 'node:worker_threads';
import { ThalwegError } from '@thalweg/core';
import type { TaskReply, TaskRequest } from './protocol.js';

/** Who listens to a thread while it runs a task. */
export interface ThreadListener {
  reply(message: TaskReply): void;
  /** The thread is gone. */
  crash(error: unknown): void;
}

/** One worker thread, which runs one task at a time. */
export class Thread {
  readonly #worker: Worker;
  #listener: ThreadListener | null = null;

  constructor(module: URL) {
    this.#worker = new Worker(module);
    this.#worker.on('message', (message: TaskReply) => this.#listener?.reply(message));
    this.#worker.on('messageerror', (error) => this.#crash(error));
    this.#worker.on('error', (error) => this.#crash(describe(error)));
    this.#worker.on('exit', (code) => this.#crash(new Error(`a thread ended by itself with exit code ${code}`)));
  }

  start(request: TaskRequest, listener: ThreadListener): void {
    this.#listener = listener;
    this.#worker.postMessage(request);
  }

  /** Ends the thread at once, whatever it does; its listener hears nothing more. */
  async end(): Promise<void> {
    this.#listener = null;
    await this.#worker.terminate();
  }

  #crash(error: unknown): void {
    const listener = this.#listener;
    this.#listener = null;
    listener?.crash(error);
  }
}

function describe(error: unknown): unknown {
  if ((error as NodeJS.ErrnoException).code !== 'ERR_WORKER_OUT_OF_MEMORY') return error;
  return new ThalwegError(
    'too-large',
    'the computation needed more memory than a thread may use: give a smaller model or fewer constants (--only)',
  );
}
