import { ThalwegError, type ConventionName } from '@thalweg/core';
import { completePoint, parseSweep, readArchive, readExample, type ParameterPoint } from '@thalweg/format';
import type { Task } from 'graphile-worker';
import type { Pool } from 'pg';
import type { Pool as ThreadPool } from '../compute/pool.js';
import type { TASKS } from '../compute/tasks.js';
import type { Session } from '../session.js';
import { sheetRequest } from '../sheet/compute-sheet.js';
import { computePoint, type SweepJob } from '../sweep/compute-points.js';
import { lineOf } from '../sweep/journal.js';
import { sweepDocument } from '../sweep/sweep-document.js';

/** The job of one point: computes it unless it has a result, and writes the result unless there is one by then. */
export function pointTask(
  pool: Pool,
  threads: ThreadPool<typeof TASKS>,
  session: Session,
  entered: () => Promise<unknown>,
): Task {
  const sweeps = new Map<string, SweepJob>();
  let done = 0;
  return async (payload, { job }) => {
    await entered();
    const { sweep, key } = readPayload(payload);
    const { rows } = await pool.query<{ parameters: string; result: string | null }>(
      'select parameters, result from thalweg_sweep.point where sweep = $1 and key = $2',
      [sweep, key],
    );
    const [point] = rows;
    if (point === undefined || point.result !== null) return;
    const work = sweeps.get(sweep) ?? (await loadSweep(pool, sweep));
    sweeps.set(sweep, work);
    const values = JSON.parse(point.parameters) as ParameterPoint;
    const parameters = completePoint(work.example.document.parameters, values);
    const result = await computePoint(work, parameters, threads, session);
    await pool.query(
      'update thalweg_sweep.point set result = $3, worker = $4 where sweep = $1 and key = $2 and result is null',
      [sweep, key, lineOf(result), job.locked_by],
    );
    done += 1;
    session.output.progress(`${done} points computed`);
  };
}

function readPayload(payload: unknown): { readonly sweep: string; readonly key: string } {
  const { sweep, key } = (payload ?? {}) as Record<string, unknown>;
  if (typeof sweep === 'string' && typeof key === 'string') return { sweep, key };
  throw new ThalwegError('internal', 'expected a job with a sweep and a key, got another one');
}

/** The example and settings of a sweep. A sweep of another version of the program is refused: its results could differ. */
async function loadSweep(pool: Pool, id: string): Promise<SweepJob> {
  const { rows } = await pool.query<{ document: string; archive: Buffer }>(
    'select document, archive from thalweg_sweep.sweep where id = $1',
    [id],
  );
  const [found] = rows;
  if (found === undefined) throw new ThalwegError('not-found', `expected the sweep ${id} in the queue, got none`);
  const sweep = parseSweep(found.document);
  const example = readExample(readArchive(new Uint8Array(found.archive)));
  const rowsOfSheet = sweep.constants.map(({ id: constant, mean }) =>
    mean === undefined ? { id: constant } : { id: constant, mean },
  );
  const convention = sweep.convention as ConventionName;
  const own = sweepDocument(example, rowsOfSheet, { convention, seed: Number(sweep.seed) });
  if (lineOf(own) !== lineOf(sweep)) {
    const message = `expected a sweep of thalweg ${own.tool.version}, got one of ${sweep.tool.version}; use the same version everywhere`;
    throw new ThalwegError('not-supported', message);
  }
  return { example, request: sheetRequest(rowsOfSheet, Number(sweep.seed)), convention };
}
