import { timeFault } from '../engine/faults.js';
import type { CompleteRun } from '../generator-run.js';
import { GRACE_MILLISECONDS, START_MILLISECONDS } from '../limits.js';
import type { Guarded } from '../pool.js';
import type { RunFault } from '../reply.js';

const NOT_STARTED: RunFault = {
  code: 'internal',
  message: 'expected the worker of the sandbox to start, it did not; load the page again',
};

/** One web worker that runs generators, one at a time, and is ended from outside when it does not stop by itself. */
export class GuardedWorker implements Guarded {
  readonly #worker: Worker;
  readonly #ready: Promise<unknown>;
  #settle: ((reply: unknown) => void) | null = null;
  #ended = false;

  constructor(script: URL) {
    this.#worker = new Worker(script, { type: 'module' });
    this.#worker.addEventListener('message', ({ data }: MessageEvent<unknown>) => this.#settle?.(data));
    this.#worker.addEventListener('error', () => this.#end(NOT_STARTED));
    this.#ready = this.#reply(START_MILLISECONDS, NOT_STARTED);
  }

  /** False after it was ended: it runs nothing more. */
  get alive(): boolean {
    return !this.#ended;
  }

  /** Sends the run and resolves to the reply, or to a fault when the worker had to be ended. */
  async run(run: CompleteRun): Promise<unknown> {
    const ready = await this.#ready;
    if (ready !== 'ready') return ready;
    this.#worker.postMessage(run);
    const reply = await this.#reply(run.limits.milliseconds + GRACE_MILLISECONDS, timeFault(run.limits));
    if (typeof reply === 'object' && reply !== null && 'poisoned' in reply) this.kill();
    return reply;
  }

  /** Ends the worker at once. */
  kill(): void {
    this.#end({ code: 'internal', message: 'the worker of the sandbox was ended' });
  }

  #reply(milliseconds: number, late: RunFault): Promise<unknown> {
    return new Promise((resolve) => {
      const timer = setTimeout(() => this.#end(late), milliseconds);
      this.#settle = (reply) => {
        clearTimeout(timer);
        this.#settle = null;
        resolve(reply);
      };
    });
  }

  #end(fault: RunFault): void {
    this.#ended = true;
    this.#worker.terminate();
    this.#settle?.({ fault });
  }
}
