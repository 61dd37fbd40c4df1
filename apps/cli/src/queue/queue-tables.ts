import { runMigrations } from 'graphile-worker';
import type { Pool } from 'pg';

/** The task of one point, as graphile-worker knows it. */
export const POINT_TASK = 'thalweg-point';

/** Class of the advisory locks that living workers hold. */
export const WORKER_LOCKS = 0x7468;

/**
 * Sweeps with their packages, points with their results, and who works. A point has at most one result: its key is the primary
 * key, and a result is written only where there is none.
 */
const TABLES = `
  create schema if not exists thalweg_sweep;
  create table if not exists thalweg_sweep.sweep (
    id text primary key,
    document text not null,
    archive bytea not null
  );
  create table if not exists thalweg_sweep.point (
    sweep text not null references thalweg_sweep.sweep (id) on delete cascade,
    key text not null,
    parameters text not null,
    result text,
    worker text,
    primary key (sweep, key)
  );
  create table if not exists thalweg_sweep.worker (
    name text primary key,
    lock_id integer not null
  );
`;

/** Makes the tables of sweeps and of graphile-worker where they are missing; several programs may do so at once. */
export async function ensureTables(pool: Pool): Promise<void> {
  const client = await pool.connect();
  try {
    await client.query('select pg_advisory_lock($1, 0)', [WORKER_LOCKS]);
    await client.query(TABLES);
    await runMigrations({ pgPool: pool });
  } finally {
    await client.query('select pg_advisory_unlock($1, 0)', [WORKER_LOCKS]);
    client.release();
  }
}
