import { writeJson } from '@thalweg/format';
import { only } from '../../compute/only.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import { readSource } from '../../input/read-source.js';
import { requireTarget } from '../../output/require-target.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import { renderDistance } from '../../render/render-distance.js';
import type { Session } from '../../session.js';
import type { DistancePlan } from './plan.js';

/** Brackets the transport distance of two states; undecided when the width asked for was not reached. */
export async function distanceEffect(plan: DistancePlan, session: Session): Promise<ExitStatus> {
  if (plan.output !== null) await requireTarget(plan.output);
  const { stdin } = session.terminal;
  const source = await readModel(plan, session);
  const from = await readSource(plan.from, stdin);
  const to = await readSource(plan.to, stdin);
  const request = { source, from, to, relativeWidth: plan.width, points: plan.points };
  const found = await session.compute(plan, async (pool) => only(await pool.run('distance', [request])));
  if (plan.output !== null) await writeFileAtomically(plan.output, writeJson(found));
  const { output } = session;
  if (output.json) output.document(found);
  else output.result(renderDistance(found, output));
  if (plan.output !== null) output.note(`wrote ${plan.output}`);
  if (found.reached) return EXIT_STATUS.yes;
  output.note('The bracket is wider than was asked for: give more time with --time-limit, or a larger --width.');
  return EXIT_STATUS.undecided;
}
