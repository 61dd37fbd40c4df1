import { writeJson } from '@thalweg/format';
import { checkGenerated } from '../../example/check-generated.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { generateModel, settingsPoint } from '../../input/read-model.js';
import { readPackage } from '../../input/read-package.js';
import { requireTarget } from '../../output/require-target.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import type { Session } from '../../session.js';
import type { ModelPlan } from './plan.js';

/** Writes the model that an example generates at the parameters of `--set`. */
export async function modelEffect(plan: ModelPlan, session: Session): Promise<ExitStatus> {
  if (plan.output !== null) await requireTarget(plan.output);
  const example = await readPackage(plan.example, session);
  const source = await generateModel(example, settingsPoint(example.document, plan.set), session);
  const { document, digest } = checkGenerated(source);
  const text = writeJson(document);
  if (plan.output === null) session.output.result(text);
  else await writeFileAtomically(plan.output, text);
  session.output.note(`${source.name}: model ${digest}${plan.output === null ? '' : `, written to ${plan.output}`}`);
  return EXIT_STATUS.yes;
}
