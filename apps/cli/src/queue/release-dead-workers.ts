import type { Pool } from 'pg';
import { POINT_TASK, WORKER_LOCKS } from './queue-tables.js';

/**
 * Gives the jobs of dead workers back to the queue and returns how many are alive. A living worker holds an advisory lock on a
 * connection of its own, which the server drops with the connection: no clock has to agree. A job locked by a worker that never
 * came to enter its name is given back after a while by the server's clock.
 */
export async function releaseDeadWorkers(pool: Pool): Promise<number> {
  const client = await pool.connect();
  try {
    const { rows } = await client.query<{ name: string; lock_id: number }>(
      'select name, lock_id from thalweg_sweep.worker',
    );
    const dead: string[] = [];
    for (const { name, lock_id } of rows) {
      const free = await client.query<{ free: boolean }>('select pg_try_advisory_lock_shared($1, $2) as free', [
        WORKER_LOCKS,
        lock_id,
      ]);
      if (free.rows[0]?.free !== true) continue;
      await client.query('select pg_advisory_unlock_shared($1, $2)', [WORKER_LOCKS, lock_id]);
      dead.push(name);
    }
    const unknown = await client.query<{ locked_by: string }>(
      `select distinct locked_by from graphile_worker.jobs
       where task_identifier = $1 and locked_at < now() - interval '30 seconds'
       and locked_by not in (select name from thalweg_sweep.worker)`,
      [POINT_TASK],
    );
    dead.push(...unknown.rows.map(({ locked_by }) => locked_by));
    if (dead.length > 0) {
      await client.query('select graphile_worker.force_unlock_workers($1::text[])', [dead]);
      await client.query('delete from thalweg_sweep.worker where name = any ($1::text[])', [dead]);
    }
    return rows.filter(({ name }) => !dead.includes(name)).length;
  } finally {
    client.release();
  }
}
