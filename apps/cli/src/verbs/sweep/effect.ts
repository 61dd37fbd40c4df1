import type { RowKey } from '@thalweg/core';
import type { ExamplePackage, ParameterPoint, PointDocument, SweepDocument } from '@thalweg/format';
import { pointKey } from '../../example/recorded-sheet.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readPackage } from '../../input/read-package.js';
import { requireTarget } from '../../output/require-target.js';
import { printSweep } from '../../render/print-sweep.js';
import type { Session } from '../../session.js';
import { sheetRequest } from '../../sheet/compute-sheet.js';
import { rowKeys } from '../../sheet/row-keys.js';
import { computePoints } from '../../sweep/compute-points.js';
import { openJournal, rewriteJournal, type Journal } from '../../sweep/journal.js';
import { remainingTime } from '../../sweep/remaining-time.js';
import { sweepDocument } from '../../sweep/sweep-document.js';
import { limitsOf } from '../../sweep/sweep-limits.js';
import { sweepPoints } from '../../sweep/sweep-points.js';
import type { ComputePlan, SweepPlan } from './plan.js';

/** Computes constants over ranges of parameters, here or by workers, or works for others. */
export async function sweepEffect(plan: SweepPlan, session: Session): Promise<ExitStatus> {
  if (!plan.work) return computeSweep(plan, session);
  const { queue, threads } = plan;
  const { withQueue, workOnQueue } = await import('../../queue/index.js');
  await withQueue(queue, session.signal, (pool) => workOnQueue(pool, threads, session));
  return EXIT_STATUS.yes;
}

/** Ends with `no` when a point failed, with `try again` when points are left. */
async function computeSweep(plan: ComputePlan, session: Session): Promise<ExitStatus> {
  if (plan.output !== null) await requireTarget(plan.output);
  const example = await readPackage(plan.example, session);
  const points = sweepPoints(example.document, plan);
  const rows = rowKeys(plan);
  const sweep = sweepDocument(example, rows, plan);
  const journal = plan.output === null ? null : await openJournal(plan.output, sweep);
  const found = await collect({ example, rows, sweep }, points, journal, plan, session);
  await journal?.close();
  const done = points.flatMap((point) => found.get(pointKey(point)) ?? []);
  if (plan.output !== null && journal !== null && done.length === points.length) {
    await rewriteJournal(plan.output, sweep, kept(found, done));
  }
  const limits = plan.differences === null ? [] : await limitsOf(example, done, plan.differences, session);
  const { convention, differences: along } = plan;
  const over = plan.over.map(({ name }) => name);
  printSweep({ sweep, points: done, over, convention, along, limits }, plan, session.output);
  return statusOf(points, done, plan, session);
}

/** Computes what the journal does not hold, and adds it there. */
async function collect(
  task: SweepTask,
  points: readonly ParameterPoint[],
  journal: Journal | null,
  plan: ComputePlan,
  session: Session,
): Promise<Map<string, PointDocument>> {
  const found = new Map(journal?.finished);
  const left = points.filter((point) => !found.has(pointKey(point)));
  const started = Date.now();
  let done = 0;
  const tell = (): void => {
    const rest = remainingTime(done, left.length - done, Date.now() - started);
    const count = points.length - left.length + done;
    session.output.progress(`${count} of ${points.length} points done${rest === '' ? '' : `, ${rest}`}`);
    if (plan.output !== null)
      session.keep(`${count} of ${points.length} points are in ${plan.output}; the same command goes on`);
  };
  tell();
  await computeLeft(task, left, plan, session, async (point) => {
    found.set(pointKey(point.parameters), point);
    if (point.sheet !== null) await journal?.append(point);
    done += 1;
    tell();
  });
  session.output.progress('');
  return found;
}

interface SweepTask {
  readonly example: ExamplePackage;
  readonly rows: readonly RowKey[];
  readonly sweep: SweepDocument;
}

/** On the threads of this program, or by the workers of a queue. */
async function computeLeft(
  { example, rows, sweep }: SweepTask,
  left: readonly ParameterPoint[],
  plan: ComputePlan,
  session: Session,
  onPoint: (point: PointDocument) => Promise<void>,
): Promise<void> {
  const { queue, seed, convention } = plan;
  if (queue === null || left.length === 0) {
    return computePoints({ example, request: sheetRequest(rows, seed), convention }, left, plan, session, onPoint);
  }
  const { computeByWorkers, withQueue } = await import('../../queue/index.js');
  await withQueue(queue, session.signal, (pool) =>
    computeByWorkers(pool, sweep, example, left, plan, session, onPoint),
  );
}

/** Points worth keeping: those asked for, then others of the file; failed ones are tried again. */
function kept(found: ReadonlyMap<string, PointDocument>, done: readonly PointDocument[]): PointDocument[] {
  return [...new Set([...done, ...found.values()])].filter(({ sheet }) => sheet !== null);
}

function statusOf(
  points: readonly ParameterPoint[],
  done: readonly PointDocument[],
  { output }: ComputePlan,
  session: Session,
): ExitStatus {
  const failed = done.filter(({ sheet }) => sheet === null).length;
  if (failed > 0) session.output.note(`${failed} of ${points.length} points could not be computed.`);
  if (done.length < points.length) {
    const advice = output === null ? 'keep points with -o to go on later' : 'the same command goes on';
    session.output.note(`The time limit passed with ${done.length} of ${points.length} points done: ${advice}.`);
    return EXIT_STATUS.tryAgain;
  }
  return failed > 0 ? EXIT_STATUS.no : EXIT_STATUS.yes;
}
