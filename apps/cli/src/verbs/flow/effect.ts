import { DESCENT_CONSTANTS, type RowKey, type SheetRequest } from '@thalweg/core';
import type { FlowDocument } from '@thalweg/format';
import { only } from '../../compute/only.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import { readSource } from '../../input/read-source.js';
import { requireTarget } from '../../output/require-target.js';
import { writePicture } from '../../output/write-picture.js';
import { flowCsv } from '../../render/flow-csv.js';
import { renderFlow } from '../../render/render-flow.js';
import type { Session } from '../../session.js';
import type { FlowPlan } from './plan.js';

const USUAL_POINTS = 101;

/** Follows a state along the flow and prints entropy, production and distance with their bounds. */
export async function flowEffect(plan: FlowPlan, session: Session): Promise<ExitStatus> {
  if (plan.svg !== null) await requireTarget(plan.svg);
  const flow = await computeFlow(plan, session);
  const { output } = session;
  if (output.json) output.document(flow);
  else if (plan.csv) output.result(flowCsv(flow));
  else output.result(renderFlow(flow, output, { whole: plan.points !== null }));
  if (plan.svg !== null) await writePicture(plan.svg, await pictureOf(flow), output);
  return EXIT_STATUS.yes;
}

/** Proves the lower ends that bound a flow, without any search: a search gives upper ends only. */
async function computeFlow(plan: FlowPlan, session: Session): Promise<FlowDocument> {
  const { stdin } = session.terminal;
  const source = await readModel(plan, session);
  const from = await readSource(plan.from, stdin);
  const rows = DESCENT_CONSTANTS.map((id): RowKey => (id === 'ge' ? { id, mean: 'logarithmic' } : { id }));
  const request: SheetRequest = { rows, seed: plan.seed, randomStarts: 0, epsilon: 1 };
  return session.compute(plan, async (pool) => {
    session.output.progress('eigenvalue problems and lifts');
    const [proofs] = await pool.run('sheet-proofs', [{ source, request, searchClosed: false }]);
    if (!proofs?.done) {
      session.output.note(
        'The time limit ended the eigenvalue problems: only what theorems give bounds the flow here.',
      );
    }
    const findings = proofs?.done ? proofs.result.findings : [];
    session.output.progress('flow');
    const points = plan.points ?? USUAL_POINTS;
    return only(await pool.run('flow', [{ source, from, until: plan.until, points, request, findings }]));
  });
}

/** Pictures are loaded where they are asked for. */
async function pictureOf(flow: FlowDocument): Promise<string> {
  const { flowPicture } = await import('../../render/flow-picture.js');
  return flowPicture(flow);
}
