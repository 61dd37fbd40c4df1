import { setTimeout as sleep } from 'node:timers/promises';
import { parsePoint, type ParameterPoint, type PointDocument } from '@thalweg/format';
import type { Pool } from 'pg';
import { pointKey } from '../example/recorded-sheet.js';
import { releaseDeadWorkers } from './release-dead-workers.js';

const POLL_MILLISECONDS = 500;
/** Points asked about at once: jobs are taken in order, so those done next are among the first. */
const WINDOW = 1000;

/** Waits for the results of points, and hands over each once; the jobs of workers that died are given to others meanwhile. */
export async function collectResults(
  pool: Pool,
  sweep: string,
  points: readonly ParameterPoint[],
  { signal, deadline, tellWorkers }: CollectOptions,
  onPoint: (point: PointDocument) => Promise<void>,
): Promise<void> {
  const left = new Set(points.map(pointKey));
  while (left.size > 0 && !signal.aborted && Date.now() < deadline) {
    tellWorkers(await releaseDeadWorkers(pool));
    const { rows } = await pool.query<{ key: string; result: string }>(
      'select key, result from thalweg_sweep.point where sweep = $1 and key = any ($2::text[]) and result is not null',
      [sweep, [...left].slice(0, WINDOW)],
    );
    for (const { key, result } of rows) {
      left.delete(key);
      await onPoint(parsePoint(result));
    }
    if (rows.length === 0) await sleep(POLL_MILLISECONDS, undefined, { signal }).catch(() => undefined);
  }
}

export interface CollectOptions {
  readonly signal: AbortSignal;
  /** Milliseconds since 1970 after which waiting ends. */
  readonly deadline: number;
  /** Hears how many threads work on sweeps now. */
  readonly tellWorkers: (living: number) => void;
}
