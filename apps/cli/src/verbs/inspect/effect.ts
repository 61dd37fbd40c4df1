import type { ReportDocument } from '@thalweg/format';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import { only } from '../../compute/only.js';
import { requireTarget } from '../../output/require-target.js';
import { writePicture } from '../../output/write-picture.js';
import { renderReport } from '../../render/render-report.js';
import type { Session } from '../../session.js';
import type { InspectPlan } from './plan.js';

/** Tells what a model is. Ends with `no` when it is no Markov semigroup. */
export async function inspectEffect(plan: InspectPlan, session: Session): Promise<ExitStatus> {
  if (plan.svg !== null) await requireTarget(plan.svg);
  const source = await readModel(plan, session);
  const report = await session.compute(plan, async (pool) => only(await pool.run('report', [{ source }])));
  const { output } = session;
  if (output.json) output.document(report);
  else output.result(renderReport(report, output));
  if (plan.svg !== null) await writePicture(plan.svg, await pictureOf(report), output);
  const { hermitian, unital, completelyPositive } = report.markov;
  return hermitian.holds && unital.holds && completelyPositive.holds ? EXIT_STATUS.yes : EXIT_STATUS.no;
}

/** Pictures are loaded where they are asked for. */
async function pictureOf(report: ReportDocument): Promise<string> {
  const { reportPicture } = await import('../../render/report-picture.js');
  return reportPicture(report);
}
