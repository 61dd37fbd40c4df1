import type { ExamplePackage, ParameterPoint, PointDocument, SweepDocument } from '@thalweg/format';
import type { Pool } from 'pg';
import type { ComputeLimits, Session } from '../session.js';
import { collectResults } from './collect-results.js';
import { submitSweep } from './submit-sweep.js';

/** Puts points into the queue and waits for what workers find. Points stay in the queue when waiting ends early. */
export async function computeByWorkers(
  pool: Pool,
  sweep: SweepDocument,
  example: ExamplePackage,
  points: readonly ParameterPoint[],
  { timeLimit }: ComputeLimits,
  session: Session,
  onPoint: (point: PointDocument) => Promise<void>,
): Promise<void> {
  const id = await submitSweep(pool, sweep, example, points);
  let told = false;
  const tellWorkers = (living: number): void => {
    if (living > 0 || told) return;
    told = true;
    session.output.note('No worker is there yet: start some with thalweg sweep --work and the same --queue.');
  };
  const deadline = timeLimit === null ? Infinity : Date.now() + timeLimit;
  await collectResults(pool, id, points, { signal: session.signal, deadline, tellWorkers }, onPoint);
}
