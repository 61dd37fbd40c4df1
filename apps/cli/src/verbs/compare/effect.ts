import { comparisonWitness, type RowKey } from '@thalweg/core';
import { writeJson, type ComparisonDocument } from '@thalweg/format';
import { only } from '../../compute/only.js';
import type { ComparisonOutcome } from '../../compute/tasks/comparison-tasks.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import type { DocumentSource } from '../../input/read-source.js';
import { requireTarget } from '../../output/require-target.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import { renderComparison } from '../../render/render-comparison.js';
import type { Session } from '../../session.js';
import { computeSheet } from '../../sheet/compute-sheet.js';
import type { ComparePlan } from './plan.js';

const ROWS: readonly RowKey[] = [{ id: 'gap' }, { id: 'ge', mean: 'logarithmic' }, { id: 't2' }, { id: 'diameter' }];

/** Compares the notions of curvature: no when one lies below what is proved or an inequality fails, undecided when they differ. */
export async function compareEffect(plan: ComparePlan, session: Session): Promise<ExitStatus> {
  if (plan.output !== null) await requireTarget(plan.output);
  const source = await readModel(plan, session);
  const found = await computeComparison(plan, source, session);
  if (plan.output !== null) await writeFileAtomically(plan.output, writeJson(found));
  const { output } = session;
  if (output.json) output.document(found);
  else output.result(renderComparison(found, output));
  if (plan.output !== null) output.note(`wrote ${plan.output}`);
  return statusOf(found);
}

async function computeComparison(
  plan: ComparePlan,
  source: DocumentSource,
  session: Session,
): Promise<ComparisonDocument> {
  const { seed, convention, threads, timeLimit, pairs } = plan;
  const limits = { threads, timeLimit };
  const job = { source, rows: ROWS, seed, convention, limits };
  // Refuses a model without a transport metric before any search.
  await session.compute(limits, async (pool) =>
    only(await pool.run('compare-starts', [{ source, witness: null, count: 0, seed }])),
  );
  const { sheet, findings } = await computeSheet(job, session);
  let witness = comparisonWitness(findings);
  if (witness === null) {
    // The bracket was closed without a search; where its upper end is attained is what a comparison starts from.
    const search = await computeSheet({ ...job, rows: ROWS.slice(1, 2), searchClosed: true }, session);
    witness = comparisonWitness(search.findings);
  }
  return session.compute(limits, async (pool) => {
    const starts = only(await pool.run('compare-starts', [{ source, witness, count: pairs, seed }]));
    const tell = (done: number): void => session.output.progress(`pairs of states: ${done} of ${starts.length} done`);
    tell(0);
    const outcomes = await pool.run(
      'compare-pair',
      starts.map((start) => ({ source, start, sheet })),
      tell,
    );
    const compared: ComparisonOutcome[] = [];
    for (const outcome of outcomes) if (outcome.done) compared.push(outcome.result);
    return only(await pool.run('compare-document', [{ source, sheet, witness, compared, pairs, seed }]));
  });
}

function statusOf({ notions, inequalities, agree }: ComparisonDocument): ExitStatus {
  const isBroken = notions.some(({ aboveProved }) => aboveProved === false);
  if (isBroken || inequalities.some(({ status }) => status === 'violated')) return EXIT_STATUS.no;
  return agree && notions.length === 3 ? EXIT_STATUS.yes : EXIT_STATUS.undecided;
}
