import { EventEmitter } from 'node:events';
import { randomInt } from 'node:crypto';
import { Logger, run } from 'graphile-worker';
import type { Pool, PoolClient } from 'pg';
import type { Session } from '../session.js';
import { pointTask } from './point-task.js';
import { POINT_TASK, WORKER_LOCKS } from './queue-tables.js';
import { releaseDeadWorkers } from './release-dead-workers.js';

const POLL_MILLISECONDS = 1000;
const CHECK_MILLISECONDS = 5000;

/** Computes points of any sweep in the queue, on as many threads as given, until it is interrupted or loses the server. */
export async function workOnQueue(pool: Pool, threads: number, session: Session): Promise<void> {
  const living = await pool.connect();
  const lost = new Promise<never>((_resolve, reject) => living.on('error', reject));
  const { events, entered } = await register(living);
  const check = setInterval(() => void releaseDeadWorkers(pool).catch(() => undefined), CHECK_MILLISECONDS);
  try {
    await session.compute({ threads, timeLimit: null }, async (threadPool) => {
      const runner = await run({
        pgPool: pool,
        concurrency: threads,
        pollInterval: POLL_MILLISECONDS,
        noHandleSignals: true,
        logger: new Logger(() => () => undefined),
        events,
        taskList: { [POINT_TASK]: pointTask(pool, threadPool, session, entered) },
      });
      session.keep('points underway go back to the queue');
      session.output.note(`Working on ${threads} ${threads === 1 ? 'thread' : 'threads'}; interrupt to stop.`);
      const ends = [runner.promise, lost, aborted(session.signal)];
      await Promise.race(ends).finally(() => runner.stop().catch(() => undefined));
    });
  } finally {
    clearInterval(check);
    living.release(true);
  }
}

/**
 * Holds a lock that tells others that this program lives, and enters the names of its workers beside it as they start. `entered`
 * waits for that: no job is begun before.
 */
async function register(living: PoolClient) {
  const lock = randomInt(2 ** 31);
  await living.query('select pg_advisory_lock($1, $2)', [WORKER_LOCKS, lock]);
  const events = new EventEmitter();
  const names: Promise<unknown>[] = [];
  events.on('worker:create', ({ worker }: { worker: { workerId: string } }) => {
    const row = [worker.workerId, lock];
    names.push(living.query('insert into thalweg_sweep.worker (name, lock_id) values ($1, $2)', row));
  });
  return { events, entered: () => Promise.all(names) };
}

function aborted(signal: AbortSignal): Promise<void> {
  return new Promise((resolve) => {
    if (signal.aborted) resolve();
    signal.addEventListener('abort', () => resolve(), { once: true });
  });
}
