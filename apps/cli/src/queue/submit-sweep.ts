import {
  canonicalJson,
  packArchive,
  sha256Hex,
  type ExamplePackage,
  type ParameterPoint,
  type SweepDocument,
} from '@thalweg/format';
import type { Pool } from 'pg';
import { pointKey } from '../example/recorded-sheet.js';
import { lineOf } from '../sweep/journal.js';
import { POINT_TASK } from './queue-tables.js';

/** Jobs are tried this often before they count as failed; a worker that is killed uses up one try. */
const ATTEMPTS = 25;

/**
 * Puts the points of a sweep into the queue and returns the sweep's name there. Points that have a result already keep it, those
 * that failed are tried again. Points and jobs are stored in one transaction.
 */
export async function submitSweep(
  pool: Pool,
  sweep: SweepDocument,
  { files }: ExamplePackage,
  points: readonly ParameterPoint[],
): Promise<string> {
  const id = sha256Hex(lineOf(sweep));
  const client = await pool.connect();
  try {
    await client.query('begin');
    await client.query(
      'insert into thalweg_sweep.sweep (id, document, archive) values ($1, $2, $3) on conflict (id) do nothing',
      [id, lineOf(sweep), Buffer.from(packArchive(files))],
    );
    const keys = points.map(pointKey);
    await client.query(
      `insert into thalweg_sweep.point (sweep, key, parameters)
       select $1, key, parameters from unnest($2::text[], $3::text[]) as asked (key, parameters)
       on conflict (sweep, key) do update set result = null
       where thalweg_sweep.point.result::json ->> 'error' is not null`,
      [id, keys, points.map((point) => canonicalJson(point))],
    );
    await client.query(
      `select count(graphile_worker.add_job($3, json_build_object('sweep', sweep, 'key', key),
         job_key := 'thalweg ' || sweep || ' ' || key, job_key_mode := 'preserve_run_at', max_attempts := $4))
       from thalweg_sweep.point where sweep = $1 and key = any ($2::text[]) and result is null`,
      [id, keys, POINT_TASK, ATTEMPTS],
    );
    await client.query('commit');
  } catch (error) {
    await client.query('rollback');
    throw error;
  } finally {
    client.release();
  }
  return id;
}
