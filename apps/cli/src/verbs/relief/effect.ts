import { bestWitness, ThalwegError, type ComplexMatrix } from '@thalweg/core';
import type { ReliefDocument } from '@thalweg/format';
import { only } from '../../compute/only.js';
import type { SliceRequest } from '../../compute/tasks/relief-tasks.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import { readSource, type DocumentSource } from '../../input/read-source.js';
import { requireTarget } from '../../output/require-target.js';
import { writePicture } from '../../output/write-picture.js';
import { reliefCsv } from '../../render/relief-csv.js';
import { renderRelief } from '../../render/render-relief.js';
import type { Session } from '../../session.js';
import { computeSheet } from '../../sheet/compute-sheet.js';
import type { ReliefPlan } from './plan.js';

/** Evaluates κ over a slice of state space, and draws it, or prints its values. */
export async function reliefEffect(plan: ReliefPlan, session: Session): Promise<ExitStatus> {
  if (plan.output !== null) await requireTarget(plan.output);
  const relief = await computeRelief(plan, session);
  const { output } = session;
  const picture = async (): Promise<string> => (await import('../../render/relief-picture.js')).reliefPicture(relief);
  if (output.json) output.document(relief);
  else if (plan.csv) output.result(reliefCsv(relief));
  else if (plan.table || plan.output !== null) output.result(renderRelief(relief, output, { table: plan.table }));
  else output.result(await picture());
  if (plan.output !== null) await writePicture(plan.output, await picture(), output);
  return EXIT_STATUS.yes;
}

async function computeRelief(plan: ReliefPlan, session: Session): Promise<ReliefDocument> {
  const { stdin } = session.terminal;
  const source = await readModel(plan, session);
  const through: DocumentSource[] = [];
  for (const path of plan.through) through.push(await readSource(path, stdin));
  const { axes, points } = plan;
  const request = { source, axes, through, points };
  const relief = await attempt(plan, { ...request, witness: null }, session);
  if (relief !== null) return relief;
  const witness = await searchedWitness(plan, source, session);
  const withWitness = await attempt(plan, { ...request, witness }, session);
  if (withWitness !== null) return withWitness;
  throw new ThalwegError('internal', 'expected a slice through the witness, got none; report the model');
}

/** Null when the slice needs a witness first. */
async function attempt(plan: ReliefPlan, request: SliceRequest, session: Session): Promise<ReliefDocument | null> {
  const { source } = request;
  const { mean, threads } = plan;
  return session.compute(plan, async (pool) => {
    const answer = only(await pool.run('relief-slice', [request]));
    if (answer.needsWitness) return null;
    const { slice, grid } = answer;
    // A few portions a thread even out what they share with others.
    const portions = Math.min(grid.rings, 2 * threads);
    const bounds = Array.from({ length: portions + 1 }, (_, k) => Math.round((grid.rings * k) / portions));
    const tell = (done: number): void => session.output.progress(`κ: ${done} of ${portions} portions done`);
    tell(0);
    const inputs = bounds
      .slice(1)
      .map((to, k) => ({ source, mean, slice, grid, rings: [bounds[k] ?? 0, to] as const }));
    const outcomes = await pool.run('relief-rings', inputs, tell);
    const values = Float64Array.from(outcomes.flatMap((outcome) => [...only([outcome])]));
    return only(await pool.run('relief-document', [{ source, mean, slice, grid, values }]));
  });
}

/** The state at which κ was lowest in a search over all of state space. */
async function searchedWitness(plan: ReliefPlan, source: DocumentSource, session: Session): Promise<ComplexMatrix> {
  const { mean, seed, convention, threads, timeLimit } = plan;
  const rows = [{ id: 'ge' as const, mean }];
  const job = { source, rows, seed, convention, limits: { threads, timeLimit }, searchClosed: true };
  const { findings } = await computeSheet(job, session);
  const witness = bestWitness(findings, 'ge', mean);
  if (witness !== null) return witness.state;
  throw new ThalwegError(
    'not-supported',
    'expected a witness of ge to lay the slice through, but no search is made for this model; give two states with --through',
  );
}
