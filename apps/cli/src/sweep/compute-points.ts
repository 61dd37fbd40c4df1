import { ThalwegError, type ConventionName, type SheetRequest } from '@thalweg/core';
import type { ExamplePackage, ParameterPoint, PointDocument, SheetDocument } from '@thalweg/format';
import { only } from '../compute/only.js';
import type { Pool } from '../compute/pool.js';
import type { TASKS } from '../compute/tasks.js';
import { generateModel } from '../input/read-model.js';
import type { ComputeLimits, Session } from '../session.js';

/** What is computed at every point. */
export interface SweepJob {
  readonly example: ExamplePackage;
  readonly request: SheetRequest;
  readonly convention: ConventionName;
}

/**
 * Computes the points on as many threads as there are, and hands over each as soon as it is done. After the time limit no point is
 * begun. A point that cannot be computed carries its error; only faults that concern all points are thrown.
 */
export async function computePoints(
  job: SweepJob,
  points: readonly ParameterPoint[],
  { threads, timeLimit }: ComputeLimits,
  session: Session,
  onPoint: (point: PointDocument) => Promise<void>,
): Promise<void> {
  const deadline = timeLimit === null ? Infinity : Date.now() + timeLimit;
  await session.compute({ threads, timeLimit: null }, async (pool) => {
    const queue = points.values();
    let failed = false;
    const lane = async (): Promise<void> => {
      for (const parameters of queue) {
        if (failed || Date.now() >= deadline) return;
        await onPoint(await computePoint(job, parameters, pool, session));
      }
    };
    const lanes = Array.from({ length: Math.min(threads, points.length) }, () =>
      lane().catch((error: unknown) => {
        failed = true;
        throw error;
      }),
    );
    const ends = await Promise.allSettled(lanes);
    const fault = ends.find((end) => end.status === 'rejected');
    if (fault) throw fault.reason;
  });
}

/** One point: the model is generated in the sandbox, its sheet computed on a thread. */
export async function computePoint(
  { example, request, convention }: SweepJob,
  parameters: ParameterPoint,
  pool: Pool<typeof TASKS>,
  session: Session,
): Promise<PointDocument> {
  try {
    const source = await generateModel(example, parameters, session);
    const sheet: SheetDocument = only(await pool.run('point-sheet', [{ source, request, convention }]));
    return { schema: 'thalweg.point/1', parameters, sheet };
  } catch (error) {
    if (!(error instanceof ThalwegError) || OF_ALL_POINTS.has(error.code)) throw error;
    const { code, message } = error;
    return { schema: 'thalweg.point/1', parameters, sheet: null, error: { code, message } };
  }
}

/** Faults that have nothing to do with the point at which they came. */
const OF_ALL_POINTS: ReadonlySet<string> = new Set(['interrupted', 'internal', 'cannot-write']);
