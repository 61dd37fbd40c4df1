import { ThalwegError } from '@thalweg/core';
import type { TaskContext } from '../../src/compute/protocol.js';

/** Tasks for the tests of the pool. */
export const TEST_TASKS = {
  square: (x: number) => x * x,
  /** Later tasks finish first. */
  slowSquare: async ({ x, milliseconds }: { x: number; milliseconds: number }) => {
    await new Promise((resolve) => setTimeout(resolve, milliseconds));
    return x * x;
  },
  fail: async ({ message, milliseconds }: { message: string; milliseconds: number }): Promise<number> => {
    await new Promise((resolve) => setTimeout(resolve, milliseconds));
    throw new ThalwegError('not-hermitian', message, { pointer: '/state', details: { residual: 0.5 } });
  },
  crash: (_: null): number => {
    throw new TypeError('a fault of the task');
  },
  // eslint-disable-next-line no-restricted-syntax -- the death of a thread is what is tested.
  exit: (_: null): never => process.exit(3) as never,
  spin: (_: null): never => {
    for (;;);
  },
  untilTheLimit: (_: null, context: TaskContext) => {
    while (!context.isOutOfTime());
    return 'best so far';
  },
  talk: (name: string, context: TaskContext) => {
    context.progress(`${name} begins`);
    return name;
  },
  threadOf: async (_: null) => (await import('node:worker_threads')).threadId,
};
